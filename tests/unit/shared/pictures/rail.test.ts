import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { Content } from '../../../../shared/settings/types'
import { layoutRail } from '../../../../shared/pictures/rail'
import type { RailText } from '../../../../shared/pictures/rail-half'
import { railInputOf, railSideOf } from '../../../../shared/pictures/rail-input'
import { extentOf } from '../../../../shared/pictures/scale'
import { absolute, inputOf, lid, plate, press, usual } from '../../../support/lid-rail'

describe('railInputOf', () => {
  it('reaches from hard stop to hard stop where homing tells where they are', () => {
    expect(inputOf(lid(usual), plate)).toMatchObject({ low: 0, high: 200, stops: { low: 0, high: 200 } })
    expect(inputOf(lid(usual, { homeOffset: -1.35 }), plate)).toMatchObject({ low: 0, high: 201.35, stops: { low: 1.35, high: 201.35 } })
  })

  it('is broken off over all that stands on it where they are not known', () => {
    const input = inputOf(lid(usual))
    expect(input.stops).toBeUndefined()
    expect(input.low).toBeLessThan(0)
    expect(input.high).toBeGreaterThan(185)
  })

  it('shows one turn of a rotary axis', () => {
    const table: Content = { axisKind: 'rotary', extra: {}, zones: [], moves: [absolute(0, 90)], setup: { modulo: 360 } }
    expect(inputOf(table)).toMatchObject({ low: 0, high: 360, wraps: true, axisKind: 'rotary' })
  })

  it('draws the bare rule of an axis without moves, limits or nameplate', () => {
    expect(inputOf({ axisKind: 'linear', extra: {}, zones: [], moves: [], setup: {} })).toMatchObject({ low: 0, high: 100, wraps: false })
  })

  it('leaves unused rows out and tells steps apart', () => {
    const side = railSideOf(lid([...usual, absolute(9, 50, { speed: 0, acceleration: 0 })]), 'today')
    expect(side.moves.map(move => move.move)).toEqual([0, 1, 2, 3, 4, 5])
    expect(side.steps).toEqual([{ move: 8, by: -2 }])
  })

  it('takes the direction from the row that names a move, else from the row before it', () => {
    const side = railSideOf(lid(usual), 'today')
    expect(Object.fromEntries(side.moves.map(move => [move.move, move.direction]))).toEqual({ 0: 0, 1: 1, 2: 1, 3: 1, 4: -1, 5: -1 })
  })
})

const textsOverlap = (texts: readonly RailText[]) => texts.some((one, index) => texts.slice(index + 1).some((other) => {
  const [a, b] = [extentOf(one), extentOf(other)]
  return Math.abs(one.y - other.y) < 9 && a[0] < b[1] - 1 && b[0] < a[1] - 1
}))

describe('layoutRail', () => {
  it('stands to scale: a target lies where its number says', () => {
    const layout = layoutRail(inputOf(lid(usual), plate), 1376)
    const one = layout.halves[0]?.balloons.find(balloon => balloon.move === 1)
    expect(one?.x).toBeCloseTo(84 + 70 * (1376 - 40 - 84) / 200, -0.5)
  })

  it('lets no balloons and no texts meet, at any width', () => {
    const moves = fc.array(fc.double({ min: 0, max: 200, noNaN: true }), { maxLength: 40 })
    fc.assert(fc.property(moves, fc.integer({ min: 280, max: 2400 }), (targets, width) => {
      const layout = layoutRail(inputOf(lid(targets.map((target, move) => absolute(move, target))), plate), width)
      const balloons = layout.halves[0]?.balloons ?? []
      for (const [index, one] of balloons.entries()) {
        for (const other of balloons.slice(index + 1)) {
          expect(Math.hypot(one.x - other.x, one.y - other.y)).toBeGreaterThanOrEqual(2 * layout.radius)
        }
      }
      const named = balloons.length + (layout.halves[0]?.crowds ?? []).reduce((sum, crowd) => sum + crowd.moves.length, 0)
      expect(named).toBe(targets.length)
      expect(textsOverlap(layout.halves[0]?.texts ?? [])).toBe(false)
    }), { numRuns: 60 })
  })

  it('folds the fifth press in one place to a count', () => {
    const many = [0, 1, 2, 3, 4].map(move => press(move, 88 + move, 104))
    const half = layoutRail(inputOf(lid(many), plate), 360).halves[0]
    expect(half?.folds).toEqual([{ from: 88, to: 104, moves: [0, 1, 2, 3, 4] }])
    expect(half?.texts.some(text => text.text === '5×')).toBe(true)
    expect(half?.presses).toHaveLength(1)
  })

  it('ends a press too short for an arrow in a bar, to scale', () => {
    const half = layoutRail(inputOf(lid([press(3, 98, 104)]), plate), 350).halves[0]
    expect(half?.presses[0]?.head).toBeNull()
    expect(half?.presses[0]?.bar).toContain('v10')
  })

  it('stands before above and after below, changed balloons filled below', () => {
    const before = lid(usual)
    const after = lid([absolute(0, 5), absolute(1, 75), ...usual.slice(2)])
    const changed = new Set([1])
    const input = railInputOf({ upper: before, lower: after }, { upper: railSideOf(before, 'v14', changed), lower: railSideOf(after, 'v15', changed) }, plate)
    const [upper, lower] = layoutRail(input, 1376).halves
    const { height, rule } = layoutRail(input, 1376)
    // The lower side has its room below the rule, balloons and all.
    expect(height).toBeGreaterThan(Math.max(...(lower?.balloons.map(balloon => balloon.y) ?? [])) + 10)
    expect(rule.match(/M/g)).toHaveLength(2)
    expect(upper?.balloons.find(balloon => balloon.move === 1)).toMatchObject({ tone: 'before', filled: false })
    expect(lower?.balloons.find(balloon => balloon.move === 1)).toMatchObject({ tone: 'after', filled: true })
    expect(Math.max(...(upper?.balloons.map(balloon => balloon.y) ?? []))).toBeLessThan(Math.min(...(lower?.balloons.map(balloon => balloon.y) ?? [])))
  })
})
