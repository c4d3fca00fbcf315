import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { twinMoves } from '../../../../shared/checks/twin-moves'
import type { Setup } from '../../../../shared/settings/types'
import { absolute, judgeInput, linear, press, relative, told, unused } from '../../../support/check-input'

type Moves = Parameters<typeof linear>[1] & object
const twins = (moves: Moves, setup: Setup = {}) => told(twinMoves, judgeInput(linear(setup, moves)))

describe('twin-moves', () => {
  it('is silent where every row does something else', () => {
    expect(twins([absolute(1, 10), absolute(2, 20), relative(3, 10), absolute(4, 10, { speed: 100 })])).toEqual([])
  })

  it('folds all twins into one line, number, label and comment aside', () => {
    const moves = [absolute(1, 10, { label: 'Up' }), absolute(2, 20), absolute(7, 10, { comment: 'as before' }), absolute(8, 20), absolute(9, 10)]
    expect(twins(moves)).toEqual(['note: Moves 1, 7 and 9 and moves 2 and 8 do the same.'])
    expect(twinMoves.judge(judgeInput(linear({}, moves)))).toMatchObject([{
      at: ['/moves/0', '/moves/2', '/moves/4', '/moves/1', '/moves/3'], values: { moves: [1, 2, 7, 8, 9], groups: ['1, 7 and 9', '2 and 8'] },
    }])
  })

  it('takes a default that is written out for the same: the border of sameness', () => {
    expect(twins([absolute(1, 10), absolute(2, 10, { deceleration: 2000 })])).toHaveLength(1)
    expect(twins([absolute(1, 10), absolute(2, 10, { deceleration: 2001 })])).toEqual([])
    expect(twins([press(1, 10, 20, { pressSpeed: undefined }), press(2, 10, 20, { pressSpeed: 5 })], { pressSpeed: 5 })).toHaveLength(1)
    expect(twins([absolute(1, 10), absolute(2, 10, { window: 0.1 })], { inPositionWindow: 0.1 })).toHaveLength(1)
  })

  it('tells rows apart by what follows and by how they wait', () => {
    expect(twins([absolute(1, 10, { next: 3 }), absolute(2, 10), absolute(3, 0)])).toEqual([])
    expect(twins([absolute(1, 10, { next: 3 }), absolute(2, 10, { next: 3, dwell: 50 }), absolute(3, 0)])).toEqual([])
  })

  it('skips unused rows, and does not apply to a single move', () => {
    expect(twins([absolute(1, 10), absolute(2, 20), unused(3), unused(4)])).toEqual([])
    expect(twins([absolute(1, 10), unused(3)])).toEqual(['not applicable'])
  })

  it('counts a row repeated n times as n twins', () => {
    fc.assert(fc.property(fc.uniqueArray(fc.integer({ min: 0, max: 1023 }), { minLength: 2, maxLength: 12 }), (numbers) => {
      const [note] = twinMoves.judge(judgeInput(linear({}, numbers.map(number => absolute(number, 10)))))
      expect(note?.values.moves).toEqual([...numbers].sort((a, b) => a - b))
    }))
  })
})
