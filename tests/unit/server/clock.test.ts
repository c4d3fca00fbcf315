import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { fittingFor, knownLifeFrom, timesOf } from '../../../server/services/uploads/clock'

const minute = 60_000
const day = 1440 * minute
const now = Date.UTC(2026, 10, 30)
const known = now - 400 * day

describe('the clock of a file', () => {
  it('is taken at its word within the unit’s known life and up to 10 minutes ahead of receipt', () => {
    expect(timesOf(now - day, now, known)).toEqual({ capturedAt: now - day, receivedAt: now, orderAt: now - day, clockDoubtful: false })
    expect(timesOf(now + 10 * minute, now, known)).toMatchObject({ orderAt: now + 10 * minute, clockDoubtful: false })
    expect(timesOf(known, now, known)).toMatchObject({ orderAt: known, clockDoubtful: false })
  })

  it('is doubtful beyond, and receipt takes its place for order while both are kept', () => {
    expect(timesOf(now + 10 * minute + 1, now, known)).toEqual({ capturedAt: now + 10 * minute + 1, receivedAt: now, orderAt: now, clockDoubtful: true })
    expect(timesOf(known - 1, now, known)).toMatchObject({ orderAt: now, clockDoubtful: true })
    expect(timesOf(0, now, known)).toMatchObject({ capturedAt: 0, orderAt: now, clockDoubtful: true })
  })

  it('never orders a file later than 10 minutes after its receipt', () => {
    fc.assert(fc.property(fc.integer({ min: 0, max: 2 * now }), (capturedAt) => {
      expect(timesOf(capturedAt, now, known).orderAt).toBeLessThanOrEqual(now + 10 * minute)
    }))
  })
})

describe('the known life of a unit', () => {
  it('reaches three years back from when it was registered or first fitted', () => {
    const years = 3 * 365 * day
    expect(knownLifeFrom(now, [])).toBe(now - years)
    expect(knownLifeFrom(now, [{ from: now - 90 * day, to: null }])).toBe(now - 90 * day - years)
    expect(knownLifeFrom(now - 200 * day, [{ from: now - 90 * day, to: null }])).toBe(now - 200 * day - years)
  })
})

describe('the fitting that a file belongs to', () => {
  const lid = { axis: 'LID-01.Z', from: now - 300 * day, to: now - 100 * day }
  const press = { axis: 'LID-02.Z', from: now - 90 * day, to: null }
  const at = (capturedAt: number, knownSince = known) => fittingFor([lid, press], timesOf(capturedAt, now, knownSince))?.axis

  it('is the one open at captured-at, from its first instant to before its last', () => {
    expect(at(lid.from)).toBe('LID-01.Z')
    expect(at(lid.to - 1)).toBe('LID-01.Z')
    expect(at(press.from)).toBe('LID-02.Z')
    expect(at(now)).toBe('LID-02.Z')
  })

  it('is none while the unit lay on the shelf between two fittings', () => {
    expect(at(lid.to)).toBeUndefined()
    expect(at(press.from - 1)).toBeUndefined()
  })

  it('is the first for a file older than all of them, read on the bench', () => {
    expect(at(lid.from - day)).toBe('LID-01.Z')
  })

  it('goes by receipt where the clock is doubtful: a dead battery must not send a file to where the unit once sat', () => {
    expect(at(0)).toBe('LID-02.Z')
    expect(at(now + day)).toBe('LID-02.Z')
    expect(fittingFor([lid], timesOf(0, now, known))?.axis).toBe('LID-01.Z')
    expect(fittingFor([lid], timesOf(now + day, now, known))).toBeUndefined()
    expect(fittingFor([], timesOf(now, now, known))).toBeUndefined()
  })
})
