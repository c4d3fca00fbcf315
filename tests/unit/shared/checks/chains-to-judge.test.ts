import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { chainsOf, hasChains } from '../../../../shared/checks/chains-to-judge'
import { usedRows } from '../../../../shared/motion/chains'
import type { Move } from '../../../../shared/settings/types'
import { absolute, unused } from '../../../support/check-input'

const chains = (...moves: Parameters<typeof usedRows>[0]) =>
  chainsOf(usedRows(moves)).map(({ rows, endless }) => `${rows.map(({ move }) => move.move).join(' ')}${endless ? ' …' : ''}`)

describe('chainsOf', () => {
  it('tells chains that end, each from the row that nobody names', () => {
    expect(chains(absolute(1, 0, { next: 2 }), absolute(2, 0, { next: 3 }), absolute(3, 0), absolute(9, 0))).toEqual(['1 2 3'])
    expect(chains(absolute(1, 0, { next: 3 }), absolute(2, 0, { next: 3 }), absolute(3, 0))).toEqual(['1 3', '2 3'])
  })

  it('tells endless ones, and not what leads into them', () => {
    expect(chains(absolute(1, 0, { next: 2 }), absolute(2, 0, { next: 3 }), absolute(3, 0, { next: 2 }))).toEqual(['2 3 …'])
    expect(chains(absolute(0, 0, { next: 1 }), absolute(1, 0, { next: 2 }), absolute(2, 0, { next: 3 }), absolute(3, 0, { next: 2 }))).toEqual(['2 3 …'])
    expect(chains(absolute(5, 0, { next: 5 }))).toEqual(['5 …'])
  })

  it('does not take a row without a follower for a chain, nor one whose follower is not there', () => {
    expect(chains(absolute(1, 0), absolute(2, 0, { next: 7 }))).toEqual([])
    expect(chains(absolute(1, 0, { next: 2 }), unused(2))).toEqual([])
  })
})

describe('whether there are chains', () => {
  it('is whether any is told, for any table', () => {
    const table = fc.uniqueArray(fc.record({ move: fc.nat({ max: 9 }), next: fc.option(fc.nat({ max: 11 }), { nil: undefined }), used: fc.boolean() }), { selector: row => row.move })
    fc.assert(fc.property(table, (numbers) => {
      const rows = usedRows(numbers.map(({ move, next, used }): Move => ({ move, kind: 'absolute', target: 1, speed: used ? 10 : 0, acceleration: used ? 10 : 0, next })))
      expect(hasChains(rows)).toBe(chainsOf(rows).length > 0)
    }), { numRuns: 1000 })
  })
})
