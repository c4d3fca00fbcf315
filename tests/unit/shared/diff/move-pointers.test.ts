import { describe, expect, it } from 'vitest'
import { movePointers } from '../../../../shared/diff/move-pointers'
import { moveFieldNames } from '../../../../shared/settings/move-fields'

describe('pointers to the fields of a move', () => {
  it.each([0, 7, 1023])('at index %d lead to each field in the order of the table, the first time and again', (index) => {
    const expected = moveFieldNames.map(name => `/moves/${index}/${name}`)
    expect(movePointers(index)).toEqual(expected)
    expect(movePointers(index)).toEqual(expected)
  })
})
