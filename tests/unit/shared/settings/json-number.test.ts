import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { JsonCursor } from '../../../../shared/settings/json-cursor'
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
