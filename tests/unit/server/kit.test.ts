import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import type { PersonActor } from '../../../server/database/actor'
import { makeTextKit, takeKit } from '../../../server/services/kit/make-kit'
import { markKnownGood } from '../../../server/services/known-good/mark'
import { storeUpload } from '../../../server/services/uploads/store-upload'
import { readVersion } from '../../../server/services/versions/read-version'
import { giveWaiver } from '../../../server/services/waivers/waivers'
import type { WaiverRecord } from '../../../shared/api/waivers'
import { coverOf } from '../../../shared/checks/waivers'
import { readSettings } from '../../../shared/settings/read'
import type { Nameplate } from '../../../shared/settings/nameplate'
import type { Content, SettingsFile } from '../../../shared/settings/types'
import { day, iso, minute, openLidPlant, settingsFile, start, type Plant } from '../../support/vault-plant'

let plant: Plant
let runa: PersonActor
let tobias: PersonActor
let axisId: number

beforeEach(() => {
  ({ plant, runa, tobias, axisId } = openLidPlant({ unit: { firmware: '2.4' } }))
})
afterEach(() => plant.close())

const setup = { thrustLimit: 38, homingMethod: 'absolute-encoder', homeOffset: 12.5, positionGain: 40, nodeAddress: 7, softLimitMin: 0, softLimitMax: 180 }
function store(values: object = setup, extra: object = {}): number {
  plant.now += minute
  const outcome = storeUpload(plant.vault, tobias, { bytes: settingsFile({ setup: values, extra }), name: null }, {})
  if (outcome.outcome !== 'version') throw new Error(JSON.stringify(outcome))
  return outcome.answer.version.id
}
const take = (serial?: string, form: 'json' | 'csv' = 'json') => takeKit(plant.vault, tobias, makeTextKit(plant.vault, tobias, axisId, { serial, form, cautionsRead: true }))
function read(bytes: Uint8Array): SettingsFile {
  const outcome = readSettings(bytes)
  if (!outcome.ok) throw new Error(JSON.stringify(outcome.errors))
  return outcome.value.file
}
const plate = (model: string, more: Partial<Nameplate> = {}): Nameplate => ({ model, axisKind: 'linear', stroke: 200, ...more })

