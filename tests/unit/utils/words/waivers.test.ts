import { describe, expect, it } from 'vitest'
import type { CheckResult } from '../../../../shared/checks/types'
import { checksSentence } from '../../../../utils/words/checks'
import { acceptable, dayFrom, endOfDay } from '../../../../utils/words/waivers'

const result = (level: CheckResult['level'], rule: string): CheckResult => ({ rule, level, at: [], message: '.', values: {}, ...(level === 'unknown' ? { missing: ['nameplate.stroke'] } : {}) })

describe('what a planner may accept', () => {
  const results = [result('stop', 'travel-span'), result('warn', 'speed-limit'), result('note', 'relative-step'), result('unknown', 'travel-span'), result('unknown', 'select-reach')]

  it('is every stop, and on a gravity or press axis what a stop rule could not judge', () => {
    expect(acceptable(results, [])).toEqual([results[0]])
    expect(acceptable(results, ['collision'])).toEqual([results[0]])
    expect(acceptable(results, ['gravity'])).toEqual([results[0], results[3]])
    expect(acceptable(results, ['press'])).toEqual([results[0], results[3]])
  })
})

describe('the end of a day', () => {
  it('is midnight of the next one in the zone of the site, in summer and winter', () => {
    expect(endOfDay('2026-12-31', 'Europe/Berlin')).toBe('2026-12-31T23:00:00.000Z')
    expect(endOfDay('2026-07-01', 'Europe/Berlin')).toBe('2026-07-01T22:00:00.000Z')
    expect(endOfDay('2026-02-28', 'UTC')).toBe('2026-03-01T00:00:00.000Z')
  })
  it('leaves what is no day to the vault', () => {
    expect(endOfDay('', 'UTC')).toBe('')
    expect(endOfDay('soon', 'UTC')).toBe('soon')
  })
  it('is offered some days on', () => {
    expect(dayFrom(new Date('2026-12-01T23:30:00Z'), 90)).toBe('2027-03-01')
    expect(dayFrom(new Date('2026-12-01T00:00:00Z'), 0)).toBe('2026-12-01')
  })
})

describe('the sentence over the checks', () => {
  it('counts what is accepted by itself, not as a stop', () => {
    expect(checksSentence([{ ...result('stop', 'travel-span'), waived: { by: 'Runa Haldersen' } }, result('warn', 'speed-limit')], 12)).toBe('1 warning, 1 accepted')
    expect(checksSentence([{ ...result('stop', 'travel-span'), waived: { by: 'Runa Haldersen' } }], 12)).toBe('12 rules judged, no stop and no warning, 1 accepted')
    expect(checksSentence([{ ...result('stop', 'travel-span'), waived: null }], 12)).toBe('1 stop')
  })
})
