import { describe, expect, it } from 'vitest'
import { pairRows } from '../../../../shared/diff/pair-rows'
import { pairsInOrder, rowsOf, runsOf } from '../../../../shared/diff/runs'
import type { Move } from '../../../../shared/settings/types'

const rows = (numbers: readonly (readonly [move: number, target: number])[]): Move[] =>
  numbers.map(([move, target]) => ({ move, kind: 'absolute', target, speed: 250, acceleration: 2000 }))
const runs = (before: readonly Move[], after: readonly Move[]) => runsOf(before, after, pairRows(before, after))

describe('runs', () => {
  it('are none where each row keeps its number', () => {
    expect(runs(rows([[0, 1], [1, 2]]), rows([[0, 1], [1, 2]]))).toEqual([])
  })
  it('join neighbours that went the same way, over numbers that no row has', () => {
    expect(runs(rows([[0, 1], [4, 2], [9, 3]]), rows([[10, 1], [14, 2], [19, 3]]))).toEqual([{ first: 0, last: 9, by: 10, sure: true }])
  })
  it('part where another row came between in the second table', () => {
    expect(runs(rows([[0, 1], [2, 2], [9, 3]]), rows([[5, 1], [6, 3], [7, 2]]))).toEqual([
      { first: 0, last: 0, by: 5, sure: true }, { first: 2, last: 2, by: 5, sure: true }, { first: 9, last: 9, by: -3, sure: true },
    ])
  })
  it('are sure by one row that nothing else equals', () => {
    expect(runs(rows([[0, 1], [1, 1]]), rows([[5, 1], [6, 1]]))).toEqual([{ first: 0, last: 1, by: 5, sure: false }])
    expect(runs(rows([[0, 1], [1, 1], [2, 2]]), rows([[5, 1], [6, 1], [7, 2]]))).toEqual([{ first: 0, last: 2, by: 5, sure: true }])
  })
})

describe('pairs', () => {
  it('stand in the order of the second table, what is gone behind the row that it followed', () => {
    const shuffled = [{ after: 9 }, { before: 3 }, { before: 0 }, { before: 5, after: 1 }, { before: 2, after: 4 }, { before: 4 }]
    expect(pairsInOrder(shuffled)).toEqual([{ before: 0 }, { before: 5, after: 1 }, { before: 2, after: 4 }, { before: 3 }, { before: 4 }, { after: 9 }])
  })
  it('are the rows of one table by index', () => {
    expect(rowsOf([{ before: 7, after: 1 }, { before: 3 }, { after: 2 }], 'before')).toEqual([{ before: 3 }, { before: 7, after: 1 }])
    expect(rowsOf([{ before: 7, after: 1 }, { before: 3 }, { after: 2 }], 'after')).toEqual([{ before: 7, after: 1 }, { after: 2 }])
  })
})
