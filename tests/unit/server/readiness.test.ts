import { drizzle } from 'drizzle-orm/better-sqlite3'
import fc from 'fast-check'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import type { PersonActor } from '../../../server/database/actor'
import { readAxisRow } from '../../../server/database/axis-state/list'
import * as schema from '../../../server/database/schema'
import { readSpareFits } from '../../../server/database/spare-fit/queries'
import { listAxes, readAxis } from '../../../server/services/axes/read-axis'
import { readBoard } from '../../../server/services/board/board'
import { markKnownGood } from '../../../server/services/known-good/mark'
import { recordLabel } from '../../../server/services/labels/print-label'
import { changeAxis } from '../../../server/services/places/axes'
import { changeSite } from '../../../server/services/places/sites'
import { lacksOf, monthsAfter, standsUntil, type ReadinessFacts } from '../../../server/services/readiness/lacks'
import { registerNameplate } from '../../../server/services/nameplates/nameplates'
import { settleFits, startFits } from '../../../server/services/readiness/keep-fits'
import { readStock } from '../../../server/services/readiness/stock'
import { endRule, makeRule } from '../../../server/services/rules/rules'
import { sparesFor } from '../../../server/services/swaps/spares'
import { readVersion, versionRow } from '../../../server/services/versions/read-version'
import { giveWaiver } from '../../../server/services/waivers/waivers'
import { changeUnit, registerUnit } from '../../../server/services/units/units'
import { storeUpload } from '../../../server/services/uploads/store-upload'
import type { WaiverRecord } from '../../../shared/api/waivers'
import { coverOf } from '../../../shared/checks/waivers'
import { day, hour, iso, minute, openPlant, settingsFile, start, type Plant } from '../../support/vault-plant'

const ready: ReadinessFacts = {
  tag: 'LID-02.Z', markedAt: '2026-01-31T06:00:00.000Z', knownGoodMonths: 1, lastHeardAt: '2026-02-20T06:00:00.000Z', uploadEveryHours: 24,
  backups: 1, attachmentWanted: true, labelTag: 'LID-02.Z', labelWanted: true,
}
const at = '2026-02-21T06:00:00.000Z'
const after = (instant: string) => new Date(Date.parse(instant) + 1).toISOString()

describe('what an axis lacks', () => {
  it('is nothing where all is there', () => expect(lacksOf(ready, true, at)).toEqual([]))

  it.each<[string, Partial<ReadinessFacts> & { spare?: boolean }, string[]]>([
    ['no known-good', { markedAt: null }, ['no-known-good']],
    ['no spare', { spare: false }, ['no-spare']],
    ['no backup though the site wants one', { backups: 0 }, ['no-attachment']],
    ['no backup, and none wanted', { backups: 0, attachmentWanted: false }, []],
    ['no label', { labelTag: null }, ['no-label']],
    ['no label, and none wanted', { labelTag: null, labelWanted: false }, []],
    ['a label of an earlier tag', { labelTag: 'LID-02.Y' }, ['no-label']],
    ['a label in other case: the same tag', { labelTag: 'lid-02.z' }, []],
    ['never due', { uploadEveryHours: null, lastHeardAt: '2020-01-01T00:00:00.000Z' }, []],
    ['everything', { markedAt: null, spare: false, backups: 0, labelTag: null, uploadEveryHours: 1 }, ['no-known-good', 'overdue', 'no-spare', 'no-attachment', 'no-label']],
  ])('%s', (_what, { spare = true, ...facts }, wanted) => expect(lacksOf({ ...ready, ...facts }, spare, at)).toEqual(wanted))

  it('begins to the millisecond after its time, not at it', () => {
    const due = '2026-02-21T06:00:00.000Z'
    expect(lacksOf(ready, true, due)).toEqual([])
    expect(lacksOf(ready, true, after(due))).toEqual(['overdue'])
    // One month after 31 January is the last day of February.
    const old = { ...ready, uploadEveryHours: null }
    expect(lacksOf(old, true, '2026-02-28T06:00:00.000Z')).toEqual([])
    expect(lacksOf(old, true, after('2026-02-28T06:00:00.000Z'))).toEqual(['too-old'])
    expect([at, due, after(due), after('2026-02-28T06:00:00.000Z')].map(now => standsUntil(ready, now))).toEqual([due, due, '2026-02-28T06:00:00.000Z', null])
  })
})

