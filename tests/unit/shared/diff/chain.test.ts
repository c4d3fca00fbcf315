import { describe, expect, it } from 'vitest'
import { chain } from '../../../../shared/diff/chain'
import { Span } from '../../../../shared/diff/span'

/** A span over rows written as number:signature; signatures are letters. */
function span(text: string): Span {
  const rows = text.split(' ').filter(row => row !== '').map(row => row.split(':'))
  return new Span({
    numbers: Int32Array.from(rows, ([number]) => Number(number)),
    signatures: Int32Array.from(rows, ([, name = '']) => name.charCodeAt(0) - 65),
  }, 26)
}

describe('the best chain of matches', () => {
  it.each([
    ['nothing matches', '0:A 1:B', '0:C', []],
    ['an empty side', '', '0:A', []],
    ['rows without a match are passed over', '0:X 1:A 2:Y 3:B', '0:A 1:Z 2:B', [[1, 0], [3, 2]]],
    ['three pairs outweigh two at their numbers', '0:A 1:B 2:C 3:A', '0:C 1:A 2:B 3:C', [[0, 1], [1, 2], [2, 3]]],
    ['of chains with as many pairs the one with more kept numbers', '0:A 1:A 2:A', '1:A 2:A', [[1, 0], [2, 1]]],
    ['of equal ones the first', '10:A 11:A 12:A', '1:A 2:A', [[0, 0], [1, 1]]],
  ] as const)('%s', (_, a, b, pairs) => {
    expect(chain(span(a), span(b))).toEqual(pairs)
  })

  it('keeps within its spans', () => {
    const a = span('0:A 1:B 2:C')
    const b = span('0:A 1:B 2:C')
    a.takeFirst()
    b.takeLast()
    expect(chain(a, b)).toEqual([[1, 1]])
  })
})

describe('a span', () => {
  it('counts and finds only what is still in it', () => {
    const rows = span('0:A 3:B 5:A')
    expect([rows.count(0), rows.holds(0, 0), rows.holds(3, 1), rows.holds(3, 0), rows.holds(4, 0), rows.holds(99, 0)]).toEqual([2, true, true, false, false, false])
    expect(rows.takeFirst()).toBe(0)
    expect([rows.count(0), rows.holds(0, 0)]).toEqual([1, false])
    expect(rows.takeLast()).toBe(2)
    expect([rows.count(0), rows.holds(5, 0), rows.isEmpty]).toEqual([0, false, false])
    rows.takeLast()
    expect(rows.isEmpty).toBe(true)
  })
})