describe('a kit', () => {
  it('for a registered unit leaves out what is taught, names it, and is a file of the format', () => {
    markKnownGood(plant.vault, runa, store(), { meaning: 'approved' })
    plant.unit('SN-0002', { firmware: '2.4' })
    plant.now += minute
    const kit = take('sn-0002')
    const file = read(kit.bytes)
    expect(kit).toMatchObject({ released: true, name: 'LID-02.Z-v1-kit.json', mediaType: 'application/json' })
    expect(file.unit).toEqual({ serial: 'SN-0002', model: 'HL40-200V', firmware: '2.4' })
    expect(file.setup).toEqual({ thrustLimit: 38, homingMethod: 'absolute-encoder', positionGain: 40, nodeAddress: 7, softLimitMin: 0, softLimitMax: 180 })
    expect(file.note).toBe('Kit for LID-02.Z: version 1, known-good by Runa Haldersen on 2026-03-01. To be taught on the new unit, left out here: homeOffset. To be proved at the machine: positionGain.')
    expect(file).toMatchObject({ exportedAt: iso(plant.now), exportedBy: 'Tobias Achterberg', readings: {} })
  })

  it('tells stops that somebody accepted apart from those that stand', () => {
    plant.nameplate(plate('HL40-200V', { maxSpeed: 100 }))
    store({ ...setup, softLimitMax: 300, jogSpeed: 120 })
    plant.unit('SN-0002', { firmware: '2.4' })
    const stops = () => read(take('SN-0002').bytes).note?.replace(/^.*left out here: homeOffset\. /, '')
    expect(stops()).toMatch(/^2 stop checks on this unit: /)
    const check = readVersion(plant.vault, 1).checks.find(({ rule }) => rule === 'travel-span')
    if (!check) throw new Error('no stop to accept')
    const value = coverOf(check, { axisKind: 'linear', extra: {}, moves: [], zones: [], setup: { ...setup, softLimitMax: 300 } } as Content) as WaiverRecord['value']
    giveWaiver(plant.vault, runa, { axisId, rule: check.rule, at: check.at, value, reason: 'long bracket', until: iso(start + 30 * day) })
    expect(stops()).toMatch(/^1 stop check on this unit: .*jog.* Accepted until 2026-03-31: .*300 mm/i)
  })

  it('of another firmware leaves the tuning to be taught too', () => {
    store()
    plant.unit('SN-0002', { firmware: '3.0' })
    const file = read(take('SN-0002').bytes)
    expect(file.setup).not.toHaveProperty('positionGain')
    expect(file.note).toContain('homeOffset, positionGain')
  })

  it('has both forms with the same content', () => {
    store()
    plant.unit('SN-0002', { firmware: '2.4' })
    expect(read(take('SN-0002', 'csv').bytes)).toEqual(read(take('SN-0002', 'json').bytes))
    expect(take('SN-0002', 'csv').mediaType).toBe('text/csv; charset=utf-8')
  })

  it('for a serial that is not registered holds the values as they stand', () => {
    store()
    const file = read(take('SN-9999').bytes)
    expect(file.unit).toEqual({ serial: 'SN-9999', model: 'HL40-200V' })
    expect(file.setup).toEqual(setup)
    expect(file.note).toContain('The unit is not registered')
  })

  it('without a serial cannot be read until one is written', () => {
    store()
    const { bytes } = take()
    expect(readSettings(bytes)).toMatchObject({ ok: false, errors: [{ at: '/unit/serial', code: 'missing' }], more: 0 })
    expect(read(Buffer.from(bytes.toString('utf8').replace('TO-BE-WRITTEN', 'SN-5'), 'utf8')).unit.serial).toBe('SN-5')
    expect(readSettings(take(undefined, 'csv').bytes)).toMatchObject({ ok: false, errors: [{ at: '/unit/serial', code: 'missing' }] })
  })

  it('without a known-good says that it is not released', () => {
    store()
    const kit = take('SN-9999')
    expect(kit.released).toBe(false)
    expect(read(kit.bytes).note).toContain('NOT RELEASED')
  })

  it('leaves out extra keys that the dictionary has taught', () => {
    plant.nameplate(plate('HL40-200V', { dictionary: { 'K-017': { carry: 'teach' } } }))
    store(setup, { 'K-017': 5, 'K-018': 6 })
    plant.unit('SN-0002', { firmware: '2.4' })
    const file = read(take('SN-0002').bytes)
    expect(file.extra).toEqual({ 'K-018': 6 })
    expect(file.note).toContain('extra:K-017')
  })

  it('is refused where percentages would mean other newtons, and both bases are named', () => {
    plant.nameplate(plate('HL40-200V', { ratedThrust: 400 }))
    plant.nameplate(plate('HL40-200W', { ratedThrust: 300, peakThrust: 500, forceBase: 'peak-thrust' }))
    plant.nameplate(plate('HL40-200S', { ratedThrust: 400 }))
    store()
    plant.unit('SN-W', { model: 'HL40-200W' })
    plant.unit('SN-S', { model: 'HL40-200S' })
    expect(() => take('SN-W')).toThrow(expect.objectContaining({ code: 'forces-differ', message: expect.stringMatching(/400 N on HL40-200V and 500 N on HL40-200W/) as string }))
    expect(read(take('SN-S').bytes).setup.thrustLimit).toBe(38)
    store({ softLimitMin: 0, softLimitMax: 100 })
    expect(read(take('SN-W').bytes).setup).toEqual({ softLimitMin: 0, softLimitMax: 100 })
  })

  it('warns where one of two models does not say what 100 % means, and of stop checks on the new unit', () => {
    plant.nameplate(plate('HL40-100', { stroke: 100 }))
    store()
    plant.unit('SN-100', { model: 'HL40-100' })
    const { note } = read(take('SN-100').bytes)
    expect(note).toContain('What 100 % of force means is not on the nameplate of HL40-200V and HL40-100')
    expect(note).toMatch(/1 stop check on this unit: .*180/)
  })

  it('for a unit of another kind of axis is refused', () => {
    plant.nameplate({ model: 'HR16', axisKind: 'rotary', stroke: 360 })
    store()
    plant.unit('SN-R', { model: 'HR16' })
    expect(() => take('SN-R')).toThrow(expect.objectContaining({ code: 'axis-kind' }))
  })

  it('is refused with the cautions unread, and where there is nothing to restore; taken kits are logged', () => {
    expect(() => makeTextKit(plant.vault, tobias, axisId, { form: 'json', cautionsRead: false })).toThrow(expect.objectContaining({ code: 'cautions-unread' }))
    expect(() => take()).toThrow(expect.objectContaining({ code: 'no-known-good' }))
    const versionId = store()
    const before = plant.rows().log ?? 0
    take('SN-9999')
    expect(plant.rows().log).toBe(before + 1)
    const leaf = JSON.parse(plant.vault.sqlite.prepare('SELECT leaf FROM log ORDER BY seq DESC LIMIT 1').pluck().get() as string) as object
    expect(leaf).toMatchObject({ act: 'kit-taken', subject: { kind: 'kit', id: axisId }, state: { versionId, serial: 'SN-9999', released: false } })
  })
})
