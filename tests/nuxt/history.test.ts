import { mountSuspended, registerEndpoint } from '@nuxt/test-utils/runtime'
import type { VueWrapper } from '@vue/test-utils'
import { getQuery, setResponseStatus } from 'h3'
import { beforeEach, describe, expect, it } from 'vitest'
import type { HistoryItem } from '#shared/api/history'
import HistoryPage from '~/pages/history.vue'
import { addressOf } from '~/utils/addresses'
import { apiQuery, placeAsked, questionOf } from '~/utils/history/question'
import { soon } from '../support/soon'

const item: HistoryItem = {
  versionId: 15, axisId: 7, tag: 'LID-03.Z', section: 'setup', row: null, field: 'thrustLimit', before: 38, after: 55, unit: '%', delta: 17, points: 17, weight: 'harm',
  at: '2026-11-30T05:12:00.000Z', capturedAt: '2026-11-30T05:12:00.000Z', changedBy: null, storedBy: 'station 2 (Tobias Achterberg)', reason: null, workOrder: null, allowedBy: null, findingId: 31,
  number: 15, baseId: 14, baseNumber: 14, baseAt: '2026-11-29T05:10:00.000Z', seq: 0, timeZone: 'Europe/Berlin', serial: 'A4471', occasion: 'routine', late: false, void: false, newtons: { before: '243.2 N', after: '352 N' }, findingState: 'open', explanation: null, explainedBy: null,
}
const named: HistoryItem = { ...item, versionId: 12, number: 12, baseId: 11, baseNumber: 11, before: 36, after: 38, changedBy: 'Tobias Achterberg', allowedBy: 'Runa Haldersen', reason: 'New liner supplier', workOrder: 'WO-3301', findingId: null, findingState: null, capturedAt: '2026-05-14T11:10:00.000Z' }
let items: HistoryItem[] = []
let fails = false
const asked: Record<string, unknown>[] = []
registerEndpoint('/api/history', (event) => {
  asked.push(getQuery(event))
  if (fails) {
    setResponseStatus(event, 404)
    return { type: 'about:blank', title: 'Not found', status: 404, code: 'not-found', detail: 'There is no axis tag:NO-01.Z, or it belongs to another site.' }
  }
  const from = Number(getQuery(event).cursor ?? 0)
  return { items: items.slice(from, from + 200), next: from + 200 < items.length ? String(from + 200) : null }
})
registerEndpoint('/api/history/acts', () => ({ items: [{ seq: 40, at: item.at, by: 'Runa Haldersen', act: 'site-changed', subject: 'Larkfield', note: null, changes: [{ field: 'fourEyes', before: true, after: false }, { field: 'watched', before: [], after: ['jogSpeed', 'extra:K-017'] }] }], next: null }))
registerEndpoint('/api/history/rests', () => ({ versions: 15, notRead: 1, notReadMore: false, tags: ['JAR-01.X'], verified: null, size: 90, says: 'Rests on 15 versions; 1 axis was not read in that time: JAR-01.X; the log was not verified yet; the log has 90 entries.' }))
registerEndpoint('/api/history/not-read', () => ({ items: [{ axisId: 9, tag: 'JAR-01.X', machine: 'Jar feed', line: 'Jar line 1', site: 'Larkfield', timeZone: 'Europe/Berlin', status: 'never-read', uploadEveryHours: 24, lastUploadAt: null }], next: null }))
registerEndpoint('/api/lines', () => ({ items: [{ id: 2, name: 'Jar line 1' }], next: null }))
registerEndpoint('/api/machines', () => ({ items: [{ id: 5, name: 'Lid press 2' }], next: null }))
const valuesOf = (value: number) => ({ section: 'setup', field: 'thrustLimit', row: null, knownGood: [], bounds: [], versions: 15, leftOut: 0, steps: [{ versionId: 1, number: 1, at: '2026-01-01T05:00:00.000Z', capturedAt: '2026-01-01T05:00:00.000Z', value, unit: '%', before: null, occasion: 'routine', changedBy: null, allowedBy: null, storedBy: 'station 2', reason: null, workOrder: null, serial: 'A4471', model: 'HL40-200V' }] })
let everSet = false
registerEndpoint('/api/axes/tag:LID-03.Z/values', () => everSet ? valuesOf(38) : { ...valuesOf(38), steps: [] })
registerEndpoint('/api/axes/tag:LID-01.Z/values', () => valuesOf(38))
registerEndpoint('/api/axes/tag:LID-04.Z/values', () => valuesOf(40))
registerEndpoint('/api/axes/tag:LID-03.Z', () => ({ id: 7, tag: 'LID-03.Z', machine: { id: 5, name: 'Lid press 2' } }))
registerEndpoint('/api/machines/5/neighbours', () => ({ sisters: [{ role: 'lid press', model: 'HL40-200V', of: 3, axes: [{ id: 5, tag: 'LID-01.Z', machineId: 3 }, { id: 7, tag: 'LID-03.Z', machineId: 5 }, { id: 9, tag: 'LID-04.Z', machineId: 6 }], rows: [], results: [], more: 0 }], buses: [] }))
registerEndpoint('/api/axes/tag:LID-03.Z/fittings', () => ({ items: [] }))
registerEndpoint('/api/axes/tag:LID-03.Z/as-of', () => ({ version: { number: 12, capturedAt: named.capturedAt } }))