describe('months after a day', () => {
  it.each([
    ['2026-01-31T06:00:00.000Z', 1, '2026-02-28T06:00:00.000Z'],
    ['2024-01-31T06:00:00.000Z', 1, '2024-02-29T06:00:00.000Z'],
    ['2026-11-30T06:00:00.000Z', 3, '2027-02-28T06:00:00.000Z'],
    ['2026-03-15T23:59:59.999Z', 24, '2028-03-15T23:59:59.999Z'],
    ['2024-02-29T00:00:00.000Z', 12, '2025-02-28T00:00:00.000Z'],
  ])('%s and %i months is %s', (from, months, to) => expect(monthsAfter(from, months)).toBe(to))

  it('never runs into the month after', () => {
    fc.assert(fc.property(fc.date({ min: new Date('2000-01-01'), max: new Date('2060-01-01'), noInvalidDate: true }), fc.integer({ min: 1, max: 120 }), (date, months) => {
      const later = new Date(monthsAfter(date.toISOString(), months))
      const passed = (later.getUTCFullYear() - date.getUTCFullYear()) * 12 + later.getUTCMonth() - date.getUTCMonth()
      expect(passed).toBe(months)
      expect(later.getUTCDate()).toBeLessThanOrEqual(date.getUTCDate())
    }))
  })
})

