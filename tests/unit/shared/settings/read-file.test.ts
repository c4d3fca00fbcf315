import { describe, expect, it } from 'vitest'
import { fileKeys, readFile, unitKeys } from '../../../../shared/settings/read-file'
import { objectReadingOf } from '../../../support/settings-reading'

const least = {
  schema: 'witnessmark.axis-settings/1', unit: { serial: 'A1', model: 'HL40-200V' }, exportedAt: '2026-11-30T08:15:00+01:00', axisKind: 'linear',
}

function read(file: unknown) {
  const { reading, object, told } = objectReadingOf(typeof file === 'string' ? file : JSON.stringify(file))
  return { read: readFile(reading, object), told: told() }
}
const told = (changes: object) => read({ ...least, ...changes }).told

describe('a file', () => {
  it('with the least has all keys of content, empty', () => {
    expect(read(least)).toEqual({
      told: [],
      read: { file: { ...least, setup: {}, zones: [], moves: [], extra: {}, readings: {} }, content: { axisKind: 'linear', setup: {}, zones: [], moves: [], extra: {} } },
    })
  })

  it('has its optional keys where they are set, and not otherwise', () => {
    const file = read({ ...least, exportedBy: 'Runa Haldersen', note: 'one\ntwo', readings: { cycles: 5 } }).read?.file
    expect(file).toMatchObject({ exportedBy: 'Runa Haldersen', note: 'one\ntwo', readings: { cycles: 5 } })
    expect(Object.keys(read({ ...least, exportedBy: null, note: '' }).read?.file ?? {})).not.toContain('note')
  })

  it('keeps readings out of content', () => {
    const both = read({ ...least, extra: { K: 1 }, readings: { cycles: 5 } }).read
    expect(both?.content.extra).toEqual({ K: 1 })
    expect(JSON.stringify(both?.content)).not.toContain('cycles')
  })

  it.each(['schema', 'exportedAt', 'axisKind'])('needs %s', (key) => {
    expect(told({ [key]: undefined })).toEqual([`missing /${key}`])
    expect(told({ [key]: null })).toEqual([`missing /${key}`])
    expect(told({ [key]: '' })).toEqual([`missing /${key}`])
  })

  it.each(fileKeys.filter(key => !['schema', 'unit', 'exportedAt', 'axisKind'].includes(key)))('does not need %s', key => expect(told({ [key]: null })).toEqual([]))

  it('is not read where anything was reported', () => {
    expect(read({ ...least, extra: { ' K': 1 } }).read).toBeUndefined()
    expect(read({ ...least, more: 1 })).toEqual({ read: undefined, told: ['key-unknown /more'] })
  })
})

describe('schema', () => {
  it.each(['witnessmark.axis-settings/2', 'Witnessmark.axis-settings/1', 'x', 1, true])('%j is another version', (schema) => {
    expect(told({ schema })).toEqual(['schema-version /schema'])
  })
})

describe('unit', () => {
  const unit = { serial: 'A1', channel: 2, model: 'HL40-200V', firmware: '3.12', actuatorSerial: 'B2', actuatorModel: 'HL40-200' }

  it('has six keys', () => {
    expect(Object.keys(unit).sort()).toEqual([...unitKeys].sort())
    expect(read({ ...least, unit }).read?.file.unit).toEqual(unit)
  })

  it.each(['serial', 'model'])('needs its %s', key => expect(told({ unit: { ...unit, [key]: undefined } })).toEqual([`missing /unit/${key}`]))
  it('is missing as a whole', () => {
    expect(told({ unit: undefined })).toEqual(['missing /unit/serial', 'missing /unit/model'])
    expect(told({ unit: null })).toEqual(['missing /unit/serial', 'missing /unit/model'])
    expect(told({ unit: {} })).toEqual(['missing /unit/serial', 'missing /unit/model'])
  })

  it('is an object', () => expect(told({ unit: 'A1' })).toContain('json-syntax /unit'))

  it('keeps the serial as first written', () => expect(read({ ...least, unit: { ...unit, serial: 'hL40_X' } }).read?.file.unit.serial).toBe('hL40_X'))

  it.each([
    [{ serial: 'A 1' }, 'text-character /unit/serial'], [{ serial: 'A'.repeat(65) }, 'text-length /unit/serial'], [{ model: 'm'.repeat(65) }, 'text-length /unit/model'], [{ firmware: '1'.repeat(33) }, 'text-length /unit/firmware'],
    [{ channel: 256 }, 'number-range /unit/channel'], [{ channel: -1 }, 'number-range /unit/channel'], [{ channel: 1.5 }, 'number-range /unit/channel'], [{ channel: '1' }, 'number-range /unit/channel'],
    [{ firmware: 3.12 }, 'json-syntax /unit/firmware'], [{ colour: 'red' }, 'key-unknown /unit/colour'],
  ])('%j: %s', (change, problem) => expect(told({ unit: { ...unit, ...change } })).toEqual([problem]))
})

describe('exportedAt', () => {
  it('is kept as written', () => {
    for (const exportedAt of ['2026-11-30T08:15:00+01:00', '2026-11-30t07:15:00.5z', '2016-12-31T23:59:60Z']) {
      expect(read({ ...least, exportedAt }).read?.file.exportedAt).toBe(exportedAt)
    }
  })

  it.each(['2026-02-29T00:00:00Z', '2026-11-30', '2026-11-30T08:15:00', '30.11.2026 08:15', 'now'])('%s is no time with offset of a real day', (exportedAt) => {
    expect(told({ exportedAt })).toEqual(['text-character /exportedAt'])
  })
})

describe('what one section tells another', () => {
  const move = { move: 0, kind: 'absolute', target: 0, speed: 1, acceleration: 1, turn: 'shortest' }

  it('a modulo lets moves turn and zones wrap', () => {
    const zones = [{ zone: 1, from: 350, to: 10 }]
    expect(told({ axisKind: 'rotary', setup: { modulo: 360 }, moves: [move], zones })).toEqual([])
    expect(told({ axisKind: 'rotary', setup: {}, moves: [move], zones })).toEqual(['not-allowed-here /moves/0/turn', 'order /zones/0/from'])
  })

  it('a faulty modulo is one problem, not one for each move', () => {
    expect(told({ axisKind: 'rotary', setup: { modulo: 'x' }, moves: [move] })).toEqual(['number-syntax /setup/modulo'])
  })

  it('the axis kind counts wherever it stands in the file', () => {
    const { axisKind, ...rest } = least
    expect(read({ setup: { payloadMass: 2 }, ...rest, axisKind }).told).toEqual([])
    expect(read({ setup: { payloadMass: 2 }, ...rest, axisKind: 'rotary' }).told).toEqual(['not-allowed-here /setup/payloadMass'])
  })
})
