import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import type { PersonActor } from '../../../server/database/actor'
import { readAxis } from '../../../server/services/axes/read-axis'
import { readBoard } from '../../../server/services/board/board'
import { markKnownGood } from '../../../server/services/known-good/mark'
import { judgingContext } from '../../../server/services/uploads/judging-context'
import { previewUpload } from '../../../server/services/uploads/preview-upload'
import { storeUpload } from '../../../server/services/uploads/store-upload'
import { readVersion } from '../../../server/services/versions/read-version'
import { endWaiver, giveWaiver, listWaivers } from '../../../server/services/waivers/waivers'
import { coverOf } from '../../../shared/checks/waivers'
import type { Content } from '../../../shared/settings/types'
import type { WaiverRecord } from '../../../shared/api/waivers'
import { parseLeaf } from '../../../shared/trail/entry'
import { codeOf } from '../../support/codes'
import { day, iso, minute, openPlant, settingsFile, start, type Plant } from '../../support/vault-plant'

let plant: Plant
let runa: PersonActor
let tobias: PersonActor
let axisId: number

function stand(flags: ('gravity' | 'press')[] = [], stroke: number | null = 200) {
  plant = openPlant()
  runa = plant.person('Runa Haldersen')
  tobias = plant.person('Tobias Achterberg', ['technician'])
  axisId = plant.axis('LID-02.Z', { flags })
  plant.fit(axisId, plant.unit('SN-0001'), start - 300 * day)
  if (stroke !== null) plant.nameplate({ model: 'HL40-200V', axisKind: 'linear', stroke })
}
beforeEach(() => stand())
afterEach(() => plant.close())

function store(setup: object): number {
  plant.now += minute
  const outcome = storeUpload(plant.vault, tobias, { bytes: settingsFile({ setup }), name: null }, {})
  if (outcome.outcome !== 'version') throw new Error(JSON.stringify(outcome))
  return outcome.answer.version.id
}
/** What the screen sends for the first check of a version that can be accepted. */
function wordsFor(versionId: number, level: 'stop' | 'unknown' = 'stop') {
  const { content, checks } = readVersion(plant.vault, versionId)
  const check = checks.find(one => one.level === level && coverOf(one, content as unknown as Content))
  if (!check) throw new Error(`no ${level} to accept`)
  const value = coverOf(check, content as unknown as Content) as WaiverRecord['value']
  return { axisId, rule: check.rule, at: check.at, value, reason: 'bracket ordered', until: iso(start + 30 * day) }
}
const give = (versionId: number, level: 'stop' | 'unknown' = 'stop') => giveWaiver(plant.vault, runa, wordsFor(versionId, level)).id
const mark = (versionId: number) => markKnownGood(plant.vault, runa, versionId, { meaning: 'approved' })
const tooLong = { softLimitMin: 0, softLimitMax: 300 }
const stopsOnBoard = () => readBoard(plant.vault, runa).axes[0]?.checks.stop

