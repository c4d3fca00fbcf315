import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { actsPage, notReadPage, type HistoryKind } from '../../../../shared/api/history'
import type { PersonActor } from '../../../../server/database/actor'
import { listActs } from '../../../../server/services/history/acts'
import { listNotRead } from '../../../../server/services/history/not-read'
import { markKnownGood, markNone } from '../../../../server/services/known-good/mark'
import { reviseNameplate, registerNameplate } from '../../../../server/services/nameplates/nameplates'
import { changePerson, registerPerson } from '../../../../server/services/people/people'
import { changeSite } from '../../../../server/services/places/sites'
import { endRule, makeRule } from '../../../../server/services/rules/rules'
import { storeUpload } from '../../../../server/services/uploads/store-upload'
import { day, iso, openPlant, settingsFile, start, type Plant } from '../../../support/vault-plant'

let plant: Plant
let runa: PersonActor
let marit: PersonActor
let axisId: number

beforeEach(() => {
  plant = openPlant()
  runa = plant.person('Runa Haldersen')
  marit = plant.person('Marit Lund', ['admin'])
  axisId = plant.axis('LID-02.Z')
  plant.fit(axisId, plant.unit('SN-0001'), start - 300 * day)
})
afterEach(() => plant.close())

const acts = (kind: HistoryKind, query = {}, as = runa) => listActs(plant.vault, as, { kind, ...query })
function send(thrustLimit: number) {
  plant.now += day
  return storeUpload(plant.vault, runa, { bytes: settingsFile({ setup: { thrustLimit }, exportedAt: iso(plant.now) }), name: 'lid.json' }, {})
}
function store(thrustLimit: number): number {
  const outcome = send(thrustLimit)
  if (outcome.outcome !== 'version') throw new Error(outcome.outcome)
  return outcome.answer.version.id
}

describe('acts beside settings', () => {
  it('say what a site watches now and watched before', () => {
    changeSite(plant.vault, runa, plant.siteId, { rev: 1, watched: ['jogSpeed'] })
    changeSite(plant.vault, runa, plant.siteId, { rev: 2, watched: ['jogSpeed', 'extra:K-017'], fourEyes: false })
    const { items } = acts('settings')
    expect(actsPage.safeParse({ items, next: null }).error).toBeUndefined()
    expect(items[0]).toMatchObject({ act: 'site-changed', subject: 'Larkfield', by: 'Runa Haldersen' })
    expect(items[0]!.changes).toEqual([{ field: 'fourEyes', before: true, after: false }, { field: 'watched', before: ['jogSpeed'], after: ['jogSpeed', 'extra:K-017'] }])
  })

  it('say what a nameplate said in the revision before', () => {
    const { id } = registerNameplate(plant.vault, runa, { model: 'HL40-200V', axisKind: 'linear', stroke: 200, ratedThrust: 640 })
    reviseNameplate(plant.vault, runa, id, { rev: 1, ratedThrust: 600 })
    expect(acts('nameplates').items.map(({ subject, changes }) => [subject, changes.filter(({ field }) => field !== 'model')])).toEqual([
      ['HL40-200V', [{ field: 'ratedThrust', before: 640, after: 600 }, { field: 'revision', before: 1, after: 2 }].sort((a, b) => (a.field < b.field ? 1 : -1))],
      ['HL40-200V', expect.arrayContaining([{ field: 'ratedThrust', before: undefined, after: 640 }])],
    ])
  })

  it('say that a rule ended, and why', () => {
    const { id } = makeRule(plant.vault, runa, { scope: 'site', scopeId: plant.siteId, field: 'thrustLimit', max: 45, reason: 'jars crack' })
    endRule(plant.vault, runa, id, { reason: 'thicker jars' })
    const [ended, made] = acts('rules').items
    expect(ended!.changes).toEqual(expect.arrayContaining([{ field: 'endReason', before: undefined, after: 'thicker jars' }]))
    expect(made).toMatchObject({ act: 'rule-made', subject: 'thrustLimit' })
  })

  it('say whose roles changed; only to those who see all sites', () => {
    const { id } = registerPerson(plant.vault, marit, { name: 'Ines Morel', email: 'ines@larkfield.example', roles: ['auditor'], siteIds: [] }, 'scrypt$1$a$b')
    changePerson(plant.vault, marit, id, { rev: 1, roles: ['auditor', 'planner'] }, null)
    const [changed] = acts('people').items
    expect(changed).toMatchObject({ subject: 'Ines Morel', by: 'Marit Lund', changes: [{ field: 'roles', before: ['auditor'], after: ['auditor', 'planner'] }] })
    expect(JSON.stringify(acts('people').items)).not.toMatch(/passwordHash|scrypt/i)
    expect(acts('people', {}, plant.person('Bound', ['auditor'], [plant.siteId])).items).toEqual([])
  })

  it('say which version was known-good before', () => {
    const v1 = store(38)
    markKnownGood(plant.vault, runa, v1, { meaning: 'approved' })
    plant.now += day
    markNone(plant.vault, runa, axisId, { meaning: 'reviewed', note: 'wrong jars' })
    expect(acts('marks').items.map(({ subject, changes, note }) => [subject, note, changes[0]])).toEqual([
      ['LID-02.Z', 'wrong jars', { field: 'known-good', before: 'v1', after: 'none' }],
      ['LID-02.Z', null, { field: 'known-good', before: undefined, after: 'v1' }],
    ])
    const { siteId } = plant.machineAt('Hollowbrook')
    expect(acts('marks', {}, plant.person('Bound', ['planner'], [siteId])).items).toEqual([])
    expect(acts('marks', {}, plant.person('Other', ['planner'], [plant.siteId])).items).toHaveLength(2)
  })

  it('come in pages and by time', () => {
    for (let rev = 1; rev <= 7; rev += 1) {
      changeSite(plant.vault, runa, plant.siteId, { rev, releaseHours: 24 + rev })
      plant.now += day
    }
    const hours = (query: object) => acts('settings', query).items.map(({ changes }) => changes[0]!.after)
    const first = acts('settings', { limit: 3 })
    expect(first.items.map(({ changes }) => changes[0]!.after)).toEqual([31, 30, 29])
    expect(hours({ limit: 3, cursor: first.next! })).toEqual([28, 27, 26])
    expect(hours({ from: iso(start + 2 * day), to: iso(start + 4 * day) })).toEqual([28, 27])
    expect(hours({ from: iso(start + 20 * day) })).toEqual([])
  })
})