describe('on the plant', () => {
  let plant: Plant
  let runa: PersonActor
  let tobias: PersonActor
  let axisId: number

  beforeEach(() => {
    plant = openPlant()
    runa = plant.person('Runa Haldersen')
    tobias = plant.person('Tobias Achterberg', ['technician'])
    axisId = plant.axis('LID-02.Z', { uploadEveryHours: 26 })
    const fitted = plant.unit('SN-0001')
    plant.vault.sqlite.exec(`UPDATE unit SET state = 'fitted' WHERE id = ${fitted}`)
    plant.fit(axisId, fitted, start - 300 * day)
  })
  afterEach(() => plant.close())

  const lacks = () => readAxis(plant.vault, axisId).readiness.lacks
  function store(): number {
    plant.now += minute
    const outcome = storeUpload(plant.vault, tobias, { bytes: settingsFile({ setup: { thrustLimit: 38 } }), name: null }, {})
    if (outcome.outcome !== 'version') throw new Error(outcome.outcome)
    return outcome.answer.version.id
  }

  const stocked = (serial: string, more: object = {}) => registerUnit(plant.vault, runa, { serial, model: 'HL40-200V', ...more }).id
  const markNewest = () => markKnownGood(plant.vault, runa, store(), { meaning: 'approved' })

  it('each thing that is put right goes from the list, and comes back with its time', () => {
    expect(lacks()).toEqual(['no-known-good', 'overdue', 'no-spare', 'no-label'])
    const versionId = store()
    expect(lacks()).toEqual(['no-known-good', 'no-spare', 'no-label'])
    markKnownGood(plant.vault, runa, versionId, { meaning: 'approved' })
    plant.unit('SN-0002')
    recordLabel(plant.vault, tobias, axisId, { size: '50x25' })
    expect(readAxis(plant.vault, axisId).readiness).toEqual({ ready: true, lacks: [] })
    plant.now += 26 * hour + 1
    expect(lacks()).toEqual(['overdue'])
    changeAxis(plant.vault, runa, axisId, { rev: 1, tag: 'LID-02.Z2', uploadEveryHours: null })
    expect(lacks()).toEqual(['no-label'])
    plant.now += 800 * day
    expect(lacks()).toEqual(['too-old', 'no-label'])
  })

  it('asks for a backup and a label where the site wants them', () => {
    markKnownGood(plant.vault, runa, store(), { meaning: 'approved' })
    plant.unit('SN-0002')
    changeSite(plant.vault, runa, plant.siteId, { rev: 1, attachmentWanted: true, labelWanted: false })
    expect(lacks()).toEqual(['no-attachment'])
  })

  it('counts a spare that lies at the site or at none, of the model that is fitted, and in stock', () => {
    store()
    const elsewhere = plant.machineAt('Ostfield')
    stocked('SN-0002', { siteId: elsewhere.siteId })
    stocked('SN-0003', { model: 'HL25-150' })
    expect(lacks()).toContain('no-spare')
    const spare = stocked('SN-0004', { siteId: plant.siteId })
    expect(lacks()).not.toContain('no-spare')
    changeUnit(plant.vault, runa, spare, { rev: 1, state: 'repair' })
    expect(lacks()).toContain('no-spare')
    stocked('SN-0005')
    expect(lacks()).not.toContain('no-spare')
  })

  it('counts a spare of another model where it fits by the rules of a swap, rescaled or not', () => {
    const plate = (model: string, ratedThrust: number, stroke = 200) => ({ model, axisKind: 'linear' as const, stroke, ratedThrust, peakThrust: 3 * ratedThrust })
    registerNameplate(plant.vault, runa, plate('HL40-200V', 640))
    markNewest()
    const spare = stocked('SN-0009', { model: 'HL50-200V' })
    expect(lacks()).toContain('no-spare')
    registerNameplate(plant.vault, runa, plate('HL50-200V', 800))
    expect(lacks()).not.toContain('no-spare')
    changeUnit(plant.vault, runa, spare, { rev: 1, state: 'scrapped' })
    expect(lacks()).toContain('no-spare')
    // 38 % of 640 N are 243.2 N, which a unit of 60 N rated and 180 N peak cannot do.
    stocked('SN-0010', { model: 'HL16-200V' })
    registerNameplate(plant.vault, runa, plate('HL16-200V', 60))
    expect(lacks()).toContain('no-spare')
  })

  it('means what the finder of a swap means, a stop check on the very model included, and follows rules and waivers', () => {
    registerNameplate(plant.vault, runa, { model: 'HL40-200V', axisKind: 'linear', stroke: 200, ratedThrust: 640, peakThrust: 1600 })
    const rule = makeRule(plant.vault, runa, { scope: 'axis', scopeId: axisId, field: 'thrustLimit', max: 30, reason: 'jars crack' })
    const versionId = store()
    stocked('SN-0002')
    const goes = { replaced: 'unit', putBack: false, facts: {} } as const
    const found = () => sparesFor(plant.vault.db, axisId, versionRow(plant.vault.db, versionId), goes, iso(plant.now)).map(({ serial, fit }) => [serial, fit])
    const rest = ['no-known-good', 'no-label']
    const lacking = [rest[0], 'no-spare', rest[1]]
    expect([found(), lacks()]).toEqual([[['SN-0002', 'unfit']], lacking])
    const check = readVersion(plant.vault, versionId).checks.find(({ level }) => level === 'stop')
    if (!check) throw new Error('no stop to accept')
    giveWaiver(plant.vault, runa, { axisId, rule: check.rule, at: check.at, value: coverOf(check, { axisKind: 'linear', extra: {}, moves: [], zones: [], setup: { thrustLimit: 38 } }) as WaiverRecord['value'], reason: 'until the new jars come', until: iso(plant.now + day) })
    expect([found(), lacks()]).toEqual([[['SN-0002', 'same']], rest])
    plant.now += day
    expect([found(), lacks()]).toEqual([[['SN-0002', 'unfit']], lacking])
    endRule(plant.vault, runa, rule.id, { reason: 'thicker jars' })
    expect([found(), lacks()]).toEqual([[['SN-0002', 'same']], rest])
  })

  it('of more axes than one answer works out says what was known before, and is settled beside', async () => {
    markNewest()
    stocked('SN-0002')
    const now = () => iso(plant.now)
    const row = () => readAxisRow(plant.vault.db, axisId)!
    expect(readStock(plant.vault.db, now(), 0).spareFor(row())).toEqual({ fits: false, settled: false })
    expect(await settleFits(plant.vault)).toBe(1)
    expect(readStock(plant.vault.db, now(), 0).spareFor(row())).toEqual({ fits: true, settled: true })
    expect(await settleFits(plant.vault)).toBe(0)
    const kept = () => readSpareFits(plant.vault.db).map(({ kind, fits }) => [kind, fits])
    expect(kept()).toEqual([['["HL40-200V",null,null]', true]])
    // It is judged by more now: what was known holds until it is worked out anew.
    makeRule(plant.vault, runa, { scope: 'site', scopeId: plant.siteId, field: 'thrustLimit', max: 90, reason: 'jars crack' })
    expect(readStock(plant.vault.db, now(), 0).spareFor(row())).toEqual({ fits: true, settled: false })
    expect(await settleFits(plant.vault)).toBe(1)
    expect(readSpareFits(plant.vault.db)).toHaveLength(1)
    // While the process runs it is kept by itself; a stop lets the axis that it is at come to its end.
    makeRule(plant.vault, runa, { scope: 'site', scopeId: plant.siteId, field: 'thrustLimit', max: 80, reason: 'jars crack' })
    const keeper = startFits({ vault: plant.vault, logger: { error: (problem: unknown) => { throw new Error(String(problem)) } } })
    await expect.poll(() => readSpareFits(plant.vault.db)[0]?.terms).toMatch(/\d+ \d+/)
    await keeper.stop()
    // Another process reads what was kept.
    expect(readStock(drizzle(plant.vault.sqlite, { schema }), now(), 0).spareFor(row())).toEqual({ fits: true, settled: true })
  })

  it('is the same in a list, alone and on the board', () => {
    markKnownGood(plant.vault, runa, store(), { meaning: 'approved' })
    const alone = readAxis(plant.vault, axisId).readiness.lacks
    expect(alone).toEqual(['no-spare', 'no-label'])
    expect(listAxes(plant.vault, runa, {}).items.map(({ readiness }) => readiness.lacks)).toEqual([alone])
    expect(readBoard(plant.vault, runa).axes.map(axis => axis.lacks)).toEqual([alone])
  })
})
