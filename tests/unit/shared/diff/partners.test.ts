import { describe, expect, it } from 'vitest'
import { join, noPartners, pairBetween, pairInsideBlocks, type Partners } from '../../../../shared/diff/partners'
import { wholeNumbers } from '../../../../shared/diff/table'

function partnersOf(before: number, after: number, pairs: readonly (readonly [number, number])[]): Partners {
  const partners = noPartners(before, after)
  for (const [i, j] of pairs) join(partners, i, j)
  return partners
}
const pairsOf = ({ before }: Partners) => [...before.entries()].filter(([, j]) => j >= 0)

describe('pairing between anchors', () => {
  const between = (before: number, after: number, anchors: readonly (readonly [number, number])[], others: readonly (readonly [number, number])[] = []) => {
    const partners = partnersOf(before, after, [...anchors, ...others])
    pairBetween(anchors, partners)
    return pairsOf(partners)
  }
  it('takes the first for the first where equally many are left', () => {
    expect(between(4, 5, [[0, 1], [3, 4]])).toEqual([[0, 1], [1, 2], [2, 3], [3, 4]])
  })
  it('pairs nobody where more are left on one side', () => {
    expect(between(4, 4, [[0, 0], [3, 2]])).toEqual([[0, 0], [3, 2]])
  })
  it('does so before the first anchor, behind the last, and without any', () => {
    expect(between(2, 2, [[1, 1]])).toEqual([[0, 0], [1, 1]])
    expect(between(2, 2, [[0, 0]])).toEqual([[0, 0], [1, 1]])
    expect(between(2, 2, [])).toEqual([[0, 0], [1, 1]])
  })
  it('passes over rows that have partners elsewhere', () => {
    expect(between(4, 4, [[0, 0], [3, 3]], [[1, 2]])).toEqual([[0, 0], [1, 2], [2, 1], [3, 3]])
  })
})

describe('pairing inside blocks', () => {
  const inside = (before: number, after: number, pairs: readonly (readonly [number, number])[]) => {
    const partners = partnersOf(before, after, pairs)
    pairInsideBlocks(partners)
    return pairsOf(partners)
  }
  it('takes the row between two moved neighbours for the row between their partners', () => {
    expect(inside(5, 5, [[0, 2], [2, 4], [3, 0], [4, 1]])).toEqual([[0, 2], [1, 3], [2, 4], [3, 0], [4, 1]])
  })
  it('does not where the partners are no neighbours, or stand the other way round', () => {
    expect(inside(3, 4, [[0, 0], [2, 3]])).toEqual([[0, 0], [2, 3]])
    expect(inside(3, 3, [[0, 2], [2, 0]])).toEqual([[0, 2], [2, 0]])
  })
  it('does not where a row with a partner elsewhere stands between', () => {
    expect(inside(4, 4, [[0, 0], [2, 3], [3, 1]])).toEqual([[0, 0], [2, 3], [3, 1]])
  })
  it('counts the ends of the tables as neighbours', () => {
    expect(inside(2, 2, [[1, 1]])).toEqual([[0, 0], [1, 1]])
    expect(inside(2, 2, [[0, 0]])).toEqual([[0, 0], [1, 1]])
  })
})

describe('a column of a table', () => {
  it('is one whole number a row', () => {
    expect([...wholeNumbers(['a', 'bb', ''], text => text.length)]).toEqual([1, 2, 0])
  })
})
