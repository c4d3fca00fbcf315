import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { LifeEvent } from '../../../../shared/api/versions'
import { layoutLife, lifeSentence } from '../../../../utils/pictures/life'
import { extentOf } from '../../../../shared/pictures/scale'
import { timeTicks } from '../../../../utils/pictures/time-scale'

const event = (kind: LifeEvent['kind'], at: string, rest: Partial<LifeEvent> = {}): LifeEvent =>
  ({ at, kind, findingId: null, versionId: null, number: null, by: 'Runa Haldersen', text: null, serial: null, changes: null, occasion: null, sightings: null, ...rest })
const version = (number: number, at: string) => event('version', at, { number })
const mark = (number: number, at: string) => event('mark', at, { number })

const events = [
  event('fitted', '2025-02-12T08:00:00.000Z', { serial: 'HL40-23-00392' }),
  version(1, '2025-02-12T09:00:00.000Z'), version(2, '2025-03-03T09:00:00.000Z'), mark(2, '2025-03-04T09:00:00.000Z'),
  event('taken-out', '2026-01-21T02:00:00.000Z', { serial: 'HL40-23-00392' }), event('fitted', '2026-01-21T03:40:00.000Z', { serial: 'HL40-24-00817' }),
  version(3, '2026-01-22T09:00:00.000Z'), mark(3, '2026-01-22T10:00:00.000Z'), version(4, '2026-11-30T05:12:00.000Z'),
]
const until = Date.parse('2026-12-01T07:00:00.000Z')
const input = { events, until, zone: 'Europe/Vienna', off: { number: 4 } }

describe('layoutLife', () => {
  const layout = layoutLife(input, 1376)

  it('draws a run for each known-good, a cut where the unit changed, and the version that is off longest', () => {
    expect(layout.runs.map(run => run.label)).toEqual(['v2', 'v3'])
    expect(layout.cuts).toHaveLength(1)
    expect(layout.strokes.at(-1)).toMatchObject({ tone: 'off', length: 30 })
    expect(layout.texts.map(text => text.text)).toEqual(['HL40-23-00392', 'HL40-24-00817', 'v4 off'])
  })

  it('ends a run where its mark was taken back', () => {
    const taken = layoutLife({ ...input, events: [...events, event('mark-none', '2026-02-01T00:00:00.000Z')] }, 1376)
    expect(taken.runs).toHaveLength(2)
    expect(taken.runs[1]?.to).toBeLessThan(layout.runs[1]?.to ?? 0)
  })

  it('draws the bare axis of a life that has not begun', () => {
    expect(layoutLife({ ...input, events: [], off: null }, 900)).toMatchObject({ strokes: [], runs: [], cuts: [], ticks: [] })
  })

  it('never lets strokes or names overlap, and loses no version', () => {
    const times = fc.array(fc.integer({ min: Date.parse('2020-01-01'), max: until }), { minLength: 1, maxLength: 120 })
    fc.assert(fc.property(times, fc.integer({ min: 300, max: 2400 }), (instants, width) => {
      const ordered = [...instants].sort((a, b) => a - b).map((at, index) => version(index + 1, new Date(at).toISOString()))
      const drawn = layoutLife({ ...input, events: ordered, off: null }, width)
      for (const [index, stroke] of drawn.strokes.entries()) {
        const next = drawn.strokes[index + 1]
        if (next) expect(next.x - stroke.x).toBeGreaterThanOrEqual(4)
      }
      expect(drawn.strokes.flatMap(stroke => stroke.numbers)).toHaveLength(ordered.length)
    }))
  })

  it('keeps the serial of a unit that was fitted for a moment off the picture', () => {
    const short = [events[0], event('fitted', '2026-01-20T00:00:00.000Z', { serial: 'HL40-24-00001' }), events[5]].filter(one => one !== undefined)
    const names = layoutLife({ ...input, events: short, off: null }, 700).texts
    expect(names.map(name => name.text)).toEqual(['HL40-23-00392', 'HL40-24-00817'])
    const [one, other] = names.map(name => extentOf(name))
    expect(one?.[1]).toBeLessThanOrEqual(other?.[0] ?? 0)
  })
})

describe('timeTicks', () => {
  it('keeps labels 46 px apart and begins months at midnight of the plant', () => {
    const ticks = timeTicks(Date.parse('2025-02-01T00:00:00Z'), until, 92, 1360, 'Europe/Vienna')
    const july = ticks.find(tick => tick.label === 'Jul')
    expect(july && new Date(july.at).toISOString()).toBe('2025-06-30T22:00:00.000Z')
    expect(ticks.filter(tick => tick.label !== null).map(tick => tick.label)).toEqual(['Apr', 'Jul', 'Oct', '2026', 'Apr', 'Jul', 'Oct'])
  })

  it('counts days in a short life', () => {
    const labels = timeTicks(Date.parse('2026-11-28T00:00:00Z'), until, 92, 1360, 'Europe/Vienna').map(tick => tick.label)
    expect(labels).toEqual(['29 Nov', '30 Nov', '1 Dec'])
  })

  it('never lets two labels touch', () => {
    fc.assert(fc.property(fc.integer({ min: 3_600_000, max: 40 * 366 * 86_400_000 }), fc.integer({ min: 240, max: 2400 }), (span, width) => {
      const labelled = timeTicks(until - span, until, 92, 92 + width, 'Europe/Vienna').filter(tick => tick.label !== null)
      for (const [index, tick] of labelled.entries()) {
        const next = labelled[index + 1]
        if (next) expect(next.x - tick.x).toBeGreaterThanOrEqual(46)
      }
    }))
  })
})

describe('lifeSentence', () => {
  it('tells versions, marks, units and what is off', () => {
    expect(lifeSentence('LID-03.Z', input, at => at.slice(0, 10))).toBe(
      'Life of LID-03.Z since 2025-02-12: 4 versions, 2 known-good marks (v2, v3), the unit changed on 2026-01-21 from HL40-23-00392 to HL40-24-00817. Today’s v4 is off its known-good.',
    )
  })
  it('says so where nothing is known', () => {
    expect(lifeSentence('A1', { ...input, events: [], off: null }, at => at)).toBe('Nothing is known of A1 yet.')
  })
})
