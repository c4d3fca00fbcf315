import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { laneIntervals, stackBalloons } from '../../../../shared/pictures/stack'

const ball = fc.record({ move: fc.integer({ min: 0, max: 1023 }), px: fc.double({ min: 0, max: 1200, noNaN: true }), changed: fc.boolean() })
const bar = fc.record({ move: fc.integer({ min: 0, max: 1023 }), from: fc.double({ min: 0, max: 900, noNaN: true }), to: fc.double({ min: 0, max: 900, noNaN: true }) })

describe('stackBalloons', () => {
  it('lets no two balloons of a row touch, keeps to its rows and loses nobody', () => {
    fc.assert(fc.property(fc.array(ball, { maxLength: 80 }), (items) => {
      const stack = stackBalloons(items, 26, 4, 40)
      for (const one of stack.placed) {
        expect(one.row).toBeLessThan(4)
        for (const other of stack.placed) {
          if (one !== other && one.row === other.row) expect(Math.abs(one.item.px - other.item.px)).toBeGreaterThanOrEqual(26)
        }
      }
      expect(stack.placed.length + stack.crowds.reduce((sum, crowd) => sum + crowd.moves.length, 0)).toBe(items.length)
    }))
  })

  it('stacks two moves at one place and leaves a third beside them below', () => {
    const stack = stackBalloons([{ move: 0, px: 100, changed: false }, { move: 6, px: 100, changed: false }, { move: 1, px: 140, changed: false }], 26, 4, 40)
    expect(stack.placed.map(one => [one.item.move, one.row])).toEqual([[0, 0], [6, 1], [1, 0]])
  })

  it('folds what finds no room to a count, the changed ones last', () => {
    const items = Array.from({ length: 7 }, (_, move) => ({ move, px: 300, changed: move === 6 }))
    const stack = stackBalloons(items, 26, 4, 40)
    expect(stack.crowds).toEqual([{ px: 300, moves: [3, 4, 5] }])
    expect(stack.placed[0]?.item.move).toBe(6)
  })
})

describe('laneIntervals', () => {
  it('lets no two bars of a lane touch, and accounts for each', () => {
    fc.assert(fc.property(fc.array(bar, { maxLength: 40 }), (items) => {
      const lanes = laneIntervals(items, 4, 24)
      for (const one of lanes.placed) {
        expect(one.lane).toBeLessThan(4)
        for (const other of lanes.placed) {
          if (one === other || one.lane !== other.lane) continue
          const apart = Math.max(one.item.from, one.item.to) <= Math.min(other.item.from, other.item.to) - 24
            || Math.max(other.item.from, other.item.to) <= Math.min(one.item.from, one.item.to) - 24
          expect(apart).toBe(true)
        }
      }
      expect(lanes.placed.length + lanes.folded.flat().length).toBe(items.length)
    }))
  })

  it('folds the fifth press in one place, and all of its knot with it', () => {
    const items = Array.from({ length: 5 }, (_, move) => ({ move, from: 100 + move, to: 160 }))
    expect(laneIntervals(items, 4, 24).folded.map(knot => knot.length)).toEqual([5])
    expect(laneIntervals(items.slice(0, 4), 4, 24)).toMatchObject({ folded: [], count: 4 })
  })

  it('shares a lane where presses lie apart', () => {
    expect(laneIntervals([{ move: 2, from: 10, to: 40 }, { move: 3, from: 90, to: 120 }], 4, 24).count).toBe(1)
  })
})
