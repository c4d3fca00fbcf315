import fc from 'fast-check'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { historyPage, type HistoryItem, type HistoryQuery } from '../../../../shared/api/history'
import type { PersonActor } from '../../../../server/database/actor'
import { inserter } from '../../../../server/database/inserter'
import { nameplateRevision } from '../../../../server/database/schema'
import { explainFinding } from '../../../../server/services/findings/findings'
import { historyFilter } from '../../../../server/services/history/filter'
import { listHistory, wholeHistory } from '../../../../server/services/history/history'
import { restsOn } from '../../../../server/services/history/rests'
import { storeUpload } from '../../../../server/services/uploads/store-upload'
import { voidVersion } from '../../../../server/services/versions/void-version'
import { day, iso, openPlant, settingsFile, start, type FileParts, type Plant } from '../../../support/vault-plant'

let plant: Plant
let runa: PersonActor
let tobias: PersonActor
let ines: PersonActor
let lid: number
let far: number
let farSite: number

beforeEach(() => {
  plant = openPlant()
  runa = plant.person('Runa Haldersen')
  tobias = plant.person('Tobias Achterberg', ['technician'])
  ines = plant.person('Ines Morel', ['auditor'])
  lid = plant.axis('LID-02.Z')
  plant.fit(lid, plant.unit('SN-0001'), start - 300 * day)
  const other = plant.machineAt('Hollowbrook')
  farSite = other.siteId
  far = plant.axis('JAR-01.X', { machineId: other.machineId })
  plant.fit(far, plant.unit('SN-0009'), start - 300 * day)
})
afterEach(() => plant.close())

function store(parts: FileParts, words = {}, as = tobias): number {
  plant.now += day
  const outcome = storeUpload(plant.vault, as, { bytes: settingsFile({ exportedAt: iso(plant.now), ...parts }), name: 'lid.json' }, words)
  if (outcome.outcome !== 'version') throw new Error(JSON.stringify(outcome))
  return outcome.answer.version.id
}
const press = (target: number, forceLimit: number) => ({ move: 5, kind: 'press', target, speed: 20, acceleration: 200, approach: 10, forceLimit })

/** Three versions at one axis, two at another site's. */
function story(): void {
  store({ setup: { thrustLimit: 38, speedLimit: 500 }, moves: [press(50, 30)], extra: { 'K-017': 4 } })
  store({ serial: 'SN-0009', setup: { thrustLimit: 60 } })
  store({ setup: { thrustLimit: 55, speedLimit: 500 }, moves: [press(50, 30)], extra: { 'K-017': 4 } })
  store({ setup: { thrustLimit: 38, speedLimit: 400 }, moves: [press(60, 35)], extra: { 'K-017': 5 } }, { changedBy: `person:${tobias.id}`, allowedBy: 'Marit Lund', reason: 'lids stood proud', workOrder: 'WO-1' })
  store({ serial: 'SN-0009', setup: { thrustLimit: 61 } }, { changedBy: 'night shift' }, runa)
}

const list = (query: Partial<HistoryQuery> = {}, as = ines) => listHistory(plant.vault, as, query)
const told = (items: readonly HistoryItem[]) => items.map(({ tag, number, row, field, before, after }) => `${tag} v${number} ${row === null ? '' : `${row} `}${field} ${String(before)}→${String(after)}`)

/** All pages of a query, one after the other. */
function paged(query: Partial<HistoryQuery>, limit: number, as = ines): HistoryItem[] {
  const items: HistoryItem[] = []
  for (let cursor: string | undefined; ;) {
    const page = list({ ...query, limit, ...(cursor !== undefined && { cursor }) }, as)
    items.push(...page.items)
    if (page.next === null) return items
    cursor = page.next
  }
}

