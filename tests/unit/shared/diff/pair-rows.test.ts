import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { pairRows } from '../../../../shared/diff/pair-rows'
import type { Move } from '../../../../shared/settings/types'
import { arbitraryPair } from '../../../support/arbitrary-content'

const rows = (targets: readonly number[], first = 0): Move[] =>
  targets.map((target, index) => ({ move: first + index, kind: 'absolute', target, speed: 250, acceleration: 2000 }))
const partnersOf = (before: readonly Move[], after: readonly Move[]) => [...pairRows(before, after).before]

describe('the five steps', () => {
  it('1: equal rows pair in their order', () => {
    expect(partnersOf(rows([1, 2, 3]), rows([9, 1, 2, 3]))).toEqual([1, 2, 3])
  })
  it('2: what is left exactly once on both sides pairs across the order', () => {
    expect(partnersOf(rows([1, 2, 3, 4, 5]), rows([1, 5, 3, 4, 2]))).toEqual([0, 4, 2, 3, 1])
  })
  it('2: what is left twice on one side does not', () => {
    const before = rows([7, 7, 1, 2, 3])
    const after = rows([1, 2, 3, 7], 10)
    expect(partnersOf(before, after)).toEqual([-1, -1, 0, 1, 2])
  })
  it('3: equally many rows between neighbours pair one by one', () => {
    expect(partnersOf(rows([1, 20, 30, 4]), rows([9, 1, 21, 31, 4]))).toEqual([1, 2, 3, 4])
  })
  it('3: the ends of the tables are neighbours too', () => {
    expect(partnersOf(rows([10, 2], 0), rows([11, 2], 5))).toEqual([0, 1])
    expect(partnersOf(rows([2, 10], 0), rows([2, 11], 5))).toEqual([0, 1])
  })
  it('4: rows that are left pair by number', () => {
    expect(partnersOf(rows([1, 20, 3]), rows([1, 21, 22, 3]))).toEqual([0, 1, 3])
  })
  it('5: the rest has no partner', () => {
    expect(partnersOf(rows([1, 20, 3]), rows([1, 3]))).toEqual([0, -1, 1])
    expect(partnersOf([], rows([1]))).toEqual([])
  })
})

describe('a pairing', () => {
  const anyTables = arbitraryPair({ most: 14 })

  it('holds each row once, the same from both sides', () => {
    fc.assert(fc.property(anyTables, ([a, b]) => {
      const { before, after } = pairRows(a.moves, b.moves)
      expect(before.length).toBe(a.moves.length)
      expect(after.length).toBe(b.moves.length)
      for (const [i, j] of before.entries()) if (j >= 0) expect(after[j]).toBe(i)
      for (const [j, i] of after.entries()) if (i >= 0) expect(before[i]).toBe(j)
    }), { numRuns: 500 })
  })

  it('is the same the other way round', () => {
    fc.assert(fc.property(anyTables, ([a, b]) => {
      const there = pairRows(a.moves, b.moves)
      const back = pairRows(b.moves, a.moves)
      expect([...back.before]).toEqual([...there.after])
      expect([...back.after]).toEqual([...there.before])
    }), { numRuns: 1000 })
  })

  it('is the same the other way round where two alignments are equally good', () => {
    const before = rows([1, 1, 2, 2])
    const after = rows([2, 2, 1, 1])
    const there = pairRows(before, after)
    expect([...pairRows(after, before).before]).toEqual([...there.after])
    expect(there.before.filter(j => j >= 0)).toHaveLength(2)
  })

  it('pairs a permuted table completely where all rows differ', () => {
    const permuted = fc.shuffledSubarray([3, 1, 4, 15, 9, 26, 5, 35], { minLength: 8 })
    fc.assert(fc.property(permuted, permuted, (a, b) => {
      expect(partnersOf(rows(a), rows(b))).toEqual(a.map(target => b.indexOf(target)))
    }))
  })

  it('is sure of a row where nothing else does the same', () => {
    const { isSure } = pairRows(rows([1, 1, 2]), rows([9, 1, 1, 2]))
    expect([0, 1, 2].map(isSure)).toEqual([false, false, true])
  })
})