const textOf = (page: VueWrapper) => page.text().replace(/\s+/g, ' ')
const reads = (page: VueWrapper, words: string) => soon(() => expect(textOf(page)).toContain(words))
beforeEach(() => {
  items = [item, named]
  fails = false
  everSet = false
  asked.length = 0
  useSession().begin({ id: 3, name: 'Ines Morel', email: 'i@larkfield.example', roles: ['auditor'], sites: [{ id: 1, name: 'Larkfield', timeZone: 'Europe/Berlin' }], plant: 'Larkfield Preserves', empty: false, shared: false })
})

describe('the history', () => {
  it('of one value is set beside its sister axes, on one scale, when that is asked for', async () => {
    everSet = true
    const page = await mountSuspended(HistoryPage, { route: '/history?field=thrustLimit&axis=LID-03.Z' })
    await reads(page, 'Beside its sister axes')
    expect(textOf(page)).not.toContain('Sister axes today')
    await page.findAll('button').find(button => button.text() === 'Beside its sister axes')?.trigger('click')
    await reads(page, 'Sister axes today: LID-01.Z 38 %; LID-04.Z 40 %.')
    expect(page.find('.key').text()).toContain('sister axes')
  })

  it('says who, when, from what to what, why and who allowed it; nobody named where nobody is', async () => {
    const page = await mountSuspended(HistoryPage, { route: '/history?field=thrustLimit&axis=LID-03.Z&from=2024-12-01&to=2026-12-01' })
    await reads(page, 'LID-03.Z: 2 changes.')
    expect(textOf(page)).toContain('1 by nobody named.')
    const [first, second] = page.findAll('table.history tbody tr').map(row => row.text().replace(/\s+/g, ' '))
    expect(first).toMatch(/^30 Nov 2026 06:12 CET ?after 29 Nov 2026 06:10 CET.*thrust limit.*before 38 ?%, after 55 ?%.*243.2 N to 352 N.*Nobody named ?stored by station 2.*Nobody named.*no reason given.*finding 31, open.*v14 to v15$/)
    expect(second).toMatch(/Tobias Achterberg.*Runa Haldersen.*New liner supplier WO-3301.*v11 to v12$/)
    expect(asked[0]).toEqual({ field: 'thrustLimit', axis: 'tag:LID-03.Z', from: '2024-11-30T23:00:00.000Z', to: '2026-12-01T23:00:00.000Z', limit: '200' })
    await reads(page, 'Thrust limit was never set on this axis.')
    await reads(page, 'Rests on 15 versions; 1 axis was not read in that time: JAR-01.X')
    const files = page.findAll('a.file[href^="/api/"]').map(link => link.attributes('href'))
    expect(page.findAll('a.file').at(-1)?.attributes('href')).toBe('/reports?place=axis%3A7&from=2024-11-30T23%3A00%3A00.000Z&to=2026-12-01T23%3A00%3A00.000Z')
    expect(files.map(address => new URLSearchParams(address?.split('?')[1]).get('form'))).toEqual(['csv', 'json', 'pdf'])
    expect(files[2]).toContain('axis=tag%3ALID-03.Z')
    await page.get('input[type=datetime-local]').setValue('2026-06-01T08:00')
    await reads(page, 'v12, read 14 May 2026 13:10 CEST')
  })

  it('asks anew when the sentence is filled in otherwise', async () => {
    const page = await mountSuspended(HistoryPage, { route: '/history' })
    await reads(page, '2 changes.')
    await page.get('[aria-label="What"]').setValue('force-limits')
    await soon(() => expect(asked.at(-1)).toMatchObject({ field: 'force-limits' }))
    await reads(page, 'Jar line 1')
    await page.get('[aria-label="Line or machine"]').setValue('machine:5')
    await page.get('[aria-label="Changed or stored by"]').setValue('nobody')
    await soon(() => expect(asked.at(-1)).toMatchObject({ field: 'force-limits', machine: '5', by: 'nobody' }))
  })

  it('draws only what is in sight of many rows, and knows how many there are', async () => {
    items = Array.from({ length: 150 }, (_, index) => ({ ...item, versionId: 1000 - index }))
    const page = await mountSuspended(HistoryPage, { route: '/history' })
    await reads(page, '150 changes.')
    expect(page.get('table.history').attributes('aria-rowcount')).toBe('151')
    expect(page.findAll('table.history tbody tr').length).toBeLessThan(100)
  })

  it('reads on where there are more', async () => {
    items = Array.from({ length: 250 }, (_, index) => ({ ...item, versionId: 1000 - index }))
    const page = await mountSuspended(HistoryPage, { route: '/history' })
    await reads(page, 'The newest 200 changes.')
    expect(page.get('table.history').attributes('aria-rowcount')).toBe('-1')
    await page.findAll('button').find(button => button.text().startsWith('Show more'))?.trigger('click')
    await reads(page, '250 changes.')
  })

  it('says what to do where nothing was changed, and where it could not be read', async () => {
    items = []
    const page = await mountSuspended(HistoryPage, { route: '/history?field=move.target' })
    await reads(page, 'Nobody changed the target of a move there in that time.')
    fails = true
    const lost = await mountSuspended(HistoryPage, { route: '/history?axis=NO-01.Z' })
    await reads(lost, 'There is no axis tag:NO-01.Z')
  })

  it('tells of what is beside settings, and of axes that were not read', async () => {
    const page = await mountSuspended(HistoryPage, { route: '/history?kind=settings' })
    await reads(page, 'four eyes: on → off')
    await reads(page, 'watched: none → jogSpeed, extra:K-017')
    const other = await mountSuspended(HistoryPage, { route: '/history' })
    await other.findAll('button').find(button => button.text().startsWith('Which axes'))?.trigger('click')
    await reads(other, 'Jar feed, Jar line 1, Larkfield')
  })
})

