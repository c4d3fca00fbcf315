import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { align } from '../../../../shared/diff/align'
import type { IndexPair, Table } from '../../../../shared/diff/table'

/** A table written as number:signature, like `0:A 1:B`. */
function table(text: string): Table {
  const rows = text.split(' ').filter(row => row !== '').map(row => row.split(':'))
  return { numbers: Int32Array.from(rows, ([number]) => Number(number)), signatures: Int32Array.from(rows, ([, name = '']) => name.charCodeAt(0) - 65) }
}

/** Every order-keeping pairing of equal signatures, in the order of its pairs. */
function* pairings(a: Table, b: Table, i = 0, j = 0): Generator<IndexPair[]> {
  for (let k = i; k < a.numbers.length; k += 1) {
    for (let l = j; l < b.numbers.length; l += 1) {
      if (a.signatures[k] !== b.signatures[l]) continue
      for (const rest of pairings(a, b, k + 1, l + 1)) yield [[k, l], ...rest]
    }
  }
  yield []
}

/** The rule word for word, by trying everything: most pairs; most at the same number; then the earliest. */
function bestOfAll(a: Table, b: Table): IndexPair[] {
  let best: IndexPair[] = []
  let points = 0
  for (const pairs of pairings(a, b)) {
    const worth = pairs.length * 1000 + pairs.filter(([i, j]) => a.numbers[i] === b.numbers[j]).length
    if (worth > points) [best, points] = [pairs, worth]
  }
  return best
}

const arbitraryTable = (most: number) => fc.uniqueArray(fc.integer({ min: 0, max: most + 2 }), { maxLength: most }).chain(numbers =>
  fc.array(fc.integer({ min: 0, max: 3 }), { minLength: numbers.length, maxLength: numbers.length }).map((signatures): Table =>
    ({ numbers: Int32Array.from(numbers.sort((a, b) => a - b)), signatures: Int32Array.from(signatures) })))

describe('order-keeping alignment', () => {
  it('is the best of all pairings, tried one by one', () => {
    fc.assert(fc.property(arbitraryTable(6), arbitraryTable(6), (a, b) => {
      expect(align(a, b, 4)).toEqual(bestOfAll(a, b))
    }), { numRuns: 2000 })
  })

  it.each([
    ['nothing to pair', '0:A', '0:B', []],
    ['empty tables', '', '', []],
    ['a table against none', '0:A 1:B', '', []],
    ['one more pair outweighs any number of kept numbers', '0:A 1:B 2:C 3:D', '0:D 1:A 2:B 3:C', [[0, 1], [1, 2], [2, 3]]],
    ['of equally many pairs the one at the same number', '1:A', '0:A 1:A', [[0, 1]]],
    ['and then the earliest', '5:A', '0:A 1:A', [[0, 0]]],
    ['the earliest row of the first table too', '5:A 6:A', '0:A', [[0, 0]]],
    ['two rows that cross: the earlier one keeps its partner', '0:A 1:B', '2:B 3:A', [[0, 1]]],
    ['the same number late in the table holds against an early pair', '0:A 1:A 7:A', '5:A 7:A', [[0, 0], [2, 1]]],
  ] as const)('%s', (_, a, b, pairs) => {
    expect(align(table(a), table(b), 26)).toEqual(pairs)
  })

  it('pairs all of 1,023 rows that do the same, one number further on', () => {
    const numbered = (first: number) => ({ numbers: Int32Array.from({ length: 1023 }, (_, k) => k + first), signatures: new Int32Array(1023) })
    expect(align(numbered(0), numbered(1), 1)).toEqual(Array.from({ length: 1023 }, (_, k) => [k, k]))
  })

  it('pairs a table of 1,024 rows turned round in one row only', () => {
    const forth = { numbers: Int32Array.from({ length: 1024 }, (_, k) => k), signatures: Int32Array.from({ length: 1024 }, (_, k) => k) }
    const back = { numbers: forth.numbers, signatures: forth.signatures.map(signature => 1023 - signature) }
    expect(align(forth, back, 1024)).toEqual([[0, 1023]])
  })
})