describe('a waiver of a stop', () => {
  it('lets the version be marked, which was refused before', () => {
    const v1 = store(tooLong)
    expect(codeOf(() => mark(v1))).toBe('stop-checks')
    give(v1)
    expect(mark(v1)).toMatchObject({ id: expect.any(Number) })
  })

  it('is told beside the check, with who, until and why', () => {
    const v1 = store(tooLong)
    expect(readVersion(plant.vault, v1).checks.map(({ waived }) => waived)).toEqual(readVersion(plant.vault, v1).checks.map(() => null))
    const id = give(v1)
    expect(readVersion(plant.vault, v1).checks.find(({ level }) => level === 'stop')).toMatchObject({
      rule: 'travel-span', waived: { id, by: 'Runa Haldersen', givenAt: iso(plant.now), until: iso(start + 30 * day), reason: 'bracket ordered' },
    })
    expect(readVersion(plant.vault, v1).checkCounts.stop).toBe(1)
  })

  it('is left out of the board’s count and of what needs someone', () => {
    const v1 = store(tooLong)
    expect(stopsOnBoard()).toBe(1)
    expect(readBoard(plant.vault, runa).attention.map(({ kind }) => kind)).toContain('stop-check')
    give(v1)
    expect([stopsOnBoard(), readAxis(plant.vault, axisId).checks.stop]).toEqual([0, 0])
    expect(readBoard(plant.vault, runa).attention.map(({ kind }) => kind)).not.toContain('stop-check')
  })

  it('stands again at its end, without anybody doing anything', () => {
    const v1 = store(tooLong)
    give(v1)
    plant.now = start + 30 * day - 1
    expect([stopsOnBoard(), readVersion(plant.vault, v1).checks[0]?.waived?.by]).toEqual([0, 'Runa Haldersen'])
    plant.now = start + 30 * day
    expect([stopsOnBoard(), readVersion(plant.vault, v1).checks[0]?.waived]).toEqual([1, null])
    expect(codeOf(() => mark(v1))).toBe('stop-checks')
  })

  it('covers the next version too as long as the value stays, and not another value', () => {
    give(store(tooLong))
    const same = store({ ...tooLong, jogSpeed: 10 })
    expect(stopsOnBoard()).toBe(0)
    mark(same)
    const worse = store({ ...tooLong, softLimitMax: 301 })
    expect(stopsOnBoard()).toBe(1)
    expect(codeOf(() => mark(worse))).toBe('stop-checks')
  })

  it('is told in the answer to an upload, in its preview, and to who reads a file against the axis', () => {
    const id = give(store(tooLong))
    const waivedIn = (checks: readonly { rule: string, waived: { id: number } | null }[]) => checks.find(({ rule }) => rule === 'travel-span')?.waived?.id
    const sent = (setup: object) => ({ bytes: settingsFile({ setup }), name: null })
    const preview = previewUpload(plant.vault, tobias, sent({ ...tooLong, jogSpeed: 10 }), {})
    const outcome = storeUpload(plant.vault, tobias, sent({ ...tooLong, jogSpeed: 10 }), {})
    expect(preview.outcome === 'version' && waivedIn(preview.checks)).toBe(id)
    expect(outcome.outcome === 'version' && waivedIn(outcome.answer.checks)).toBe(id)
    const worse = previewUpload(plant.vault, tobias, sent({ ...tooLong, softLimitMax: 301 }), {})
    expect(worse.outcome === 'version' && worse.checks.find(({ rule }) => rule === 'travel-span')).toMatchObject({ level: 'stop', waived: null })
    expect(judgingContext(plant.vault, tobias, { serial: 'SN-0001' }).waivers.map(waiver => [waiver.id, waiver.rule, waiver.by])).toEqual([[id, 'travel-span', 'Runa Haldersen']])
    endWaiver(plant.vault, runa, id, { reason: 'bracket fitted' })
    expect(judgingContext(plant.vault, tobias, { serial: 'SN-0001' }).waivers).toEqual([])
  })

  it('of two the one that holds longest is told and counted', () => {
    const v1 = store(tooLong)
    give(v1)
    giveWaiver(plant.vault, runa, { ...wordsFor(v1), until: iso(start + 90 * day), reason: 'still ordered' })
    expect(readVersion(plant.vault, v1).checks[0]?.waived?.reason).toBe('still ordered')
    plant.now = start + 60 * day
    expect(stopsOnBoard()).toBe(0)
  })

  it('is taken back once, and then the stop stands again', () => {
    const v1 = store(tooLong)
    const id = give(v1)
    plant.now += minute
    expect(endWaiver(plant.vault, runa, id, { reason: 'bracket fitted' })).toMatchObject({ id, endedBy: 'Runa Haldersen', endReason: 'bracket fitted', endedAt: iso(plant.now) })
    expect(stopsOnBoard()).toBe(1)
    expect(codeOf(() => mark(v1))).toBe('stop-checks')
    expect(codeOf(() => endWaiver(plant.vault, runa, id, { reason: 'again' }))).toBe('already-ended')
    expect(codeOf(() => endWaiver(plant.vault, runa, 99, { reason: 'r' }))).toBe('not-found')
  })
})

