import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import type { PersonActor } from '../../../server/database/actor'
import { storeUpload, type UploadOutcome } from '../../../server/services/uploads/store-upload'
import type { UploadFields } from '../../../shared/api/uploads'
import { day, hour, iso, minute, openPlant, settingsFile, start, type FileParts, type Plant } from '../../support/vault-plant'

let plant: Plant
let runa: PersonActor
let axisId: number

beforeEach(() => {
  plant = openPlant()
  runa = plant.person('Runa Haldersen')
  axisId = plant.axis('LID-02.Z')
  plant.fit(axisId, plant.unit('SN-0001'), start - 300 * day)
})
afterEach(() => plant.close())

const send = (parts: FileParts, fields: UploadFields = {}): UploadOutcome => {
  plant.now += minute
  return storeUpload(plant.vault, runa, { bytes: settingsFile(parts), name: 'lid.json' }, fields)
}
const stored = (outcome: UploadOutcome) => {
  if (outcome.outcome !== 'version') throw new Error(`A version was expected, not ${outcome.outcome}: ${JSON.stringify(outcome)}`)
  return outcome.answer
}

describe('a file with an axis', () => {
  it('becomes version 1 with no changes, and the next one with its changes', () => {
    const first = stored(send({ setup: { thrustLimit: 38 } }, { reason: 'as delivered', workOrder: 'WO 4711' }))
    expect(first.version).toMatchObject({ number: 1, axisId, axisTag: 'LID-02.Z', serial: 'SN-0001', current: true, late: false, baseId: null, reason: 'as delivered', workOrder: 'WO 4711', storedBy: 'Runa Haldersen', occasion: 'routine' })
    expect(first.changes).toEqual([])
    const second = stored(send({ setup: { thrustLimit: 55 } }))
    expect(second.version).toMatchObject({ number: 2, baseId: first.version.id, baseNumber: 1, current: true, changes: { harm: 1, motion: 0, text: 0 } })
    expect(second.changes).toMatchObject([{ section: 'setup', field: 'thrustLimit', before: 38, after: 55, points: 17, weight: 'harm', watched: true }])
  })

  it('whose content is the current one is a sighting, unless the occasion is another', () => {
    const first = stored(send({ setup: { thrustLimit: 38 }, readings: { hours: 10 } }))
    const again = send({ setup: { thrustLimit: 38 }, readings: { hours: 11 }, exportedAt: iso(start + hour) })
    expect(again).toMatchObject({ outcome: 'sighting', answer: { version: { id: first.version.id, sightings: 1 } } })
    expect(stored(send({ setup: { thrustLimit: 38 } }, { occasion: 'as-left' })).version).toMatchObject({ number: 2, occasion: 'as-left' })
    expect(plant.rows()).toMatchObject({ version: 2, sighting: 1, content: 1, upload: 2 })
  })

  it('finds its axis by serial without case', () => {
    expect(stored(send({ serial: 'sn-0001' })).version).toMatchObject({ axisId, serial: 'SN-0001' })
  })

  it('captured before the current one is late: next number, not current, base by time', () => {
    const first = stored(send({ setup: { thrustLimit: 38 }, exportedAt: iso(start - 10 * day) }))
    const third = stored(send({ setup: { thrustLimit: 60 }, exportedAt: iso(start - 2 * day) }))
    const late = stored(send({ setup: { thrustLimit: 40 }, exportedAt: iso(start - 5 * day) }))
    expect(late.version).toMatchObject({ number: 3, late: true, current: false, baseId: first.version.id })
    expect(late.changes).toMatchObject([{ before: 38, after: 40 }])
    const next = stored(send({ setup: { thrustLimit: 61 }, exportedAt: iso(start - 1 * day) }))
    expect(next.version).toMatchObject({ number: 4, current: true, late: false, baseId: third.version.id })
  })

  it('older than all is late and has no base', () => {
    stored(send({ setup: { thrustLimit: 38 }, exportedAt: iso(start - 10 * day) }))
    const late = stored(send({ setup: { thrustLimit: 30 }, exportedAt: iso(start - 20 * day) }))
    expect(late.version).toMatchObject({ late: true, baseId: null })
    expect(late.changes).toEqual([])
  })

  it('with a doubtful clock goes by receipt, both times kept', () => {
    stored(send({ setup: { thrustLimit: 38 }, exportedAt: iso(start - day) }))
    const doubtful = stored(send({ setup: { thrustLimit: 39 }, exportedAt: '1970-01-01T00:00:00Z' }))
    expect(doubtful.version).toMatchObject({ number: 2, clockDoubtful: true, late: false, current: true, capturedAt: '1970-01-01T00:00:00.000Z', receivedAt: iso(plant.now) })
    const ahead = stored(send({ setup: { thrustLimit: 40 }, exportedAt: iso(plant.now + day) }))
    expect(ahead.version).toMatchObject({ number: 3, clockDoubtful: true, current: true })
    const after = stored(send({ setup: { thrustLimit: 41 }, exportedAt: iso(plant.now + 30_000) }))
    expect(after.version).toMatchObject({ number: 4, clockDoubtful: false, current: true })
  })

  it('takes captured-at from the sender before that of the file', () => {
    expect(stored(send({ exportedAt: iso(start - day) }, { capturedAt: '2026-02-20T10:00:00+01:00' })).version.capturedAt).toBe('2026-02-20T09:00:00.000Z')
  })

  it('goes to the axis where its unit sat when it was captured', () => {
    const other = plant.axis('LID-03.Z')
    const moved = plant.unit('SN-0002')
    plant.fit(other, moved, start - 100 * day, start - 50 * day)
    const third = plant.axis('LID-04.Z')
    plant.fit(third, moved, start - 50 * day)
    expect(stored(send({ serial: 'SN-0002', exportedAt: iso(start - 60 * day) })).version.axisId).toBe(other)
    expect(stored(send({ serial: 'SN-0002', exportedAt: iso(start - 40 * day) })).version.axisId).toBe(third)
  })

  it('from before its unit was fitted keeps its order on the first axis: an archive does not become current', () => {
    const other = plant.axis('LID-03.Z')
    const moved = plant.unit('SN-0002')
    plant.fit(other, moved, start - 100 * day, start - 50 * day)
    plant.fit(plant.axis('LID-04.Z'), moved, start - 50 * day)
    stored(send({ serial: 'SN-0002', exportedAt: iso(start - 60 * day), setup: { thrustLimit: 50 } }))
    const archived = stored(send({ serial: 'SN-0002', exportedAt: iso(start - 400 * day), setup: { thrustLimit: 38 } }))
    expect(archived.version).toMatchObject({ axisId: other, number: 2, late: true, current: false, clockDoubtful: false })
  })

  it('goes where its serial says though the sender named another axis, and the log says so', () => {
    plant.axis('LID-09.Z')
    expect(stored(send({}, { axis: 'tag:lid-09.z' })).version.axisId).toBe(axisId)
    const leaves = plant.vault.sqlite.prepare('SELECT leaf FROM log ORDER BY seq').pluck().all() as string[]
    expect(leaves.map(leaf => JSON.parse(leaf) as { act: string }).find(({ act }) => act === 'version-stored')).toMatchObject({ note: 'sent for LID-09.Z; stored at LID-02.Z, where its serial sits' })
  })

  it('tells rows renumbered from rows rewritten', () => {
    const move = (number: number, target: number) => ({ move: number, kind: 'absolute', target, speed: 100 + target, acceleration: 1000 })
    stored(send({ moves: [move(0, 10), move(1, 20), move(2, 30), move(3, 40)] }))
    const second = stored(send({ moves: [move(0, 10), move(1, 99), move(2, 20), move(3, 30), move(4, 40)] }))
    expect(second.renumbered).toMatchObject([{ first: 1, last: 3, by: 1, sure: true }])
  })

  it('is judged against the nameplate of the registered model, and what is a reading there leaves content', () => {
    plant.nameplate({ model: 'HL40-200V', axisKind: 'linear', stroke: 200, dictionary: { Cycles: { reading: true } } })
    const first = stored(send({ setup: { softLimitMin: 0, softLimitMax: 300 }, extra: { Cycles: 5 } }))
    expect(first.judged.nameplateRevision).toBe(1)
    expect(first.checks.map(({ rule, level }) => `${rule} ${level}`)).toContain('travel-span stop')
    expect(first.version.checks.stop).toBeGreaterThan(0)
    expect(send({ setup: { softLimitMin: 0, softLimitMax: 300 }, extra: { Cycles: 6 } }).outcome).toBe('sighting')
  })

  it('logs each thing it stores, in one write with one time', () => {
    send({ setup: { thrustLimit: 38 } })
    const leaves = (plant.vault.sqlite.prepare('SELECT leaf FROM log ORDER BY seq').pluck().all() as string[]).map(leaf => JSON.parse(leaf) as { act: string, at: string, actor: object })
    expect(leaves.map(({ act }) => act)).toEqual(['upload-received', 'content-stored', 'version-stored'])
    expect(new Set(leaves.map(({ at }) => at)).size).toBe(1)
    expect(leaves[0]?.actor).toEqual({ kind: 'person', id: runa.id, name: 'Runa Haldersen' })
  })

  it('keeps its changes as rows, what was not set as NULL', () => {
    send({ setup: { thrustLimit: 38, jogSpeed: 20 }, extra: { Filter: 'B' } })
    const { version } = stored(send({ setup: { thrustLimit: 55, speedLimit: 300 }, extra: { Filter: true } }))
    const rows = plant.vault.sqlite.prepare('SELECT seq, section, field, row, before, after, unit, delta, percent, points, weight, watched FROM change WHERE version_id = ? ORDER BY seq').all(version.id)
    const none = { row: null, delta: null, percent: null, points: null }
    expect(rows).toEqual([
      { ...none, seq: 0, section: 'setup', field: 'speedLimit', before: null, after: '300', unit: 'mm/s', weight: 'harm', watched: 1 },
      { ...none, seq: 1, section: 'setup', field: 'jogSpeed', before: '20', after: null, unit: 'mm/s', weight: 'harm', watched: 1 },
      { ...none, seq: 2, section: 'setup', field: 'thrustLimit', before: '38', after: '55', unit: '%', delta: 17, points: 17, weight: 'harm', watched: 1 },
      { ...none, seq: 3, section: 'extra', field: 'Filter', before: '"B"', after: 'true', unit: null, weight: 'motion', watched: 0 },
    ])
  })

  it('names a person by id, and refuses one that is not there', () => {
    const tobias = plant.person('Tobias Achterberg', ['technician'])
    expect(stored(send({}, { changedBy: `person:${tobias.id}`, allowedBy: 'shift lead' })).version).toMatchObject({ changedBy: 'Tobias Achterberg', allowedBy: 'shift lead' })
    expect(() => send({ setup: { jogSpeed: 3 } }, { changedBy: 'person:999' })).toThrow(expect.objectContaining({ code: 'input' }))
  })

  it('sent by a token is answered for by its owner', () => {
    const nightly = plant.token('Nightly export', runa)
    const outcome = storeUpload(plant.vault, nightly, { bytes: settingsFile(), name: null }, {})
    expect(stored(outcome).version.storedBy).toBe('Nightly export (Runa Haldersen)')
  })
})

