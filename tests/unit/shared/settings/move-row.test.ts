import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { moveRow, setEntries, unsetMove } from '../../../../shared/settings/move-row'
import { sortedMoveKeys } from '../../../../shared/settings/sorted-keys'
import { arbitraryContent } from '../../../support/arbitrary-content'

describe('a row of the one shape', () => {
  it('begins with every key in the order of the canonical text, none of them set', () => {
    expect(Object.keys(unsetMove())).toEqual(sortedMoveKeys)
    expect(setEntries(unsetMove())).toEqual([])
  })

  it('has every key in that order and the values of the row that it was made of, a field that is new in the table included', () => {
    fc.assert(fc.property(arbitraryContent(), ({ moves }) => {
      for (const move of moves) {
        expect(Object.keys(moveRow(move))).toEqual(sortedMoveKeys)
        expect(Object.fromEntries(setEntries(moveRow(move)))).toStrictEqual(move)
      }
    }))
  })

  it('is a row of its own', () => {
    expect(unsetMove()).not.toBe(unsetMove())
  })
})
