import { describe, expect, it } from 'vitest'
import { makingWords, periodWords, placesLike, reportPlaces, scopeOf } from '../../../../utils/reports/places'

const places = reportPlaces(
  [{ id: 12, tag: 'LID-02.Z', machine: 'LID-02', machineId: 3 }, { id: 13, tag: 'LID-02.R', machine: 'LID-02', machineId: 3 }], [{ id: 1, name: 'Line 1' }], [{ id: 1, name: 'Larkfield' }],
)

describe('places of a report', () => {
  it('are every axis, each machine once, lines and sites', () => {
    expect(places.map(({ value, label }) => [value, label])).toEqual([
      ['axis:12', 'LID-02.Z, axis'], ['axis:13', 'LID-02.R, axis'], ['machine:3', 'LID-02, machine'], ['line:1', 'Line 1, line'], ['site:1', 'Larkfield, site'],
    ])
  })
  it('are found by a part of their name, without case', () => {
    expect(placesLike(places, ' lid-02.z').map(({ value }) => value)).toEqual(['axis:12'])
    expect(placesLike(places, 'machine').map(({ value }) => value)).toEqual(['machine:3'])
    expect(placesLike(places, 'nowhere')).toEqual([])
  })
  it('go to the route as scope and id, and what is no place as every axis', () => {
    for (const { scope, scopeId, value } of places) expect(scopeOf(value)).toEqual({ scope, scopeId })
    for (const text of ['', undefined, 'axis:', 'axis:0', 'axis:1x', 'plant:1', 'axis:-1']) expect(scopeOf(text)).toEqual({})
  })
})

describe('words of a report', () => {
  const at = (iso: string) => iso.slice(0, 10)
  it.each([
    [{ from: null, to: null, askedAt: '2026-03-09T00:00:00.000Z' }, 'from the first version to 2026-03-09'],
    [{ from: '2026-01-01T00:00:00.000Z', to: '2026-02-01T00:00:00.000Z', askedAt: '2026-03-09T00:00:00.000Z' }, '2026-01-01 to 2026-02-01'],
    [{ from: '2026-01-01T00:00:00.000Z', to: '2027-01-01T00:00:00.000Z', askedAt: '2026-03-09T00:00:00.000Z' }, '2026-01-01 to 2026-03-09'],
  ])('%o is %s', (report, words) => expect(periodWords(report, at)).toBe(words))
  it('say how far it has come', () => {
    expect([null, { pages: 7, of: null }, { pages: 7, of: 90 }].map(makingWords)).toEqual(['Reading what the vault holds.', 'Counting pages: 7 so far.', 'Page 7 of 90.'])
  })
})