describe('a question', () => {
  it('is about one value where it names an axis and a field, with a row where the field has rows', () => {
    const of = (query: Record<string, string>) => placeAsked(questionOf(query))
    expect(of({ axis: 'LID-03.Z', field: 'thrustLimit' })).toEqual({ section: 'setup', field: 'thrustLimit' })
    expect(of({ axis: 'LID-03.Z', field: 'move.target', row: '5' })).toEqual({ section: 'move', field: 'target', row: 5 })
    for (const query of [{ field: 'thrustLimit' }, { axis: 'A', field: 'limits' }, { axis: 'A', field: 'move.target' }, { axis: 'A', field: 'pressSpeed' }, { axis: 'A', field: 'x' }]) expect(of(query as Record<string, string>)).toBeUndefined()
  })

  it('goes to the route as it stands, days as those of the zone', () => {
    expect(apiQuery(questionOf({ from: '2026-03-29', to: '2026-03-29', field: 'x' }), 'Europe/Berlin')).toEqual({ field: 'x', from: '2026-03-28T23:00:00.000Z', to: '2026-03-29T22:00:00.000Z' })
    expect(apiQuery(questionOf({ from: 'soon', kind: 'rules' }), 'UTC')).toEqual({})
  })

  it('has an address for one value', () => {
    expect(addressOf.history({ axis: 'LID-03.Z', section: 'setup', field: 'thrustLimit' })).toBe('/history?field=thrustLimit&axis=LID-03.Z')
    expect(addressOf.history({ axis: 'LID-03.Z', section: 'move', field: 'target', row: 5 })).toBe('/history?field=move.target&axis=LID-03.Z&row=5')
    expect(addressOf.history({ section: 'extra', field: 'K-017' })).toBe('/history?field=extra%3AK-017')
  })
})
