import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { JsonCursor, TokenError } from '../../../../shared/settings/json-cursor'
import { readJsonNumber } from '../../../../shared/settings/json-number'

const read = (text: string, at = 0) => {
  const cursor = new JsonCursor(text)
  cursor.at = at
  return { node: readJsonNumber(cursor), at: cursor.at }
}

describe('readJsonNumber', () => {
  it('stops behind the number, whatever follows', () => {
    for (const behind of ['', ',', ']', ' ', 'x', '"']) expect(read(`[-12.50${behind}`, 1)).toEqual({ node: { kind: 'number', offset: 1, end: 7, value: -12.5 }, at: 7 })
  })

  it('answers the exact value of up to 15 digits', () => {
    expect(read('999999999.999999').node.value).toBe(999999999.999999)
    expect(read('999999999999999').node.value).toBe(999999999999999)
    expect(read('0.000001').node.value).toBe(0.000001)
  })

  it('answers NaN where the nearest double might not be the rounded value', () => {
    for (const text of ['1234567890123456', '0.0000001', '1.0000000', '1e0', '1E5', '0e-5']) expect(read(text).node.value).toBeNaN()
  })

  it('agrees with Number wherever it answers', () => {
    fc.assert(fc.property(fc.integer({ min: -999_999_999_999_999, max: 999_999_999_999_999 }), fc.integer({ min: 0, max: 6 }), (n, places) => {
      const text = `${n < 0 ? '-' : ''}${String(Math.abs(n)).padStart(places + 1, '0')}`
      const pointed = places === 0 ? text : `${text.slice(0, -places)}.${text.slice(-places)}`
      return Object.is(read(pointed).node.value, Number(pointed) + 0)
    }), { numRuns: 2000 })
  })
})

/* RFC 8259, section 6: int = zero / ( digit1-9 *DIGIT ), frac = "." 1*DIGIT, exp = e [ minus / plus ] 1*DIGIT. */
describe('the grammar of numbers', () => {
  const faultOf = (text: string) => {
    try { return read(text).at }
    catch (error) { return error instanceof TokenError ? `fails at ${error.offset}` : error }
  }

  it.each([
    ['00', 'fails at 0'], ['01', 'fails at 0'], ['-01', 'fails at 1'], ['-', 'fails at 1'], ['5.', 'fails at 2'], ['.5', 'fails at 0'], ['-.5', 'fails at 1'],
    ['1e', 'fails at 2'], ['1e+', 'fails at 3'], ['1E-', 'fails at 3'], ['1.5e', 'fails at 4'], ['1.e5', 'fails at 2'], ['+1', 'fails at 0'],
  ])('%s %s', (text, fault) => expect(faultOf(text)).toBe(fault))

  it.each([['0', 1], ['10', 2], ['0.5', 3], ['-0', 2], ['1e5', 3], ['1E+05', 5], ['0e0', 3], ['1.50e-10', 8], ['1-2', 1], ['1.5.5', 3], ['1e5e5', 3]])('%s ends at %d', (text, end) => expect(faultOf(text)).toBe(end))

  it('keeps 15 digits and six places, and not one more', () => {
    expect(read('123456789.123456').node.value).toBe(123456789.123456)
    expect(read('1234567890.123456').node.value).toBeNaN()
    expect(read('12345678.1234567').node.value).toBeNaN()
    expect(read('-0.000001').node.value).toBe(-0.000001)
  })
})
