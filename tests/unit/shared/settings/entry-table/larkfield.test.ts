import { describe, expect, it } from 'vitest'
import { plantFile, settingsFile } from '../../../../../scripts/demo-files'
import { entryLoss } from '../../../../../shared/diff/entry-loss'
import { nameplateSchema } from '../../../../../shared/settings/nameplate'
import { readEntryFile } from '../../../../../shared/settings/entry-table/read-entry'
import { readSettings } from '../../../../../shared/settings/read'
import { writeEntryCsv } from '../../../../../shared/settings/entry-table/write-entry'
import { schemaName, type SettingsFile } from '../../../../../shared/settings/types'

const plates = plantFile().nameplates.filter(({ entryTable }) => entryTable)
const plateOf = (model: string) => plates.find(plate => plate.model === model)!
const cases = plantFile().axes.filter(({ unit, tag }) => tag !== 'JAR-01.T' && plates.some(({ model }) => model === unit.model)).map(({ tag, unit }) => [tag, unit.model] as const)
function fileOf(tag: string) {
  const read = readSettings(Buffer.from(JSON.stringify(settingsFile(tag))))
  if (!read.ok) throw new Error(JSON.stringify(read.errors))
  return read.value.file
}
const linesOf = (file: SettingsFile) => writeEntryCsv(file, plateOf(file.unit.model)).split('\r\n')

/** The table of the jar line was never read in the demo; a table that turns without an end. */
const table: SettingsFile = {
  schema: schemaName, unit: { serial: 'HR40-25-00768', model: 'HR40', firmware: '3.12' }, exportedAt: '2024-12-02T08:00:00+01:00', axisKind: 'rotary',
  setup: { positiveDirection: 'counterclockwise', softLimitsActive: false, modulo: 360, homingMethod: 'index-pulse', homingDirection: 'positive', homingSpeed: 30, speedLimit: 300, inPositionWindow: 0.05, thrustLimit: 60, payloadInertia: 420, selectInputs: 2, nodeAddress: 14 },
  zones: [{ zone: 1, from: 355, to: 5 }], extra: { 'K-017': 15 }, readings: {},
  moves: [{ move: 0, kind: 'absolute', target: 0, turn: 'shortest', speed: 180, acceleration: 1800 }, { move: 1, label: 'Next jar', kind: 'relative', target: 60, speed: 240, acceleration: 1800, next: 1, dwell: 400 }],
}

describe('the entry tables of the invented models', () => {
  it('are those of a small cylinder, a slide with brake and a rotary table, each a sound nameplate', () => {
    expect(plates.map(({ model, axisKind, brakeFitted }) => [model, axisKind, brakeFitted])).toEqual([['HL25-060', 'linear', false], ['HL40-200V', 'linear', true], ['HR40', 'rotary', false]])
    for (const plate of plates) expect(nameplateSchema.safeParse(plate).error).toBeUndefined()
  })

  it.each(cases)('holds the file of %s without a loss: %s', (tag, model) => {
    expect(entryLoss(fileOf(tag), plateOf(model))).toEqual({ rounded: [], lost: [], fault: null })
  })

  it('have the numbers that stand on the sheet at the machine', () => {
    expect(linesOf(fileOf('LID-02.Z'))).toEqual(expect.arrayContaining(['K-001;Positive direction;0;', 'K-006;Homing method;2;', 'K-005;Home offset;0,45;mm', 'K-043;Node address;26;']))
    // 58 mm = 58,000 µm, 40 mm/s = 0.04 m/s, 25 % = 250 ‰.
    expect(linesOf(fileOf('JAR-01.S'))).toEqual(expect.arrayContaining(['P12,+,,Extend is', 'P15,58000,µm,Limit high', 'P19,0.0400,m/s,Home speed', 'P22,250,‰,Home force']))
  })

  it('turn into counts and revolutions, and back but for the digits of the ramps', () => {
    const lines = linesOf(table)
    // 360 deg / 0.005 deg = 72,000 counts; 300 deg/s = 50 rpm; 1800 deg/s² = 10 π rad/s².
    expect(lines.slice(0, 2)).toEqual(['[HR40 table]', 'No\tParameter\tValue'])
    expect(lines).toEqual(expect.arrayContaining(['107\tTurn wraps at\t72000', '114\tSpeed limit\t50.00', '1\tNext jar\tR\t.\t12000\t40.00\t31.416\t.\t.\t.\t1\t400']))
    const { lost, rounded, fault } = entryLoss(table, plateOf('HR40'))
    expect({ lost, fault, rounded: rounded.map(({ row, field }) => [row, field]) }).toEqual({ lost: [], fault: null, rounded: [[0, 'acceleration'], [1, 'acceleration']] })
    const back = readEntryFile(new TextEncoder().encode(lines.join('\r\n')), plateOf('HR40'), { exportedAt: table.exportedAt })
    expect(back.ok && back.value.content).toMatchObject({ setup: table.setup, zones: table.zones })
  })
})
