import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { formatExact, partsOfTime, shortMonth, zoneWord } from '../../../../shared/units/exact-time'

describe('an exact time', () => {
  it('names the zone by its letters and by its offset', () => {
    expect(formatExact('2026-12-01T06:42:10Z', 'Europe/Copenhagen')).toBe('Tue 1 Dec 2026 07:42:10 CET (UTC+1)')
    expect(formatExact('2026-07-01T06:42:10Z', 'Europe/Copenhagen')).toBe('Wed 1 Jul 2026 08:42:10 CEST (UTC+2)')
    expect(formatExact('2026-12-01T06:42:10Z', 'America/New_York')).toBe('Tue 1 Dec 2026 01:42:10 EST (UTC−5)')
  })

  it('tells the two hours apart that a clock shows twice in autumn', () => {
    // Directive 2000/84/EC, Article 3: summer time ends at 1.00 UTC on the last Sunday of October.
    expect(formatExact('2026-10-25T00:30:00Z', 'Europe/Copenhagen')).toBe('Sun 25 Oct 2026 02:30:00 CEST (UTC+2)')
    expect(formatExact('2026-10-25T01:30:00Z', 'Europe/Copenhagen')).toBe('Sun 25 Oct 2026 02:30:00 CET (UTC+1)')
  })

  it('says the offset where a zone has no letters', () => {
    expect(zoneWord(new Date('2026-12-01T00:00:00Z'), 'Asia/Kathmandu')).toBe('UTC+5:45')
    expect(() => zoneWord(new Date(0), 'Nowhere/Town')).toThrow(RangeError)
  })

  it('is read back to the second in UTC', () => {
    fc.assert(fc.property(fc.date({ min: new Date('1990-01-01T00:00:00Z'), max: new Date('2100-01-01T00:00:00Z'), noInvalidDate: true }), (instant) => {
      const { day, month, year, hour, minute, second } = partsOfTime(instant, 'UTC')
      expect(Date.parse(`${day} ${shortMonth(month)} ${year} ${hour}:${minute}:${second} UTC`)).toBe(Math.floor(instant.getTime() / 1000) * 1000)
    }))
  })

  it('has months of three letters', () => expect(['Sept', 'Dec', undefined].map(shortMonth)).toEqual(['Sep', 'Dec', '']))
})