describe('history', () => {
  it('says who changed one field of one axis, from what to what, why and who allowed it, newest first', () => {
    story()
    const page = list({ field: 'thrustLimit', axis: 'tag:LID-02.Z' })
    expect(historyPage.safeParse(page).error).toBeUndefined()
    expect(told(page.items)).toEqual(['LID-02.Z v3 thrustLimit 55→38', 'LID-02.Z v2 thrustLimit 38→55'])
    expect(page.items[0]).toMatchObject({ changedBy: 'Tobias Achterberg', allowedBy: 'Marit Lund', reason: 'lids stood proud', workOrder: 'WO-1', unit: '%', points: -17, baseNumber: 2, timeZone: 'Europe/Berlin', findingState: 'explained', serial: 'SN-0001' })
    expect(page.items[1]).toMatchObject({ changedBy: null, allowedBy: null, reason: null, storedBy: 'Tobias Achterberg', findingState: 'open', explanation: null, baseAt: iso(start + day) })
  })

  it('says in newtons what a percentage meant, by the nameplate of the unit as it was then', () => {
    plant.nameplate({ model: 'HL40-200V', axisKind: 'linear', stroke: 200, forceBase: 'rated-thrust', ratedThrust: 640 })
    story()
    expect(list({ axis: 'tag:LID-02.Z', field: 'force-limits' }).items.map(({ row, newtons }) => [row, newtons])).toEqual([
      [5, { before: '192 N', after: '224 N' }], [null, { before: '352 N', after: '243.2 N' }], [null, { before: '243.2 N', after: '352 N' }],
    ])
    expect(list({ axis: 'tag:LID-02.Z', field: 'speedLimit' }).items[0]?.newtons).toBeNull()
    plant.now += day
    inserter(plant.vault.db, nameplateRevision)({ model: 'HL40-200V', revision: 2, nameplate: { model: 'HL40-200V', axisKind: 'linear', stroke: 200, forceBase: 'rated-thrust', ratedThrust: 700 }, madeAt: iso(plant.now), madeBy: runa.id })
    expect(list({ axis: 'tag:LID-02.Z', field: 'thrustLimit' }).items.at(-1)?.newtons).toEqual({ before: '243.2 N', after: '352 N' })
    store({ setup: { thrustLimit: 40, speedLimit: 400 }, moves: [press(60, 35)], extra: { 'K-017': 5 } })
    expect(list({ axis: 'tag:LID-02.Z', field: 'thrustLimit' }).items[0]?.newtons).toEqual({ before: '266 N', after: '280 N' })
  })

  it('says what an answer rests on: versions, axes that nobody read meanwhile, the log', () => {
    story()
    const rests = (query: Parameters<typeof restsOn>[2] = {}, as = ines) => restsOn(plant.vault, as, query, 'Europe/Berlin')
    expect(rests()).toMatchObject({ versions: 5, notRead: 0, notReadMore: false, verified: null })
    expect(rests({ axis: 'tag:LID-02.Z' })).toMatchObject({ versions: 3, notRead: 0 })
    expect(rests({ site: farSite })).toMatchObject({ versions: 2 })
    expect(rests({}, plant.person('Bound', ['auditor'], [farSite]))).toMatchObject({ versions: 2, notRead: 0 })
    const first = { from: iso(start + day), to: iso(start + day + 1) }
    expect(rests(first)).toMatchObject({ versions: 1, notRead: 1, tags: ['JAR-01.X'] })
    expect(rests(first).says).toMatch(/^Rests on 1 version; 1 axis was not read in that time: JAR-01\.X; the log was not verified yet; the log has \d+ entries\.$/)
    expect(rests({ from: iso(start + 90 * day) })).toMatchObject({ versions: 0, notRead: 2 })
  })

  it('names the finding of a change, with what was said of it', () => {
    story()
    const { findingId } = list({ field: 'thrustLimit', axis: 'tag:LID-02.Z' }).items[1]!
    explainFinding(plant.vault, runa, findingId!, { text: 'to get through the shift' })
    expect(list({ field: 'thrustLimit', axis: `${lid}` }).items[1]).toMatchObject({ findingId, findingState: 'explained', explanation: 'to get through the shift', explainedBy: 'Runa Haldersen' })
    expect(list({ field: 'speedLimit' }).items[0]?.findingId).not.toBeNull()
  })

  it.each([
    [{ field: 'force-limits' }, ['JAR-01.X v2 thrustLimit 60→61', 'LID-02.Z v3 5 forceLimit 30→35', 'LID-02.Z v3 thrustLimit 55→38', 'LID-02.Z v2 thrustLimit 38→55']],
    [{ field: 'targets' }, ['LID-02.Z v3 5 target 50→60']],
    [{ field: 'limits', axis: 'tag:lid-02.z' }, ['LID-02.Z v3 5 forceLimit 30→35', 'LID-02.Z v3 thrustLimit 55→38', 'LID-02.Z v3 speedLimit 500→400', 'LID-02.Z v2 thrustLimit 38→55']],
    [{ field: 'extra:K-017' }, ['LID-02.Z v3 K-017 4→5']],
    [{ field: 'K-017', section: 'extra' }, ['LID-02.Z v3 K-017 4→5']],
    [{ section: 'move', row: 5, field: 'target' }, ['LID-02.Z v3 5 target 50→60']],
    [{ section: 'move', row: 6 }, []],
    [{ by: 'nobody' }, ['LID-02.Z v2 thrustLimit 38→55']],
    [{ by: 'night shift' }, ['JAR-01.X v2 thrustLimit 60→61']],
    [{ by: 'runa haldersen' }, ['JAR-01.X v2 thrustLimit 60→61']],
    [{ by: 'tobias achterberg', field: 'thrustLimit' }, ['LID-02.Z v3 thrustLimit 55→38', 'LID-02.Z v2 thrustLimit 38→55']],
    [{ by: 'somebody else' }, []],
    [{ weight: 'text' }, []],
  ] as const)('%j', (query, expected) => {
    story()
    expect(told(list(query).items).sort()).toEqual([...expected].sort())
  })

  it('asks by machine, line, site and unit; a unit keeps its changes when it goes, an axis when another comes', () => {
    story()
    const fields = (query: Partial<HistoryQuery>) => new Set(list(query).items.map(({ tag }) => tag))
    expect(fields({ machine: plant.machineId })).toEqual(new Set(['LID-02.Z']))
    expect(fields({ site: farSite })).toEqual(new Set(['JAR-01.X']))
    expect(fields({ line: 1 })).toEqual(new Set(['LID-02.Z']))
    plant.vault.sqlite.prepare('UPDATE fitting SET to_at = ? WHERE axis_id = ?').run(iso(plant.now + 1), lid)
    const spare = plant.unit('SN-0002')
    plant.fit(lid, spare, plant.now + 2)
    store({ serial: 'SN-0002', setup: { thrustLimit: 44, speedLimit: 400 }, moves: [press(60, 35)], extra: { 'K-017': 5 } })
    expect(told(list({ axis: `${lid}`, field: 'thrustLimit' }).items)).toHaveLength(3)
    expect(told(list({ unit: spare }).items)).toEqual(['LID-02.Z v4 thrustLimit 38→44'])
    expect(list({ unit: 1, field: 'thrustLimit' }).items).toHaveLength(2)
  })

  it('takes a stretch of time by when the vault received it, the first instant in and the last one out', () => {
    story()
    const numbers = (from: number, to: number) => list({ from: iso(from), to: iso(to), field: 'thrustLimit' }).items.map(({ tag, number }) => `${tag} v${number}`)
    expect(numbers(start + 3 * day, start + 4 * day)).toEqual(['LID-02.Z v2'])
    expect(numbers(start + 3 * day + 1, start + 4 * day)).toEqual([])
    expect(numbers(start + 3 * day, start + 4 * day + 1)).toEqual(['LID-02.Z v3', 'LID-02.Z v2'])
    expect(numbers(start + 40 * day, start + 50 * day)).toEqual([])
    expect(list({ from: '2026-03-05T07:00:00+01:00', field: 'thrustLimit' }).items.map(({ number }) => number)).toEqual([2, 3])
  })

  it('shows only the actor’s sites, and places outside them as if they were not there', () => {
    story()
    const bound = plant.person('Bound Auditor', ['auditor'], [plant.siteId])
    expect(new Set(list({}, bound).items.map(({ tag }) => tag))).toEqual(new Set(['LID-02.Z']))
    expect(list({ field: 'thrustLimit', by: 'night shift' }, bound).items).toEqual([])
    for (const query of [{ axis: `${far}` }, { site: farSite }, { axis: 'tag:NO-01.Z' }, { unit: 2 }, { machine: 99 }]) {
      expect(() => list(query, bound)).toThrow(expect.objectContaining({ code: 'not-found' }))
    }
  })

  it.each([{ field: 'thrust' }, { field: 'target', section: 'setup' }, { cursor: 'x' }, { cursor: '1' }] as const)('refuses %j', (query) => {
    expect(() => list(query)).toThrow(expect.objectContaining({ code: 'input' }))
  })

  it('keeps what was voided, and says so', () => {
    story()
    voidVersion(plant.vault, runa, list({ field: 'thrustLimit', axis: `${lid}` }).items[1]!.versionId, 'another axis')
    expect(list({ field: 'thrustLimit', axis: `${lid}` }).items.map(one => one.void)).toEqual([false, true])
  })

  it('law: pages of any size are the whole, and the whole is what the changes say', () => {
    story()
    const fields = [undefined, 'thrustLimit', 'limits', 'targets', 'extra:K-017']
    const queries = fc.record({
      field: fc.constantFrom(...fields), weight: fc.constantFrom(undefined, 'harm', 'motion'), by: fc.constantFrom(undefined, 'nobody', 'Tobias Achterberg'),
      axis: fc.constantFrom(undefined, 'tag:LID-02.Z'), from: fc.constantFrom(undefined, iso(start + 3 * day)),
    })
    fc.assert(fc.property(queries, fc.integer({ min: 1, max: 5 }), (query, limit) => {
      const asked = Object.fromEntries(Object.entries(query).filter(([, value]) => value !== undefined)) as Partial<HistoryQuery>
      const whole = [...wholeHistory(plant.vault, historyFilter(plant.vault, ines, asked), limit)].flat()
      expect(paged(asked, limit)).toEqual(whole)
      const keys = whole.map(({ versionId, seq }) => versionId * 1000 + seq)
      expect(keys).toEqual([...keys].sort((a, b) => b - a))
      const all = list({ limit: 200 }).items
      const limits = list({ field: 'limits', limit: 200 }).items.map(({ versionId, seq }) => `${versionId}.${seq}`)
      expect(whole).toEqual(all.filter(item =>
        (query.field === undefined || (query.field === 'limits' ? limits.includes(`${item.versionId}.${item.seq}`) : query.field === 'targets' ? ['target', 'turn', 'approach'].includes(item.field) : item.field === query.field.replace('extra:', '')))
        && (query.weight === undefined || item.weight === query.weight)
        && (query.by === undefined || (query.by === 'nobody' ? item.changedBy === null : item.changedBy === query.by || item.storedBy === query.by))
        && (query.axis === undefined || item.tag === 'LID-02.Z') && (query.from === undefined || item.at >= query.from)))
    }), { numRuns: 60 })
  })

  it('does not take in what is stored while it is read', () => {
    story()
    const pages = wholeHistory(plant.vault, historyFilter(plant.vault, ines, {}), 2)
    const first = pages.next().value as HistoryItem[]
    store({ setup: { thrustLimit: 70 } })
    const rest = [...pages].flat()
    expect([...first, ...rest].every(({ number, tag }) => tag !== 'LID-02.Z' || number < 4)).toBe(true)
  })
})
