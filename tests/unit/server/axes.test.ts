import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import type { PersonActor } from '../../../server/database/actor'
import { axisLife } from '../../../server/services/axes/life'
import { axisAsOf, listAxes, readAxis } from '../../../server/services/axes/read-axis'
import { readBoard } from '../../../server/services/board/board'
import { markKnownGood, markNone } from '../../../server/services/known-good/mark'
import { storeUpload } from '../../../server/services/uploads/store-upload'
import { judgingContext } from '../../../server/services/uploads/judging-context'
import { previewUpload } from '../../../server/services/uploads/preview-upload'
import { listVersions } from '../../../server/services/versions/read-version'
import { voidVersion } from '../../../server/services/versions/void-version'
import { versionChanges, versionPatch, versionText } from '../../../server/services/versions/version-changes'
import { versionFile } from '../../../server/services/versions/version-file'
import { readSettings } from '../../../shared/settings/read'
import { day, hour, iso, minute, openLidPlant, settingsFile, start, type FileParts, type Plant } from '../../support/vault-plant'

let plant: Plant
let runa: PersonActor
let tobias: PersonActor
let axisId: number

beforeEach(() => {
  ({ plant, runa, tobias, axisId } = openLidPlant({ uploadEveryHours: 24 }))
})
afterEach(() => plant.close())

function send(setup: object, rest: FileParts = {}) {
  plant.now += minute
  return storeUpload(plant.vault, tobias, { bytes: settingsFile({ setup, exportedAt: iso(plant.now), ...rest }), name: 'lid "2".json' }, {})
}
function store(setup: object, rest: FileParts = {}): number {
  const outcome = send(setup, rest)
  if (outcome.outcome !== 'version') throw new Error(JSON.stringify(outcome))
  return outcome.answer.version.id
}

describe('as of an instant', () => {
  it('gives what was current then by what had been received by then', () => {
    const v1 = store({ thrustLimit: 38 })
    const afterFirst = plant.now
    plant.now += day
    const v2 = store({ thrustLimit: 55 })
    const afterSecond = plant.now
    plant.now += day
    store({ thrustLimit: 40 }, { exportedAt: iso(afterFirst + hour) })
    voidVersion(plant.vault, runa, v2, 'wrong axis')
    const at = (time: number) => axisAsOf(plant.vault, axisId, iso(time)).version?.id ?? null
    expect(at(afterFirst - 1)).toBeNull()
    expect(at(afterFirst)).toBe(v1)
    expect(at(afterSecond - 1)).toBe(v1)
    expect(at(afterSecond)).toBe(v2)
    expect(at(plant.now - 1)).toBe(v2)
    expect(axisAsOf(plant.vault, axisId, iso(plant.now)).version).toMatchObject({ number: 3, current: true })
  })
})

describe('the life of an axis', () => {
  it('holds versions, marks, voidings and fittings, newest first, and pages without loss at one instant', () => {
    const v1 = store({ thrustLimit: 38 })
    markKnownGood(plant.vault, runa, v1, { meaning: 'approved', note: 'after service' })
    const v2 = store({ thrustLimit: 55 })
    voidVersion(plant.vault, runa, v2, 'wrong file')
    markNone(plant.vault, runa, axisId, { meaning: 'reviewed' })
    const all = axisLife(plant.vault, axisId, {}).items
    expect(all.map(({ kind, number }) => `${kind} ${number}`)).toEqual(['finding null', 'void 2', 'mark-none null', 'version 2', 'mark 1', 'version 1', 'fitted null'])
    expect(all[0]).toMatchObject({ findingId: 1, text: expect.stringMatching(/^LID-02\.Z thrust limit 38 → 55 %/) as string })
    expect(all[4]).toMatchObject({ by: 'Runa Haldersen', text: 'after service' })
    const paged = []
    for (let cursor: string | undefined, page = 0; page === 0 || cursor !== undefined; page += 1) {
      const { items, next } = axisLife(plant.vault, axisId, { limit: 1, cursor })
      paged.push(...items)
      cursor = next ?? undefined
    }
    expect(paged).toEqual(all)
    expect(() => axisLife(plant.vault, axisId, { cursor: 'x' })).toThrow(expect.objectContaining({ code: 'input' }))
  })
})

