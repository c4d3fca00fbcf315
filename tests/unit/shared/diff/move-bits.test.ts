import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { bitCount, bitsOf, differing, present, valueAt } from '../../../../shared/diff/move-bits'
import { moveFieldNames } from '../../../../shared/settings/move-fields'
import type { Move } from '../../../../shared/settings/types'
import { arbitraryMoveBody } from '../../../support/arbitrary-content'

const rows = arbitraryMoveBody(true, true).map((body): Move => ({ move: 4, ...body }))

describe('sets of move fields as bits', () => {
  it('hold exactly the fields whose values differ', () => {
    fc.assert(fc.property(rows, rows, (a, b) => differing(a, b) === bitsOf(...moveFieldNames.filter(name => a[name] !== b[name]))))
  })

  it('hold exactly the fields that a row has, none of no row', () => {
    fc.assert(fc.property(rows, row => present(row) === bitsOf(...moveFieldNames.filter(name => row[name] !== undefined))))
    expect(present(undefined)).toBe(0)
  })

  it('count their fields', () => {
    fc.assert(fc.property(fc.subarray(moveFieldNames), names => bitCount(bitsOf(...names)) === names.length))
    expect(bitCount(bitsOf(...moveFieldNames))).toBe(14)
    expect(bitCount(0)).toBe(0)
  })

  it('name each field by its rank in the table, its number aside', () => {
    const full: Required<Move> = {
      move: 5, label: 'Over lid', comment: 'slow', kind: 'press', target: 150, turn: 'positive', speed: 250, acceleration: 2000, deceleration: 1500,
      forceLimit: 38, approach: 140, pressSpeed: 8, window: 0.1, next: 6, dwell: 40,
    }
    expect(moveFieldNames.map((_, rank) => valueAt(full, rank))).toEqual(moveFieldNames.map(name => full[name]))
    expect(differing(full, { ...full, move: 6 })).toBe(0)
  })
})