describe('a waiver of what could not be judged', () => {
  it('lets a gravity axis be marked, whatever the values become', () => {
    plant.close()
    stand(['gravity'], null)
    const v1 = store({ softLimitMin: 0, softLimitMax: 100 })
    const waiting = () => readVersion(plant.vault, v1).checks.filter(check => check.level === 'unknown' && check.waived === null && coverOf(check, readVersion(plant.vault, v1).content as unknown as Content))
    expect(waiting().length).toBeGreaterThan(0)
    expect(codeOf(() => mark(v1))).toBe('stop-checks')
    for (const check of waiting()) giveWaiver(plant.vault, runa, { axisId, rule: check.rule, at: check.at, value: { level: 'unknown', missing: check.missing ?? [] }, reason: 'no nameplate to be had', until: iso(start + 30 * day) })
    expect(waiting()).toEqual([])
    mark(v1)
    const v2 = store({ softLimitMin: 0, softLimitMax: 110 })
    expect(mark(v2)).toMatchObject({ id: expect.any(Number) })
  })
})

describe('a waiver', () => {
  it('is listed for its axis, newest first and page by page, ended ones too', () => {
    const v1 = store(tooLong)
    const first = give(v1)
    endWaiver(plant.vault, runa, first, { reason: 'wrong end' })
    const second = give(v1)
    const { items, next } = listWaivers(plant.vault, axisId, { limit: 1 })
    expect([items.map(({ id }) => id), items[0]?.endedAt]).toEqual([[second], null])
    expect(items[0]).toMatchObject({ rule: 'travel-span', by: 'Runa Haldersen', value: { level: 'stop' }, reason: 'bracket ordered' })
    expect(listWaivers(plant.vault, axisId, { cursor: next ?? '' }).items.map(({ id, endReason }) => [id, endReason])).toEqual([[first, 'wrong end']])
    expect(listWaivers(plant.vault, plant.axis('LID-03.Z'), {}).items).toEqual([])
  })

  it('is logged whole, its end too', () => {
    const id = give(store(tooLong))
    endWaiver(plant.vault, runa, id, { reason: 'bracket fitted' })
    const entries = (plant.vault.sqlite.prepare('SELECT leaf FROM log ORDER BY seq').pluck().all() as string[]).map(parseLeaf).filter(({ subject }) => subject.kind === 'waiver')
    expect(entries.map(({ act, note, state }) => [act, note, state.endedAt])).toEqual([['waiver-given', 'bracket ordered', null], ['waiver-ended', 'bracket fitted', iso(plant.now)]])
    const row = plant.vault.sqlite.prepare('SELECT places, until_at FROM waiver WHERE id = ?').get(id) as { places: string, until_at: string }
    expect(entries[1]?.state).toMatchObject({ id, axisId, places: JSON.parse(row.places) as string[], untilAt: row.until_at, givenBy: runa.id, endedByPerson: runa.id, endReason: 'bracket fitted' })
  })

  it('is refused with an end that is past, for a rule that never stops, and for an axis of another site', () => {
    const words = wordsFor(store(tooLong))
    expect(codeOf(() => giveWaiver(plant.vault, runa, { ...words, until: iso(plant.now) }))).toBe('time-order')
    expect(codeOf(() => giveWaiver(plant.vault, runa, { ...words, rule: 'select-reach' }))).toBe('input')
    expect(codeOf(() => giveWaiver(plant.vault, runa, { ...words, rule: 'no-such-rule' }))).toBe('input')
    const elsewhere = plant.person('Mira Lindqvist', ['planner'], [plant.machineAt('Northfield').siteId])
    expect(codeOf(() => giveWaiver(plant.vault, elsewhere, words))).toBe('not-found')
    expect(plant.rows()).toMatchObject({ waiver: 0 })
  })

  it('keeps its end in UTC, however the zone was written', () => {
    const v1 = store(tooLong)
    giveWaiver(plant.vault, runa, { ...wordsFor(v1), until: '2026-04-01T00:00:00+02:00' })
    expect(listWaivers(plant.vault, axisId, {}).items[0]?.until).toBe('2026-03-31T22:00:00.000Z')
  })
})