describe('a file without an axis', () => {
  it('waits in the tray: unknown serial, unit not fitted, another kind of axis', () => {
    expect(send({ serial: 'SN-7777' })).toMatchObject({ outcome: 'tray', answer: { problem: 'serial-unknown' } })
    plant.unit('SN-0005')
    expect(send({ serial: 'SN-0005' })).toMatchObject({ outcome: 'tray', answer: { problem: 'not-fitted' } })
    expect(send({ axisKind: 'rotary' })).toMatchObject({ outcome: 'tray', answer: { problem: 'axis-kind' } })
    expect(plant.rows()).toMatchObject({ tray: 3, upload: 3, version: 0, sighting: 0, axis_state: 0 })
  })

  it('names the channels that are registered where the file names none', () => {
    plant.unit('DUO-1', { channel: 1 })
    plant.unit('DUO-1', { channel: 2 })
    const outcome = send({ serial: 'duo-1' })
    expect(outcome.outcome === 'tray' && outcome.answer.detail).toContain('1, 2')
  })

  it('of a unit at another site is unknown to a sender of this one', () => {
    const west = plant.machineAt('Larkfield West')
    const far = plant.axis('CAP-01.Z', { machineId: west.machineId })
    plant.fit(far, plant.unit('SN-0009'), start - 100 * day)
    const local = plant.person('Tobias Achterberg', ['technician'], [plant.siteId])
    const outcome = storeUpload(plant.vault, local, { bytes: settingsFile({ serial: 'SN-0009' }), name: null }, {})
    expect(outcome).toMatchObject({ outcome: 'tray', answer: { problem: 'serial-unknown' } })
    expect(plant.vault.sqlite.prepare('SELECT site_id FROM tray').pluck().get()).toBe(plant.siteId)
  })

  it('that cannot be read is kept with its errors and nothing else is written', () => {
    const before = plant.rows()
    const outcome = storeUpload(plant.vault, runa, { bytes: Buffer.from('{"schema": "witnessmark.axis-settings/1", "unit": {}}'), name: 'half.json' }, {})
    if (outcome.outcome !== 'unreadable') throw new Error(outcome.outcome)
    const { errors, more, tray } = outcome.refusal.details as { errors: { at: string, code: string }[], more: number, tray: number }
    expect(outcome.refusal.code).toBe('settings-unreadable')
    expect(errors.map(({ at, code }) => `${at} ${code}`)).toContain('/unit/serial missing')
    expect(more).toBe(0)
    expect(plant.vault.sqlite.prepare('SELECT problem FROM tray WHERE id = ?').pluck().get(tray)).toBe('unreadable')
    expect(plant.rows()).toEqual({ ...before, upload: 1, tray: 1, log: (before.log ?? 0) + 2 })
  })

  it('is kept whatever stands in it: half a character, control characters, bytes that are no text', () => {
    const file = (rest: string) => `{"schema":"witnessmark.axis-settings/1","unit":{"serial":"S","model":"M"},"exportedAt":"2026-11-30T08:15:00Z","axisKind":"linear",${rest}}`
    const bad = [
      file('"note":"\\ud83d"'), file('"exportedBy":"\\udc00 x"'), file('"extra":{"\\ud83d":1}'), file(`"exportedBy":"${'\u{1f529}'.repeat(90)}"`), file(`"extra":{"${'x\u{1f529}'.repeat(90)}":1}`),
      file('"\\ud83dkey":1'), file('"note":"\\u0000"'), file('"setup":{"homingMethod":"\\ud83d\\ud83d"}'), '\u0000\u0001', 'section,row,field,value,unit\nextra,,\u0000,1,\n', '',
    ].map(text => Buffer.from(text, 'utf8')).concat([Buffer.from([0xff, 0xfe, 0x00, 0xd8, 0x00, 0xd8]), Buffer.from([0x7b, 0xc3, 0x28])])
    for (const [index, bytes] of bad.entries()) {
      expect(storeUpload(plant.vault, runa, { bytes, name: null }, {}).outcome, `file ${index}`).toBe('unreadable')
    }
    expect(plant.rows()).toMatchObject({ tray: bad.length, upload: bad.length })
  })

  it('is told where it probably belongs by equal content', () => {
    const setup = Object.fromEntries(['softLimitMin', 'homingSpeed', 'speedLimit', 'jogSpeed', 'thrustLimit', 'overloadLevel', 'overloadTime', 'smoothingTime'].map((name, index) => [name, index + 1]))
    const moves = Array.from({ length: 8 }, (_, index) => ({ move: index, kind: 'absolute', target: index, speed: 10, acceleration: 100 }))
    send({ setup, moves })
    send({ serial: 'SN-0100', setup: { ...setup, homeOffset: 3 }, moves })
    expect(plant.vault.sqlite.prepare('SELECT guess_axis_id, guess_why FROM tray').get()).toMatchObject({ guess_axis_id: axisId, guess_why: '97.5 % of the values are equal' })
  })

  it('is refused when 2,000 files wait at the site already', () => {
    send({ serial: 'SN-7777' })
    plant.vault.sqlite.exec(`WITH RECURSIVE n(i) AS (SELECT 1 UNION ALL SELECT i + 1 FROM n WHERE i < 1999)
      INSERT INTO tray (upload_id, problem, detail) SELECT 1, 'unreadable', '' FROM n`)
    expect(() => send({ serial: 'SN-7778' })).toThrow(expect.objectContaining({ code: 'tray-full' }))
    expect(plant.rows()).toMatchObject({ tray: 2000, upload: 1 })
  })
})
