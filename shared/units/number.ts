import { CodedError } from '../errors/coded'
import { Exact } from './exact'

/*
 * Numbers are read from their text and never go through binary floating point first. 1.0000005 is 1 (a tie, to even) and
 * 1.00000050000000000000001 is 1.000001: x * 1e6 gets both wrong.
 */

export type NumberProblem = 'number-syntax' | 'number-range' | 'number-digits'

export const maxNumberCharacters = 40
export const maxExponent = 40
export const decimals = 6
export const largestNumber = 1e9
const million = 1e6

const jsonNumber = /^-?(?:0|[1-9]\d*)(?:\.\d+)?(?:[eE]([-+]?\d+))?$/

/** True for a text of the JSON number grammar (RFC 8259, section 6), whatever its length. */
export function isNumberText(text: string): boolean {
  return jsonNumber.test(text)
}

/** The exact decimal of a JSON number of at most 40 characters and an exponent of ±40, or the code of what is wrong. */
export function parseDecimalText(text: string): Exact | NumberProblem {
  const parts = jsonNumber.exec(text)
  if (!parts) return 'number-syntax'
  if (text.length > maxNumberCharacters) return 'number-digits'
  const exponent = parts[1]
  if (exponent !== undefined && Math.abs(Number(exponent)) > maxExponent) return 'number-range'
  return new Exact(text)
}

const plain = /^-?(?:0|[1-9]\d{0,8})(?:\.\d{1,6})?$/

/**
 * The number of a text that is canonical as it stands: at most 9 digits before and 6 after the point, so that 15 digits go
 * through the nearest double and back. Undefined where decimal arithmetic has to look at it.
 */
export function plainNumber(text: string): number | undefined {
  return plain.test(text) ? Number(text) + 0 : undefined
}

/** A canonical number: a whole number of millionths, at most 1e9 either way, and whether rounding changed the value. */
export interface Rounded { readonly value: number, readonly rounded: boolean }

/** Rounds once, half-even, to 6 decimals; refuses what is then beyond 1e9. Minus zero becomes zero. */
export function roundToMillionths(exact: Exact): Rounded | 'number-range' {
  const cut = exact.toDecimalPlaces(decimals, Exact.ROUND_HALF_EVEN)
  if (cut.abs().gt(largestNumber)) return 'number-range'
  return { value: cut.toNumber() + 0, rounded: !cut.eq(exact) }
}

/**
 * The double whose shortest form has the very decimal value of the text, for numbers that are the drive's own;
 * 'number-digits' where there is none, as for 9007199254740993.
 */
export function parseOwnNumber(text: string): number | NumberProblem {
  const easy = plainNumber(text)
  if (easy !== undefined) return easy
  const exact = parseDecimalText(text)
  if (typeof exact === 'string') return exact
  const double = exact.toNumber() + 0
  return new Exact(String(double)).eq(exact) ? double : 'number-digits'
}

/** Whole millionths of a canonical number, exact up to 1e15; the inverse of fromMillionths. Throws 'not-canonical' off the grid. */
export function toMillionths(value: number): number {
  const millionths = Math.floor(value * million + 0.5)
  if (!(Math.abs(value) <= largestNumber) || millionths / million !== value) {
    throw new CodedError('not-canonical', `${value} is no whole number of millionths within ±1e9.`, { value })
  }
  return millionths
}

/** The number of so many millionths: the double nearest to it, whose shortest form has at most 6 decimals. */
export function fromMillionths(millionths: number): number {
  return millionths / million + 0
}

/**
 * The shortest text that reads back as the same number, in the JSON number grammar; a canonical number never shows an
 * exponent, since 1e-6 and 1e9 both print plainly. Throws 'not-canonical' on NaN and the infinities.
 */
export function formatNumber(value: number): string {
  if (!Number.isFinite(value)) throw new CodedError('not-canonical', `${value} cannot be written as a number.`, { value })
  return String(value + 0)
}
