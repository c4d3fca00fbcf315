import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { placeOf } from '../../../../shared/settings/place'

describe('placeOf', () => {
  const text = 'ab\ncd\r\n\n😀e'
  it.each([[0, 1, 1], [1, 1, 2], [2, 1, 3], [3, 2, 1], [5, 2, 3], [6, 2, 4], [7, 3, 1], [8, 4, 1], [10, 4, 2], [11, 4, 3]])('offset %d is line %d, column %d', (offset, line, column) => {
    expect(placeOf(text, offset)).toEqual({ line, column })
  })

  it('is one before the first character of a line plus its column', () => {
    fc.assert(fc.property(fc.array(fc.string({ unit: fc.constantFrom(...'ab '), maxLength: 6 }), { minLength: 1, maxLength: 6 }), fc.nat(), fc.nat(), (lines, atLine, atColumn) => {
      const line = atLine % lines.length
      const column = atColumn % ((lines[line] ?? '').length + 1)
      const offset = lines.slice(0, line).reduce((sum, each) => sum + each.length + 1, 0) + column
      expect(placeOf(lines.join('\n'), offset)).toEqual({ line: line + 1, column: column + 1 })
    }))
  })
})
