import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { knownStarts, usedRows, type Row } from '../../../../shared/motion/chains'
import { directionOf } from '../../../../shared/motion/thrust'
import { waysOf, type Way } from '../../../../shared/motion/ways'
import type { Move } from '../../../../shared/settings/types'
import { absolute, press, relative } from '../../../support/check-input'

const row = (move: Move): Row => ({ move, index: 0 })
const alone = (move: Move, setup = {}) => waysOf(row(move), undefined, { setup })
const within = (moves: readonly Move[], number: number) => {
  const rows = usedRows(moves)
  return waysOf(rows.find(({ move }) => move.move === number)!, knownStarts(rows).get(number))
}
const directions = (ways: readonly Way[]) => ways.map(({ profile }) => directionOf(profile.segments[0]!))

describe('waysOf', () => {
  it('starts where the rows that name it end: 100 − 0 there, 50 mm back from 150', () => {
    const ways = within([absolute(1, 0, { next: 3 }), absolute(2, 150, { next: 3 }), absolute(3, 100)], 3)
    expect(ways.map(({ profile, known }) => [profile.from, known])).toEqual([[0, true], [150, true]])
    expect(directions(ways)).toEqual([1, -1])
  })

  it('comes both ways, at the speed asked, where nobody names it', () => {
    const ways = alone(absolute(1, 20, { speed: 900, acceleration: 100 }))
    expect(directions(ways)).toEqual([1, -1])
    for (const { profile, known } of ways) {
      expect(known).toBe(false)
      expect(profile.end).toBe(20)
      expect(profile.peakSpeed).toBe(900)
    }
  })

  it('comes both ways besides the known start where a row before ends nobody knows where', () => {
    const ways = within([absolute(1, 50, { next: 3 }), relative(2, 10, { next: 3 }), absolute(3, 100)], 3)
    expect(ways.map(({ known }) => known)).toEqual([true, false, false])
  })

  it('lies where the axis is, save for a relative move from nobody knows where', () => {
    const placed = (moves: readonly Move[], number: number) => within(moves, number).map(way => [way.placed, way.profile.from])
    expect(placed([absolute(1, 50, { next: 2 }), relative(2, 10)], 2)).toEqual([[true, 50]])
    expect(placed([absolute(1, 50, { next: 3 }), relative(2, 10, { next: 3 }), relative(3, 10)], 3)).toEqual([[true, 50], [false, 0]])
  })

  it('is one for a relative move, whose way is the same from everywhere', () => {
    const [way, ...others] = alone(relative(1, -5))
    expect(others).toEqual([])
    // 5 mm at 2000 mm/s²: √(2000·5) = 100 mm/s.
    expect(way).toMatchObject({ known: true, placed: false, profile: { from: 0, end: -5 } })
    expect(way!.profile.peakSpeed).toBeCloseTo(100, 9)
  })

  it('comes towards the target of a press only', () => {
    expect(directions(alone(press(1, 100, 150)))).toEqual([1])
    expect(directions(alone(press(1, 100, 50)))).toEqual([-1])
    expect(directions(alone(press(1, 100, 100)))).toEqual([1, -1])
  })

  it('turns as a modulo axis is told', () => {
    const setup = { modulo: 360 }
    expect(directions(alone(absolute(1, 90, { turn: 'positive' }), setup))).toEqual([1])
    expect(directions(alone(absolute(1, 90, { turn: 'negative' }), setup))).toEqual([-1])
    expect(directions(alone(absolute(1, 90, { turn: 'shortest' }), setup))).toEqual([1, -1])
  })

  it('has none where it is there already', () => {
    expect(alone(relative(1, 0))).toEqual([])
    expect(within([absolute(1, 100, { next: 2 }), absolute(2, 100)], 2)).toEqual([])
  })

  it('reaches the speed asked on every run-up, presses too', () => {
    const above = fc.integer({ min: 1, max: 5000 })
    fc.assert(fc.property(above, above, above, fc.boolean(), (speed, acceleration, deceleration, pressing) => {
      const drive = { speed, acceleration, deceleration }
      for (const { profile } of alone(pressing ? press(1, 100, 150, { ...drive, pressSpeed: 1 }) : absolute(1, 100, drive))) expect(profile.peakSpeed).toBe(speed)
    }))
  })
})
