import { createHash } from 'node:crypto'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { CodedError } from '../../../../shared/errors/coded'
import { parseScribeCode, scribeCode } from '../../../../shared/settings/scribe'

const hash = fc.string({ unit: fc.constantFrom(...'0123456789abcdef'), minLength: 64, maxLength: 64 })
const filled = (start: string, rest = '0') => start.padEnd(64, rest)

/** Crockford's numeric form by BigInt, another way than the code goes. */
function byBigInt(hex: string): string {
  const alphabet = '0123456789ABCDEFGHJKMNPQRSTVWXYZ'
  const bits = BigInt(`0x${hex}`) >> BigInt(256 - 50)
  const code = Array.from({ length: 10 }, (_, index) => alphabet[Number((bits >> BigInt(45 - 5 * index)) & 31n)]).join('')
  return `${code.slice(0, 5)}-${code.slice(5)}`
}

describe('scribeCode', () => {
  it('is the first 50 bits in base 32', () => {
    expect(scribeCode(filled('0'))).toBe('00000-00000')
    expect(scribeCode(filled('f', 'f'))).toBe('ZZZZZ-ZZZZZ')
    // 00000 00001 00010 … 01001 00: the alphabet counted up, five bits each.
    expect(scribeCode(filled('00443214c7424'))).toBe('01234-56789')
    expect(scribeCode('c4e62043335fbe676734ef78d0edd99b10c05e7591df9684f5954e438bcaf72f')).toBe('RKK20-GSKBY')
  })

  // crockford.com/base32.html; public test suites: 1234 is 16J, 32 is 10, 36 is 14, 123456 is 3RJ0.
  it.each([[1234, '16J'], [32, '10'], [36, '14'], [123456, '3RJ0']])('writes the number %d as %s', (number, code) => {
    const hex = (BigInt(number) << 2n).toString(16).padStart(13, '0')
    expect(scribeCode(filled(hex)).replace('-', '')).toBe(code.padStart(10, '0'))
  })

  it('agrees with whole numbers of any size', () => {
    fc.assert(fc.property(hash, hex => scribeCode(hex) === byBigInt(hex)))
  })

  it('hangs on the first 50 bits only', () => {
    fc.assert(fc.property(hash, hash, (one, other) => {
      const start = one.slice(0, 12)
      // Of the 13th digit the upper two bits still count.
      const digit = Number.parseInt(one[12] ?? '0', 16)
      return scribeCode(start + ((digit & 12) | 1).toString(16) + other.slice(13)) === scribeCode(start + (digit & 12).toString(16) + one.slice(13))
    }))
  })

  it('changes with each of them', () => {
    const zero = scribeCode(filled('0'))
    for (let bit = 0; bit < 50; bit += 1) {
      const hex = (1n << BigInt(255 - bit)).toString(16).padStart(64, '0')
      expect(scribeCode(hex)).not.toBe(zero)
    }
  })

  it.each(['', 'abc', 'C4E62043335fbe676734ef78d0edd99b10c05e7591df9684f5954e438bcaf72f', `${'0'.repeat(64)}0`, 'g'.repeat(64)])('refuses %j', (text) => {
    expect(() => scribeCode(text)).toThrowError(expect.objectContaining({ code: 'no-hash' }) as CodedError)
  })

  it('differs for the SHA-256 of different texts', () => {
    const codes = Array.from({ length: 2000 }, (_, index) => scribeCode(createHash('sha256').update(String(index)).digest('hex')))
    expect(new Set(codes).size).toBe(2000)
  })
})

describe('parseScribeCode', () => {
  it('leaves what scribeCode writes as it is', () => {
    fc.assert(fc.property(hash, hex => parseScribeCode(scribeCode(hex)) === scribeCode(hex)))
  })

  // Crockford: I and L are read as 1, O as 0, hyphens are ignored, case does not matter.
  it.each([
    ['rkk20-gskby', 'RKK20-GSKBY'], ['RKK2OGSKBY', 'RKK20-GSKBY'], ['rkk2o gskby', 'RKK20-GSKBY'], ['R-K-K-2-0-G-S-K-B-Y', 'RKK20-GSKBY'],
    ['oiloi-LOOOO', '01101-10000'], [' RKK20-GSKBY\n', 'RKK20-GSKBY'],
  ])('reads %j as %s', (said, code) => expect(parseScribeCode(said)).toBe(code))

  it.each(['', 'RKK20-GSKB', 'RKK20-GSKBYY', 'RKK20-GSKBU', 'RKK20_GSKBY', 'RKK20-GSKB*', 'ＲKK20-GSKBY'])('reads nothing from %j', said => expect(parseScribeCode(said)).toBeUndefined())
})
