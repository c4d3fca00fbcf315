import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { toInstant, toLocal } from '../../../../utils/forms/zoned'

describe('a local day and time', () => {
  it.each([
    ['2026-12-01T08:14', 'Europe/Berlin', '2026-12-01T07:14:00.000Z'],
    ['2026-07-01T08:14', 'Europe/Berlin', '2026-07-01T06:14:00.000Z'],
    ['2026-12-01T08:14', 'America/New_York', '2026-12-01T13:14:00.000Z'],
    ['2026-12-01T08:14', 'Asia/Kolkata', '2026-12-01T02:44:00.000Z'],
    ['2026-10-25T02:30', 'Europe/Berlin', '2026-10-25T00:30:00.000Z'],
    ['2026-03-29T02:30', 'Europe/Berlin', '2026-03-29T01:30:00.000Z'],
  ])('%s in %s is %s', (local, zone, instant) => expect(toInstant(local, zone)).toBe(instant))

  it('comes back for every instant of a zone, save in the hour that comes twice', () => {
    const minute = fc.integer({ min: Date.UTC(2020, 0), max: Date.UTC(2035, 0) }).map(ms => ms - ms % 60_000)
    fc.assert(fc.property(minute, fc.constantFrom('Europe/Berlin', 'UTC', 'Australia/Lord_Howe', 'America/St_Johns'), (ms, zone) => {
      const local = toLocal(new Date(ms).toISOString(), zone)
      expect(toLocal(toInstant(local, zone), zone)).toBe(local)
    }))
  })

  it('that is none stays as it stands', () => expect(toInstant('soon', 'UTC')).toBe('soon'))
})
