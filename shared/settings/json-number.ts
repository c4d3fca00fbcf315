import type { JsonCursor } from './json-cursor'
import type { RawNumber } from './raw'

const plus = 43, minus = 45, point = 46, zero = 48, nine = 57, smallE = 101, capitalE = 69
const powersOfTen = [1, 10, 100, 1e3, 1e4, 1e5, 1e6]
const exactDigits = 15

/**
 * Reads a JSON number (RFC 8259, section 6). A whole number of up to 15 digits with up to 6 of them after the point is an
 * exact double and divides exactly rounded: its value comes with it, and no decimal arithmetic is needed. Else it is NaN.
 */
export function readJsonNumber(cursor: JsonCursor): RawNumber {
  const offset = cursor.at
  const negative = cursor.here() === minus
  if (negative) cursor.at += 1
  const start = cursor.at
  let digits = readDigits(cursor, 0, 'A digit belongs here')
  let count = cursor.at - start
  if (count > 1 && cursor.text.charCodeAt(start) === zero) cursor.fail('A number does not begin with 0 before other digits.', start)
  let places = 0
  if (cursor.here() === point) {
    cursor.at += 1
    const first = cursor.at
    digits = readDigits(cursor, digits, 'A digit belongs after the point')
    places = cursor.at - first
    count += places
  }
  const plain = !passExponent(cursor) && count <= exactDigits
  const size = plain ? digits / (powersOfTen[places] ?? NaN) : NaN
  return { kind: 'number', offset, end: cursor.at, value: negative ? 0 - size : size }
}

function readDigits(cursor: JsonCursor, before: number, expected: string): number {
  const { text } = cursor
  let digits = before
  let { at } = cursor
  for (let code = text.charCodeAt(at); code >= zero && code <= nine; code = text.charCodeAt(at += 1)) digits = digits * 10 + (code - zero)
  if (at === cursor.at) cursor.fail(`${expected}, not ${cursor.shown()}.`)
  cursor.at = at
  return digits
}

function passExponent(cursor: JsonCursor): boolean {
  const code = cursor.here()
  if (code !== smallE && code !== capitalE) return false
  const sign = cursor.next()
  if (sign === plus || sign === minus) cursor.at += 1
  readDigits(cursor, 0, 'A digit belongs in the exponent')
  return true
}
