import { ruleSetVersion } from '../../../shared/checks/table'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import type { PersonActor } from '../../../server/database/actor'
import { makeTextKit, takeKit } from '../../../server/services/kit/make-kit'
import { assignFromTray } from '../../../server/services/tray/assign'
import { registerNameplate, reviseNameplate } from '../../../server/services/nameplates/nameplates'
import { previewUpload } from '../../../server/services/uploads/preview-upload'
import { storeUpload } from '../../../server/services/uploads/store-upload'
import { versionFile } from '../../../server/services/versions/version-file'
import { readVersion, versionRow } from '../../../server/services/versions/read-version'
import type { UploadFields } from '../../../shared/api/uploads'
import { readEntryFile } from '../../../shared/settings/entry-table/read-entry'
import { liftFile, liftLines, liftPlate } from '../../support/entry-table'
import { day, iso, minute, openPlant, settingsFile, start, type Plant } from '../../support/vault-plant'

const { model } = liftPlate
const serial = liftFile.unit.serial
const list = (lines: readonly string[] = liftLines) => Buffer.from(lines.join('\r\n'))
const fields: UploadFields = { layout: model, capturedAt: iso(start) }

let plant: Plant
let runa: PersonActor
let axisId: number
let plateId: number

beforeEach(() => {
  plant = openPlant()
  runa = plant.person('Runa Haldersen')
  axisId = plant.axis('LID-02.Z')
  plateId = registerNameplate(plant.vault, runa, liftPlate).id
  plant.fit(axisId, plant.unit(serial, { model, firmware: '1.4' }), start - 300 * day)
})
afterEach(() => plant.close())

const send = (bytes = list(), more: UploadFields = {}) => {
  plant.now += minute
  return storeUpload(plant.vault, runa, { bytes, name: 'list.csv' }, { ...fields, ...more })
}
function stored(bytes = list(), more: UploadFields = {}): number {
  const outcome = send(bytes, more)
  if (outcome.outcome !== 'version') throw new Error(JSON.stringify(outcome))
  return outcome.answer.version.id
}
const textOf = (bytes: Buffer) => bytes.toString('utf8')
const codeOf = (act: () => unknown) => {
  try {
    act()
  }
  catch (error) {
    return (error as { code?: string }).code
  }
  return undefined
}

describe('an upload in the layout of a model', () => {
  it('becomes a version with the neutral content, and says by which revision it was read', () => {
    const id = stored()
    const row = versionRow(plant.vault.db, id)
    expect(row).toMatchObject({ axisId, number: 1, model, firmware: '1.4', engine: `reader 1, difference 1, rules ${ruleSetVersion}, entry table of LT10-100 revision 1`, capturedAt: iso(start) })
    expect(textOf(versionFile(plant.vault, id, 'original').bytes)).toBe(textOf(list()))
    expect(JSON.parse(textOf(versionFile(plant.vault, id, 'json').bytes))).toMatchObject({ setup: liftFile.setup, moves: liftFile.moves, zones: liftFile.zones })
  })

  it('is the same content as the neutral form of it', () => {
    stored()
    const { setup, moves, zones, extra } = liftFile
    plant.now += minute
    const outcome = storeUpload(plant.vault, runa, { bytes: settingsFile({ serial, model, firmware: '1.4', setup, moves, zones, extra }), name: null }, {})
    expect(outcome.outcome).toBe('sighting')
  })

  it('is previewed by the same table, and writes nothing', () => {
    const before = plant.rows()
    expect(previewUpload(plant.vault, runa, { bytes: list(), name: null }, fields)).toMatchObject({ outcome: 'version', number: 1, axis: { id: axisId } })
    expect(plant.rows()).toEqual(before)
  })

  it('takes the serial from beside it where it holds none', () => {
    const without = list(liftLines.filter(line => !line.startsWith('P-01')))
    expect(send(without)).toMatchObject({ outcome: 'unreadable' })
    expect(stored(without, { serial })).toBeGreaterThan(0)
  })

  it('is kept in the tray with the lines that are wrong', () => {
    const outcome = send(list(liftLines.map(line => line.startsWith('K-003') ? 'K-003;Soft limit min;low;mm' : line)))
    expect(outcome).toMatchObject({ outcome: 'unreadable', refusal: { details: { errors: [{ code: 'number-syntax', line: 6, at: '/setup/softLimitMin' }] } } })
    expect(plant.rows()).toMatchObject({ tray: 1, version: 0 })
  })

  it('waits in the tray without an axis, and is read by its table again when it is given one', () => {
    const other = liftLines.map(line => line.startsWith('P-01') ? 'P-01;Serial;LT10-26-0002;' : line)
    const outcome = send(list(other))
    if (outcome.outcome !== 'tray') throw new Error(JSON.stringify(outcome))
    plant.now += minute
    const assigned = assignFromTray(plant.vault, runa, outcome.answer.tray, { axisId: plant.axis('LID-03.Z') })
    expect(assigned).toMatchObject({ version: { serial: 'LT10-26-0002', axisTag: 'LID-03.Z' } })
  })

  it.each(['[Backup of drive]', '{ drive list', ' [values'])('is a CSV for good, though it begins with %s', (head) => {
    reviseNameplate(plant.vault, runa, plateId, { rev: 1, entryTable: { ...liftPlate.entryTable, header: [head, 'No.;Parameter;Value;Unit'] } })
    const bytes = list([head, ...liftLines.slice(1)])
    const id = stored(bytes)
    const { mediaType, bytes: kept } = versionFile(plant.vault, id, 'original')
    expect({ mediaType, kept: textOf(kept), form: readVersion(plant.vault, id).upload.form }).toEqual({ mediaType: 'text/csv', kept: textOf(bytes), form: 'csv' })
    expect(send(list([head, ...liftLines.slice(1, -1), '9;;?;1;1;1;-;-;-'])).outcome).toBe('unreadable')
    expect(plant.vault.sqlite.prepare('SELECT DISTINCT form FROM upload').pluck().all()).toEqual(['csv'])
  })

  it.each(['HL99', 'LT20'])('is refused where %s has no table to read by', (layout) => {
    registerNameplate(plant.vault, runa, { model: 'LT20', axisKind: 'linear', stroke: 100 })
    const before = plant.rows()
    expect(() => send(list(), { layout })).toThrow(expect.objectContaining({ code: 'input', details: { errors: [expect.objectContaining({ at: '?layout', code: 'no-entry-table' })] } }))
    expect(plant.rows()).toEqual(before)
  })
})