describe('versions', () => {
  it('are listed newest number first, by page', () => {
    for (let thrustLimit = 1; thrustLimit <= 5; thrustLimit += 1) store({ thrustLimit })
    const first = listVersions(plant.vault, axisId, { limit: 2 })
    expect(first.items.map(({ number }) => number)).toEqual([5, 4])
    expect(listVersions(plant.vault, axisId, { limit: 5, cursor: first.next ?? '' })).toMatchObject({ items: [{ number: 3 }, { number: 2 }, { number: 1 }], next: null })
  })

  it('hand out the original byte for byte, and both forms with the same content', () => {
    const bytes = settingsFile({ setup: { thrustLimit: 38 }, exportedAt: iso(plant.now + minute), readings: { hours: 8 } })
    const id = store({ thrustLimit: 38 }, { readings: { hours: 8 } })
    const original = versionFile(plant.vault, id, 'original')
    expect(original.bytes.equals(bytes)).toBe(true)
    expect(original).toMatchObject({ mediaType: 'application/json', name: 'lid "2".json' })
    const [json, csv] = (['json', 'csv'] as const).map(form => readSettings(versionFile(plant.vault, id, form).bytes))
    expect(json?.ok && json.value.file).toEqual(csv?.ok && csv.value.file)
    expect(json?.ok && json.value.file.readings).toEqual({ hours: 8 })
  })

  it('are compared, as a list, a patch and a text; the flat reading beside the renumbered one', () => {
    const move = (number: number, target: number) => ({ move: number, kind: 'absolute', target, speed: 100 + target, acceleration: 1000 })
    const a = store({ thrustLimit: 38 }, { moves: [move(0, 10), move(1, 20), move(2, 30)] })
    const b = store({ thrustLimit: 55 }, { moves: [move(0, 10), move(1, 15), move(2, 20), move(3, 30)] })
    const changes = versionChanges(plant.vault, tobias, a, b)
    expect(changes.compare).toBe('differs')
    expect(changes.changes[0]).toMatchObject({ field: 'thrustLimit', before: 38, after: 55 })
    expect(changes.renumbered).toMatchObject([{ first: 1, last: 2, by: 1 }])
    expect(changes.told?.changes.length).toBeLessThan(changes.changes.length)
    expect(versionChanges(plant.vault, tobias, a, a)).toMatchObject({ compare: 'identical', changes: [], renumbered: [] })
    expect(versionPatch(plant.vault, tobias, a, b)).toContainEqual({ op: 'replace', path: '/setup/thrustLimit', value: 55 })
    expect(versionText(plant.vault, tobias, a, b)).toContain('+setup,,thrustLimit,55,%')
  })

  it('of another site cannot be compared with', () => {
    const west = plant.machineAt('Larkfield West')
    const far = plant.axis('CAP-01.Z', { machineId: west.machineId })
    plant.fit(far, plant.unit('SN-0009'), start - 100 * day)
    const there = store({ thrustLimit: 1 }, { serial: 'SN-0009' })
    const here = store({ thrustLimit: 2 })
    const local = plant.person('Mira Lindqvist', ['technician'], [plant.siteId])
    expect(() => versionChanges(plant.vault, local, there, here)).toThrow(expect.objectContaining({ code: 'not-found' }))
    expect(listAxes(plant.vault, local, {}).items.map(({ tag }) => tag)).toEqual(['LID-02.Z'])
  })
})

describe('the board', () => {
  it('says what needs someone, worst first, and since when', () => {
    plant.nameplate({ model: 'HL40-200V', axisKind: 'linear', stroke: 200 })
    plant.axis('LID-03.Z')
    expect(readBoard(plant.vault, runa)).toMatchObject({ attention: [{ kind: 'never-read', count: 2 }] })
    const v1 = store({ softLimitMin: 0, softLimitMax: 180 })
    expect(readBoard(plant.vault, runa).attention.map(({ kind }) => kind)).toEqual(['unmarked', 'never-read'])
    markKnownGood(plant.vault, runa, v1, { meaning: 'approved' })
    const v2 = store({ softLimitMin: 0, softLimitMax: 250 })
    const offAt = iso(plant.now)
    send({}, { serial: 'SN-UNKNOWN' })
    plant.now += 25 * hour
    const board = readBoard(plant.vault, runa)
    expect(board.attention.map(({ kind, count }) => `${kind} ${count}`)).toEqual(['finding 2', 'stop-check 1', 'off-known-good 1', 'overdue 1', 'never-read 1', 'tray 1'])
    expect(board.attention[0]?.items[0]).toMatchObject({ tag: 'LID-02.Z', findingId: 1, text: expect.stringMatching(/^soft limit, max 180 → 250 mm, changed between .*; nobody has said why$/) as string })
    expect(board.attention[1]?.items[0]).toMatchObject({ tag: 'LID-02.Z', versionId: v2, knownGoodId: v1, text: expect.stringContaining('250') as string })
    expect(board.attention[2]).toMatchObject({ since: offAt, items: [{ text: 'soft limit, max 180 → 250 mm, against known-good v1' }] })
    expect(board.axes.find(({ id }) => id === axisId)).toMatchObject({ status: 'off', off: { harm: 1 }, sense: 'more', overdueSince: iso(Date.parse(offAt) + 24 * hour), knownGood: { number: 1 }, current: { number: 2 }, serial: 'SN-0001' })
    expect(board.log.entries).toBe(plant.rows().log)
  })

  it('names what is off in harm before what is off in motion, however long', () => {
    const other = plant.axis('LID-03.Z')
    plant.fit(other, plant.unit('SN-0002'), start - 300 * day)
    markKnownGood(plant.vault, runa, store({ smoothingTime: 4 }), { meaning: 'approved' })
    store({ smoothingTime: 5, jogSpeed: 10 })
    store({ smoothingTime: 6 })
    markKnownGood(plant.vault, runa, store({ thrustLimit: 38 }, { serial: 'SN-0002' }), { meaning: 'approved' })
    store({ thrustLimit: 55, smoothingTime: 1 }, { serial: 'SN-0002' })
    const off = readBoard(plant.vault, runa).attention.find(({ kind }) => kind === 'off-known-good')
    expect(off?.items.map(({ tag, text }) => `${tag}: ${text}`)).toEqual([
      'LID-03.Z: thrust limit 38 → 55 %, and 1 more, against known-good v1',
      'LID-02.Z: smoothing 4 → 6 ms, against known-good v1',
    ])
    expect(off?.since).toBe(off?.items[1]?.since)
  })

  it('shows the axes of one’s own sites only', () => {
    const west = plant.machineAt('Larkfield West')
    plant.axis('CAP-01.Z', { machineId: west.machineId })
    const far = plant.person('Jon Aas', ['planner'], [west.siteId])
    expect(readBoard(plant.vault, far).axes.map(({ tag }) => tag)).toEqual(['CAP-01.Z'])
  })
})

