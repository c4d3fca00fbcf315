import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { CodedError } from '../../../../shared/errors/coded'
import { Exact } from '../../../../shared/units/exact'
import {
  formatNumber, fromMillionths, isNumberText, parseDecimalText, parseOwnNumber, plainNumber, roundToMillionths, toMillionths,
} from '../../../../shared/units/number'

const codeOf = (act: () => unknown) => {
  try {
    act()
  }
  catch (error) {
    return error instanceof CodedError ? error.code : 'another error'
  }
  return 'no error'
}

/** The rule by BigInt, without decimal.js: millionths of a plain decimal text, a tie to the even one. */
function millionthsOf(text: string): bigint {
  const negative = text.startsWith('-')
  const [whole = '', fraction = ''] = text.replace('-', '').split('.')
  const kept = BigInt(whole + fraction.slice(0, 6).padEnd(6, '0'))
  const rest = fraction.slice(6).replace(/0+$/, '')
  const above = rest > '5' || (rest === '5' && kept % 2n === 1n)
  const size = kept + (rest !== '' && above ? 1n : 0n)
  return negative ? -size : size
}

const digits = (most: number) => fc.string({ unit: fc.constantFrom(...'0123456789'), minLength: 1, maxLength: most })
const wholePart = fc.oneof(fc.constantFrom('0', '1', '999999999'), fc.integer({ min: 0, max: 999_999_999 }).map(String))
const plainText = fc.tuple(fc.constantFrom('', '-'), wholePart, fc.option(fc.oneof(digits(20), digits(6).map(tail => `${tail.padEnd(6, '0')}5`)), { nil: undefined }))
  .map(([sign, whole, fraction]) => `${sign}${whole}${fraction === undefined ? '' : `.${fraction}`}`)

describe('parseDecimalText', () => {
  it.each([
    ['0', '0'], ['-0', '0'], ['1.50', '1.5'], ['-12.5', '-12.5'], ['1e3', '1000'], ['1E+3', '1000'], ['25e-1', '2.5'],
    ['1.00000050000000000000001', '1.00000050000000000000001'], ['1e40', `1${'0'.repeat(40)}`],
  ])('reads %s as %s', (text, value) => {
    const exact = parseDecimalText(text)
    expect(typeof exact === 'string' ? exact : exact.eq(value)).toBe(true)
  })

  // RFC 8259, section 6: no plus sign, no leading zero, digits on both sides of the point, nothing else.
  it.each(['', ' 1', '1 ', '+1', '01', '-', '.5', '5.', '1e', '1e+', '0x10', 'NaN', 'Infinity', '1,5', '1_000', '١', '--1', '1.2.3', '1\n'])(
    'refuses %j', text => expect(parseDecimalText(text)).toBe('number-syntax'))

  it('reads at most 40 characters', () => {
    expect(parseDecimalText('1'.repeat(40))).toBeInstanceOf(Exact)
    expect(parseDecimalText('1'.repeat(41))).toBe('number-digits')
  })

  it('reads exponents of at most 40 either way', () => {
    expect(parseDecimalText('1e-40')).toBeInstanceOf(Exact)
    expect(parseDecimalText('1e41')).toBe('number-range')
    expect(parseDecimalText('1e-41')).toBe('number-range')
    expect(parseDecimalText('1e99999999')).toBe('number-range')
  })
})

describe('isNumberText', () => {
  it('agrees with JSON.parse on any text that looks like a number', () => {
    const almost = fc.string({ unit: fc.constantFrom(...'0123456789.-+eE'), minLength: 1, maxLength: 8 })
    fc.assert(fc.property(almost, (text) => {
      let parsed: unknown
      try {
        parsed = JSON.parse(text)
      }
      catch (error) {
        if (!(error instanceof SyntaxError)) throw error
      }
      return isNumberText(text) === (typeof parsed === 'number')
    }), { numRuns: 2000 })
  })
})