describe('a file in the drive’s own list', () => {
  it('is the list that came', () => {
    const { bytes, name, mediaType } = versionFile(plant.vault, stored(), 'entry')
    expect(textOf(bytes).trimEnd()).toBe(textOf(list()))
    expect({ name, mediaType }).toEqual({ name: 'LID-02.Z-v1-list.csv', mediaType: 'text/csv; charset=utf-8' })
  })

  it('is another file once the table is another', () => {
    const id = stored()
    const before = versionFile(plant.vault, id, 'entry').etag
    reviseNameplate(plant.vault, runa, plateId, { rev: 1, entryTable: { ...liftPlate.entryTable, header: ['Values'] } })
    expect(versionFile(plant.vault, id, 'entry').etag).not.toBe(before)
    expect(textOf(versionFile(plant.vault, id, 'entry').bytes).split('\r\n')[0]).toBe('Values')
  })

  it('is refused for a model without a table', () => {
    const id = stored()
    reviseNameplate(plant.vault, runa, plateId, { rev: 1, entryTable: null })
    expect(codeOf(() => versionFile(plant.vault, id, 'entry'))).toBe('no-entry-table')
  })

  it('is refused where a value would be left out unseen', () => {
    plant.now += minute
    const outcome = storeUpload(plant.vault, runa, { bytes: settingsFile({ serial, model, setup: { jogSpeed: 25 } }), name: null }, {})
    if (outcome.outcome !== 'version') throw new Error(JSON.stringify(outcome))
    expect(() => versionFile(plant.vault, outcome.answer.version.id, 'entry')).toThrow(expect.objectContaining({ code: 'entry-table-unfit', message: expect.stringContaining('has no place for jogSpeed') }))
  })
})

describe('a kit in the drive’s own list', () => {
  const take = (to?: string) => takeKit(plant.vault, runa, makeTextKit(plant.vault, runa, axisId, { serial: to, form: 'entry', cautionsRead: true }))

  it('has the values for the unit that it is for', () => {
    stored()
    plant.unit('LT10-26-0007', { model, firmware: '1.4' })
    const kit = take('LT10-26-0007')
    const read = readEntryFile(kit.bytes, liftPlate, { exportedAt: iso(start) })
    expect(kit.name).toBe('LID-02.Z-v1-kit-list.csv')
    expect(read.ok && read.value.file).toMatchObject({ unit: { serial: 'LT10-26-0007' }, setup: liftFile.setup, moves: liftFile.moves })
  })

  it('may have its serial still to be written', () => {
    stored()
    expect(textOf(take().bytes)).toContain('P-01;Serial;TO-BE-WRITTEN;')
  })

  it('is by the table of the other model, and logged only if it was handed out', () => {
    stored()
    registerNameplate(plant.vault, runa, { model: 'LT20', axisKind: 'linear', stroke: 200 })
    plant.unit('LT20-0001', { model: 'LT20' })
    const entries = () => plant.rows().log_entry
    const before = entries()
    expect(codeOf(() => take('LT20-0001'))).toBe('no-entry-table')
    expect(entries()).toBe(before)
  })
})

describe('an entry table on a nameplate', () => {
  it('is refused with the place of what is wrong', () => {
    const entryTable = { ...liftPlate.entryTable, parameters: [{ number: '1', field: 'modulo' }] }
    expect(() => reviseNameplate(plant.vault, runa, plateId, { rev: 1, entryTable })).toThrow(expect.objectContaining({ code: 'input', details: { errors: [expect.objectContaining({ at: '/entryTable/parameters/0/field' })] } }))
  })

  it('is taken out row by row: a change gives the rows anew', () => {
    const entryTable = { ...liftPlate.entryTable, parameters: liftPlate.entryTable.parameters.slice(0, 3) }
    const revised = reviseNameplate(plant.vault, runa, plateId, { rev: 1, entryTable })
    expect(revised.nameplate.entryTable).toEqual(entryTable)
    expect(revised.revision).toBe(2)
  })
})