describe('before anything is sent', () => {
  it('a preview tells the outcome and writes nothing', () => {
    store({ thrustLimit: 38 })
    const before = plant.rows()
    const preview = (setup: object, serial = 'SN-0001') => previewUpload(plant.vault, tobias, { bytes: settingsFile({ setup, serial, exportedAt: iso(plant.now) }), name: null }, {})
    expect(preview({ thrustLimit: 55 })).toMatchObject({ outcome: 'version', number: 2, axis: { tag: 'LID-02.Z' }, changes: [{ field: 'thrustLimit' }] })
    expect(preview({ thrustLimit: 38 })).toMatchObject({ outcome: 'sighting', number: 1 })
    expect(preview({}, 'SN-7')).toMatchObject({ outcome: 'tray', problem: 'serial-unknown' })
    expect(() => previewUpload(plant.vault, tobias, { bytes: Buffer.from('{'), name: null }, {})).toThrow(expect.objectContaining({ code: 'settings-unreadable' }))
    expect(plant.rows()).toEqual(before)
  })

  it('the context of a serial is what the server would read it against', () => {
    plant.nameplate({ model: 'HL40-200V', axisKind: 'linear', stroke: 200 })
    const v1 = store({ thrustLimit: 38 })
    markKnownGood(plant.vault, runa, v1, { meaning: 'approved' })
    send({ thrustLimit: 38 })
    expect(judgingContext(plant.vault, tobias, { serial: 'sn-0001' })).toMatchObject({
      problem: null, registered: { model: 'HL40-200V' }, axis: { id: axisId, tag: 'LID-02.Z' }, nextNumber: 2, nameplate: { stroke: 200 },
      current: { versionId: v1, number: 1, sightings: 1, content: { setup: { thrustLimit: 38 } } }, knownGood: { versionId: v1, firmware: '2.4' },
    })
    expect(judgingContext(plant.vault, tobias, { serial: 'SN-7' })).toMatchObject({ problem: 'serial-unknown', axis: null })
    plant.unit('SN-8')
    expect(judgingContext(plant.vault, tobias, { serial: 'SN-8' })).toMatchObject({ problem: 'not-fitted', registered: { serial: 'SN-8' }, nameplate: { stroke: 200 } })
  })

  it('an axis tells its state, and a page of axes keeps to what was asked', () => {
    store({ thrustLimit: 38 })
    expect(readAxis(plant.vault, axisId)).toMatchObject({ status: 'unmarked', versions: 1, sightings: 0, unit: { serial: 'SN-0001' }, current: { number: 1 }, knownGood: null, overdueSince: null })
    expect(listAxes(plant.vault, runa, { machineId: 999 }).items).toEqual([])
    plant.axis('LID-03.Z')
    const page = listAxes(plant.vault, runa, { limit: 1 })
    expect(page.items.map(({ tag }) => tag)).toEqual(['LID-02.Z'])
    expect(listAxes(plant.vault, runa, { limit: 1, cursor: page.next ?? '' })).toMatchObject({ items: [{ tag: 'LID-03.Z', status: 'never-read' }], next: null })
  })
})