describe('axes that were not read', () => {
  const tags = (query = {}, as = runa) => listNotRead(plant.vault, as, query).items.map(({ tag }) => tag)

  it('are those without a version and without a sighting in the time', () => {
    const { machineId, siteId } = plant.machineAt('Hollowbrook')
    plant.axis('JAR-01.X', { machineId })
    store(38)
    send(38)
    expect(notReadPage.safeParse(listNotRead(plant.vault, runa, {})).error).toBeUndefined()
    expect(tags({ from: iso(start), to: iso(start + day) })).toEqual(['LID-02.Z', 'JAR-01.X'])
    expect(tags({ from: iso(start + day), to: iso(start + day + 1) })).toEqual(['JAR-01.X'])
    expect(tags({ from: iso(start + 2 * day) })).toEqual(['JAR-01.X'])
    expect(tags({ from: iso(start + 2 * day + 1) })).toEqual(['LID-02.Z', 'JAR-01.X'])
    expect(tags({ site: siteId })).toEqual(['JAR-01.X'])
    expect(tags({ machine: plant.machineId, from: iso(start + 9 * day) })).toEqual(['LID-02.Z'])
    expect(tags({ axis: 'tag:LID-02.Z' })).toEqual([])
    expect(tags({}, plant.person('Bound', ['auditor'], [plant.siteId]))).toEqual([])
    const [page] = [listNotRead(plant.vault, runa, { from: iso(start + 9 * day), limit: 1 })]
    expect(page.items).toMatchObject([{ tag: 'LID-02.Z', machine: 'Lid press 1', lastUploadAt: iso(start + 2 * day) }])
    expect(listNotRead(plant.vault, runa, { from: iso(start + 9 * day), cursor: page.next! }).items).toMatchObject([{ tag: 'JAR-01.X', status: 'never-read', lastUploadAt: null }])
  })
})
