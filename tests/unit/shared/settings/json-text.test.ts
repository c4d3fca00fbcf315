import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { JsonCursor, TokenError } from '../../../../shared/settings/json-cursor'
import { readJsonText } from '../../../../shared/settings/json-text'

const read = (text: string) => {
  const cursor = new JsonCursor(text)
  return [readJsonText(cursor), cursor.at]
}
const faultOf = (text: string) => {
  try {
    return read(text)
  }
  catch (error) {
    return error instanceof TokenError ? error.offset : error
  }
}

describe('readJsonText', () => {
  it('reads what JSON.stringify writes, and stops behind the closing quote', () => {
    fc.assert(fc.property(fc.string({ unit: 'binary' }), (text) => {
      const written = JSON.stringify(text)
      expect(read(`${written}, 1`)).toEqual([text, written.length])
    }), { numRuns: 500 })
  })

  it('reads every character written as an escape', () => {
    fc.assert(fc.property(fc.string({ unit: 'binary', maxLength: 8 }), (text) => {
      const escaped = text.split('').map(sign => `\\u${sign.charCodeAt(0).toString(16).padStart(4, '0')}`).join('')
      expect(read(`"${escaped}"`)[0]).toBe(text)
    }))
  })

  it('lets lone surrogates through: the rules of texts refuse them', () => expect(read(String.raw`"a\ud83d"`)[0]).toBe('a\ud83d'))

  it.each([['"abc', 4], ['"a\tb"', 2], ['"a\\x"', 2], ['"a\\u00g0"', 2], ['"ab\\', 3], ['"a\\n\u0001"', 4]])('fails in %j at %d', (text, offset) => expect(faultOf(text)).toBe(offset))
})
