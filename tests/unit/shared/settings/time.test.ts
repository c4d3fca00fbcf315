import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { CodedError } from '../../../../shared/errors/coded'
import { formatTimestamp, parseTimestamp } from '../../../../shared/settings/time'

describe('parseTimestamp', () => {
  // RFC 3339, section 5.8, with the instants in milliseconds.
  it.each([
    ['1985-04-12T23:20:50.52Z', 482196050520],
    ['1996-12-19T16:39:57-08:00', 851042397000],
    ['1990-12-31T23:59:60Z', 662688000000],
    ['1990-12-31T15:59:60-08:00', 662688000000],
    ['1937-01-01T12:00:27.87+00:20', -1041337172130],
  ])('reads %s', (text, instant) => expect(parseTimestamp(text)).toBe(instant))

  // RFC 3339, section 5.6: T and Z may be small; 4.3: -00:00 is an unknown local offset.
  it.each([
    ['2026-11-30t08:15:00z', '2026-11-30T08:15:00.000Z'], ['2026-11-30T08:15:00-00:00', '2026-11-30T08:15:00.000Z'],
    ['2026-11-30T08:15:00.1239999999Z', '2026-11-30T08:15:00.123Z'], ['2026-11-30T08:15:00+23:59', '2026-11-29T08:16:00.000Z'],
    ['2024-02-29T00:00:00Z', '2024-02-29T00:00:00.000Z'], ['2000-02-29T00:00:00Z', '2000-02-29T00:00:00.000Z'],
    ['0000-01-01T00:00:00Z', '0000-01-01T00:00:00.000Z'], ['0099-12-31T23:59:59Z', '0099-12-31T23:59:59.000Z'], ['9999-12-31T23:59:59.999Z', '9999-12-31T23:59:59.999Z'],
    ['2016-12-31T23:59:60.5Z', '2017-01-01T00:00:00.500Z'], ['2015-07-01T01:59:60+02:00', '2015-07-01T00:00:00.000Z'],
  ])('reads %s as %s', (text, utc) => expect(formatTimestamp(parseTimestamp(text) ?? Number.NaN)).toBe(utc))

  it.each([
    '1990-13-01T00:00:00Z', '1990-00-01T00:00:00Z', '1990-02-30T00:00:00Z', '2023-02-29T00:00:00Z', '1900-02-29T00:00:00Z', '1990-04-31T00:00:00Z', '1990-01-00T00:00:00Z', '1990-01-32T00:00:00Z',
    '1990-01-01T24:00:00Z', '1990-01-01T23:60:00Z', '1990-01-01T23:59:61Z', '1990-01-01 00:00:00Z', '1990-01-01T00:00:00', '1990-01-01', '1990-01-01T00:00Z',
    '1990-01-01T00:00:00+0100', '1990-01-01T00:00:00+1:00', '1990-01-01T00:00:00+24:00', '1990-01-01T00:00:00+01:60', '1990-01-01T00:00:00.Z', '1990-01-01T00:00:00,5Z',
    '90-01-01T00:00:00Z', '+1990-01-01T00:00:00Z', '19900101T000000Z', ' 1990-01-01T00:00:00Z', '1990-01-01T00:00:00Z ', '1990-01-01T00:00:00Z\n', '', '１990-01-01T00:00:00Z',
  ])('refuses %j', text => expect(parseTimestamp(text)).toBeUndefined())

  // A leap second is the last of a UTC month (ITU-R TF.460: at its end; from memory, not verified).
  it.each(['1990-12-31T22:59:60Z', '1990-12-30T23:59:60Z', '1990-12-31T23:59:60+01:00', '1990-12-31T23:58:60Z'])('refuses the leap second %s', text => expect(parseTimestamp(text)).toBeUndefined())

  it('agrees with Date on every real day', () => {
    fc.assert(fc.property(fc.date({ min: new Date('0000-01-01T00:00:00Z'), max: new Date('9999-12-31T23:59:59.999Z'), noInvalidDate: true }), date =>
      parseTimestamp(date.toISOString()) === date.getTime()), { numRuns: 1000 })
  })

  it('takes the offset off', () => {
    fc.assert(fc.property(fc.integer({ min: 0, max: 4e12 }), fc.integer({ min: -1439, max: 1439 }), (instant, offset) => {
      const local = formatTimestamp(instant + offset * 60_000).slice(0, -1)
      const size = Math.abs(offset)
      const two = (n: number) => String(n).padStart(2, '0')
      return parseTimestamp(`${local}${offset < 0 ? '-' : '+'}${two(Math.floor(size / 60))}:${two(size % 60)}`) === instant
    }))
  })

  it('refuses a day that the calendar does not have, in any month', () => {
    fc.assert(fc.property(fc.integer({ min: 1, max: 9999 }), fc.integer({ min: 1, max: 12 }), fc.integer({ min: 28, max: 31 }), (year, month, day) => {
      const text = `${String(year).padStart(4, '0')}-${String(month).padStart(2, '0')}-${day}`
      const date = new Date(`${text}T00:00:00Z`)
      const real = !Number.isNaN(date.getTime()) && date.toISOString().startsWith(text)
      return (parseTimestamp(`${text}T00:00:00Z`) !== undefined) === real
    }), { numRuns: 1000 })
  })
})

/* RFC 3339, section 5.7: the last day of each month; appendix C: leap years are those divided by 4, of the centuries only those by 400. */
describe('the last day', () => {
  const lastDays: readonly (readonly [year: string, days: readonly number[]])[] = [
    ['2023', [31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31]],
    ['2024', [31, 29, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31]],
    ['1900', [31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31]],
    ['2000', [31, 29, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31]],
    ['2100', [31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31]],
    ['0000', [31, 29, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31]],
  ]

  it.each(lastDays)('of each month of %s is there, and the day after it is not', (year, days) => {
    for (const [index, last] of days.entries()) {
      const month = String(index + 1).padStart(2, '0')
      const reads = (day: number) => parseTimestamp(`${year}-${month}-${String(day).padStart(2, '0')}T12:00:00Z`) !== undefined
      expect([reads(0), reads(1), reads(last), reads(last + 1), reads(39), reads(99)], `${year}-${month}`).toEqual([false, true, true, false, false, false])
    }
  })

  it('of a month lies one day before the first of the next', () => {
    for (const [year, days] of lastDays) {
      for (const [index, last] of days.slice(0, 11).entries()) {
        const at = (month: number, day: number) => parseTimestamp(`${year}-${String(month).padStart(2, '0')}-${String(day).padStart(2, '0')}T00:00:00Z`) ?? Number.NaN
        expect(at(index + 2, 1) - at(index + 1, last)).toBe(86_400_000)
      }
    }
  })
})

describe('formatTimestamp', () => {
  it('is undone by parseTimestamp', () => {
    fc.assert(fc.property(fc.integer({ min: -62_167_219_200_000, max: 253_402_300_799_999 }), instant => parseTimestamp(formatTimestamp(instant)) === instant))
  })

  it.each([Number.NaN, Number.POSITIVE_INFINITY, 0.5, 253_402_300_800_000, -62_167_219_200_001])('refuses %d', (instant) => {
    expect(() => formatTimestamp(instant)).toThrowError(expect.objectContaining({ code: 'no-time' }) as CodedError)
  })
})
