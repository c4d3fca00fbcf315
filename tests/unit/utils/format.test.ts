import { describe, expect, it } from 'vitest'
import { counted, daysSince, formatAgo, formatCount, formatDay, formatExact, formatShort, formatSpan, fractionOf, sayValue } from '../../../utils/format'

const now = new Date('2026-12-01T06:42:10Z')

describe('times', () => {
  it('are exact with the zone by name and by offset', () => {
    expect(formatExact('2026-12-01T06:42:10Z', 'Europe/Berlin')).toBe('Tue 1 Dec 2026 07:42:10 CET (UTC+1)')
    expect(formatExact('2026-07-01T06:42:10Z', 'Europe/Berlin')).toBe('Wed 1 Jul 2026 08:42:10 CEST (UTC+2)')
    expect(formatExact('2026-12-01T06:42:10Z', 'America/New_York')).toBe('Tue 1 Dec 2026 01:42:10 EST (UTC−5)')
    expect(formatExact('2026-12-01T06:42:10Z', 'Asia/Kathmandu')).toBe('Tue 1 Dec 2026 12:27:10 UTC+5:45 (UTC+5:45)')
    expect(formatExact('2026-09-01T00:00:00Z', 'UTC')).toBe('Tue 1 Sep 2026 00:00:00 UTC (UTC+0)')
  })

  it('are short, and carry the year once it is another', () => {
    expect(formatShort('2026-12-01T03:10:00Z', 'Europe/Berlin', now)).toBe('1 Dec 04:10')
    expect(formatShort('2025-12-31T23:30:00Z', 'Europe/Berlin', now)).toBe('1 Jan 00:30')
    expect(formatDay('2025-11-19T23:30:00Z', 'Europe/Berlin', now)).toBe('20 Nov 2025')
  })

  it('pass in the two largest terms', () => {
    expect(formatSpan(59 * 60_000 + 59_999)).toBe('59 min')
    expect(formatSpan(3 * 3_600_000)).toBe('3 h')
    expect(formatSpan(25 * 3_600_000)).toBe('1 d 1 h')
    expect(formatSpan(48 * 3_600_000)).toBe('2 d')
    expect(formatSpan(239 * 86_400_000 + 3_600_000)).toBe('239 d')
    expect(formatAgo('2026-12-01T06:42:00Z', now)).toBe('just now')
    expect(formatAgo('2026-12-01T03:41:00Z', now)).toBe('3 h ago')
    expect(formatAgo('2026-12-01T06:45:00Z', now)).toBe('just now')
    expect(daysSince('2026-04-06T06:00:00Z', now)).toBe(239)
  })
})

describe('numbers', () => {
  it('have thin gaps between thousands', () => {
    expect([999, 1000, 48211, 1903447].map(formatCount)).toEqual(['999', '1 000', '48 211', '1 903 447'])
    expect([counted(1, 'axis', 'axes'), counted(0, 'axis', 'axes')]).toEqual(['1 axis', '0 axes'])
  })

  it('tell how wide a column of fractions must be', () => {
    expect(fractionOf([38, 12.5, 0.05, 'word', undefined])).toBe(2)
    expect(fractionOf([])).toBe(0)
  })

  it('are said in one line', () => {
    expect(sayValue(12.5, 'ms')).toBe('12.5 ms')
    expect(sayValue(-0.05, 'mm')).toBe('−0.05 mm')
    expect(sayValue(false)).toBe('off')
    expect(sayValue({ value: 3, unit: 'inc' })).toBe('3 inc')
    expect(sayValue(null)).toBe('–')
  })
})
