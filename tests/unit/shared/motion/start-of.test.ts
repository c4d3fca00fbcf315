import { describe, expect, it } from 'vitest'
import { startOf } from '../../../../shared/motion/start-of'
import type { Move } from '../../../../shared/settings/types'

describe('where a move sets off', () => {
  it('is the end of the row that names it rather than of the row above', () => {
    const move = (number: number, target: number, next?: number): Move => ({ move: number, kind: 'absolute', target, speed: 100, acceleration: 1000, ...(next !== undefined && { next }) })
    const moves = [move(0, 10, 3), move(1, 20), move(2, 30), move(3, 40)]
    expect(startOf(move(3, 40), moves)?.move).toBe(0)
    expect(startOf(move(2, 30), moves)?.move).toBe(1)
  })

  it('is not known of a first row, and never an unused row, a step or the row itself', () => {
    const move = (number: number, rest: Partial<Move> = {}): Move => ({ move: number, kind: 'absolute', target: 10 * number, speed: 100, acceleration: 1000, ...rest })
    const moves = [move(1, { speed: 0, acceleration: 0 }), move(2, { kind: 'relative' }), move(3, { next: 3 })]
    expect(moves.map(each => startOf(each, moves)?.move)).toEqual([undefined, undefined, undefined])
  })
})