describe('roundToMillionths', () => {
  const round = (text: string) => roundToMillionths(new Exact(text))

  it.each([
    ['1.0000005', 1, true], ['1.0000015', 1.000002, true], ['1.00000050000000000000001', 1.000001, true], ['-1.0000005', -1, true],
    ['-0.0000005', 0, true], ['0.0000005', 0, true], ['0.0000015', 0.000002, true], ['0.100000', 0.1, false], ['-0', 0, false],
    ['1000000000', 1e9, false], ['1000000000.0000005', 1e9, true], ['-1000000000.0000005', -1e9, true],
  ])('%s becomes %d', (text, value, rounded) => {
    expect(round(text)).toEqual({ value, rounded })
    expect(Object.is((round(text) as { value: number }).value, -0)).toBe(false)
  })

  it('refuses what is beyond 1e9 once rounded', () => {
    expect(round('1000000000.0000006')).toBe('number-range')
    expect(round('-1e10')).toBe('number-range')
    expect(round('1e40')).toBe('number-range')
  })

  it('is the rule by whole numbers, for any decimal', () => {
    fc.assert(fc.property(plainText, (text) => {
      const rounded = round(text)
      if (rounded === 'number-range') return millionthsOf(text) > 1_000_000_000_000_000n || millionthsOf(text) < -1_000_000_000_000_000n
      return BigInt(toMillionths(rounded.value)) === millionthsOf(text)
    }), { numRuns: 2000 })
  })

  it('leaves what is rounded as it is', () => {
    fc.assert(fc.property(plainText, (text) => {
      const rounded = round(text)
      if (rounded === 'number-range') return true
      const again = round(formatNumber(rounded.value))
      return again !== 'number-range' && again.value === rounded.value && !again.rounded
    }))
  })
})

describe('plainNumber', () => {
  it('is the rule, wherever it answers', () => {
    fc.assert(fc.property(plainText, (text) => {
      const easy = plainNumber(text)
      if (easy === undefined) return true
      const exact = roundToMillionths(new Exact(text))
      return exact !== 'number-range' && Object.is(exact.value, easy) && !exact.rounded
    }), { numRuns: 2000 })
  })

  it.each(['1234567890', '0.1234567', '1e3', '01', '+1', '1.', '', ' 1'])('leaves %j to decimal arithmetic', text => expect(plainNumber(text)).toBeUndefined())
  it.each([['999999999.999999', 999999999.999999], ['-0', 0], ['-0.000000', 0], ['0.000001', 0.000001]])('reads %s', (text, value) => {
    expect(Object.is(plainNumber(text), value)).toBe(true)
  })
})

describe('parseOwnNumber', () => {
  it.each([
    ['4294967295', 4294967295], ['1e21', 1e21], ['0.1', 0.1], ['0.10', 0.1], ['1E2', 100], ['-0', 0], ['1e-40', 1e-40],
    ['9007199254740992', 9007199254740992], ['0.30000000000000004', 0.30000000000000004],
  ])('keeps %s', (text, value) => expect(Object.is(parseOwnNumber(text), value)).toBe(true))

  // 2^53 + 1 has no double; of 0.1 with 20 digits the shortest form of the nearest double is another decimal.
  it.each(['9007199254740993', '0.10000000000000000001', '1234567890123456789', '0.12345678901234567'])(
    'refuses %s', text => expect(parseOwnNumber(text)).toBe('number-digits'))

  it('gives back every double from its shortest form', () => {
    fc.assert(fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }).filter(x => x === 0 || (Math.abs(x) < 1e39 && Math.abs(x) > 1e-39)), (x) => {
      return Object.is(parseOwnNumber(String(x)), x + 0)
    }))
  })

  it('answers the codes of parseDecimalText', () => {
    expect(parseOwnNumber('1,5')).toBe('number-syntax')
    expect(parseOwnNumber('1e50')).toBe('number-range')
    expect(parseOwnNumber(`0.${'1'.repeat(40)}`)).toBe('number-digits')
  })
})

describe('toMillionths and fromMillionths', () => {
  it('are each other’s inverse over the whole range', () => {
    fc.assert(fc.property(fc.integer({ min: -1e15, max: 1e15 }), n => toMillionths(fromMillionths(n)) === n), { numRuns: 2000 })
  })

  it('hold at the ends and where x * 1e6 is not whole', () => {
    expect(toMillionths(1e9)).toBe(1e15)
    expect(toMillionths(-1e9)).toBe(-1e15)
    expect(0.000123 * 1e6).not.toBe(123)
    expect(toMillionths(0.000123)).toBe(123)
    expect(Object.is(fromMillionths(-0), 0)).toBe(true)
  })

  it.each([0.0000001, 1.00000049, 1e9 + 1, Number.NaN, Number.POSITIVE_INFINITY, 1 / 3])('refuses %d, which is off the grid', (value) => {
    expect(codeOf(() => toMillionths(value))).toBe('not-canonical')
  })
})

describe('formatNumber', () => {
  it('never shows an exponent for a canonical number', () => {
    fc.assert(fc.property(fc.integer({ min: -1e15, max: 1e15 }), n => /^-?\d+(\.\d{1,6})?$/.test(formatNumber(fromMillionths(n)))))
    expect(formatNumber(0.000001)).toBe('0.000001')
  })

  it('writes minus zero as zero and refuses what is no number', () => {
    expect(formatNumber(-0)).toBe('0')
    expect(codeOf(() => formatNumber(Number.NaN))).toBe('not-canonical')
    expect(codeOf(() => formatNumber(Number.NEGATIVE_INFINITY))).toBe('not-canonical')
  })
})
