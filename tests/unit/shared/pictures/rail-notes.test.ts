import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { balloonRadius, crowdBox } from '../../../../shared/pictures/balloons'
import { layoutRail } from '../../../../shared/pictures/rail'
import { arrange, drawHalf } from '../../../../shared/pictures/rail-half'
import { railInputOf, railSideOf, railUnit } from '../../../../shared/pictures/rail-input'
import { railBounds, railNotes, runsOf } from '../../../../shared/pictures/rail-notes'
import { emptyContent } from '../../../../shared/settings/content'
import type { Content, Move } from '../../../../shared/settings/types'

const at = (move: number, target: number, rest: Partial<Move> = {}): Move => ({ move, kind: 'absolute', target, speed: 100, acceleration: 1000, ...rest })
const inputOf = (moves: readonly Move[], setup: Content['setup'] = {}, zones: Content['zones'] = []) => {
  const content = { ...emptyContent('linear'), moves, setup, zones }
  return railInputOf({ upper: content }, { upper: railSideOf(content, 'kit') }, { model: 'A', axisKind: 'linear', stroke: 200 })
}

describe('numbers in runs', () => {
  it('are told apart where one is missing, and by two and two', () => {
    expect([[], [4], [3, 4], [4, 3, 5], [0, 1, 2, 3, 7, 9, 10]].map(runsOf)).toEqual(['', '4', '3, 4', '3–5', '0–3, 7, 9, 10'])
  })

  it('name each number once, in order', () => {
    fc.assert(fc.property(fc.uniqueArray(fc.integer({ min: 0, max: 60 })), (numbers) => {
      const said = runsOf(numbers).split(', ').filter(Boolean).flatMap((run) => {
        const [first = 0, last = first] = run.split('–').map(Number)
        return Array.from({ length: last - first + 1 }, (_, index) => first + index)
      })
      expect(said).toEqual(numbers.toSorted((a, b) => a - b))
    }))
  })
})

describe('what stands beside the rail', () => {
  it('names moves that found no room, presses that were folded, and steps', () => {
    const many = Array.from({ length: 12 }, (_, move) => at(move, 50))
    const presses = Array.from({ length: 5 }, (_, index) => at(20 + index, 104, { kind: 'press', approach: 88 + index, forceLimit: 30 }))
    const input = inputOf([...many, ...presses, at(30, -2, { kind: 'relative' })])
    expect(railNotes(input.upper, layoutRail(input, 360).halves[0], railUnit(input))).toEqual([
      '5 presses between 88 and 104 mm: moves 20–24', '+8 in one place: moves 4–11', '+1 in one place: moves 24', 'move 30 steps by −2 mm',
    ])
  })

  it('says its bounds in words, and which of them are not known or not held', () => {
    const homed = { homingMethod: 'hard-stop', homingDirection: 'negative', homeOffset: 0, softLimitMin: 2, softLimitMax: 185 } as const
    expect(railBounds(inputOf([at(0, 5)], homed, [{ zone: 1, from: -0.5, to: 12 }]), 'mm')).toEqual(['Hard stops at 0 and 200 mm.', 'Soft limits min 2, max 185 mm.', 'Zone 1 from −0.5 to 12 mm.'])
    expect(railBounds(inputOf([], { softLimitMax: 185, softLimitsActive: false }), 'mm')).toEqual(['Hard stops not known: they take the stroke of the model and homing against a stop.', 'Soft limits max 185 mm, not held.'])
    const turning: Content = { ...emptyContent('rotary'), setup: { modulo: 360 }, moves: [at(0, 90)] }
    const input = railInputOf({ upper: turning }, { upper: railSideOf(turning, 'kit') })
    expect(railBounds(input, railUnit(input))).toEqual(['One turn, 0 to 360 deg.', 'No soft limits.'])
  })
})

describe('a side of the rail', () => {
  const frame = { x: (place: number) => place * 2, radius: balloonRadius, step: 26, left: 0, right: 400, small: false }
  it('reaches as far from the rule as its stacked balloons, below as above', () => {
    const side = inputOf([at(0, 50), at(1, 50), at(2, 150)]).upper
    const arranged = arrange(side, frame)
    expect(arranged.height).toBe(arranged.reach + 2 * 26)
    const [above, below] = ([-1, 1] as const).map(way => drawHalf(arranged, frame, 100, way, 'after', 100 + way * arranged.height, 'ink'))
    expect(above?.balloons.map(({ y }) => 100 - y)).toEqual(below?.balloons.map(({ y }) => y - 100))
  })

  it('keeps the box of a crowd within the picture', () => {
    for (const px of [0, 200, 400]) {
      const { x, width } = crowdBox({ px, moves: [1, 2, 3] }, 20, 0, 400)
      expect(x).toBeGreaterThanOrEqual(0)
      expect(x + width).toBeLessThanOrEqual(400)
    }
  })
})
