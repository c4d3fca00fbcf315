import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import type { PersonActor } from '../../../server/database/actor'
import { judgeVersion } from '../../../server/services/judging/judge-again'
import { rescalingConfirmed } from '../../../server/services/forces/rescaling'
import { judgingContext } from '../../../server/services/uploads/judging-context'
import { storeUpload } from '../../../server/services/uploads/store-upload'
import { voidVersion } from '../../../server/services/versions/void-version'
import { day, hour, iso, minute, openPlant, settingsFile, start, type Plant } from '../../support/vault-plant'

/*
 * A unit of 640 N fails and one of 800 N takes its place: 38 % was 243.2 N and would be 304 N.
 */

let plant: Plant
let runa: PersonActor
let axisId: number

beforeEach(() => {
  plant = openPlant()
  runa = plant.person('Runa Haldersen')
  axisId = plant.axis('LID-02.Z')
  plant.nameplate({ model: 'HL40-200V', axisKind: 'linear', stroke: 200, ratedThrust: 640 })
  plant.nameplate({ model: 'HL50-200V', axisKind: 'linear', stroke: 200, ratedThrust: 800 })
  plant.fit(axisId, plant.unit('SN-OLD'), start - 300 * day, start + hour)
  plant.now = start + minute
  send('SN-OLD', 'HL40-200V', { thrustLimit: 38 })
})
afterEach(() => plant.close())

function send(serial: string, model: string, setup: object, at = plant.now) {
  const outcome = storeUpload(plant.vault, runa, { bytes: settingsFile({ serial, model, setup, exportedAt: iso(at) }), name: null }, { occasion: 'as-left' })
  if (outcome.outcome !== 'version') throw new Error(JSON.stringify(outcome))
  return outcome.answer
}
function swapFor(model: string, serial = 'SN-NEW'): void {
  plant.now = start + 2 * hour
  plant.fit(axisId, plant.unit(serial, { model }), start + hour)
}
const rescale = (checks: readonly { rule: string, level: string, message: string }[]) => checks.filter(({ rule }) => rule === 'force-rescale').map(({ level, message }) => `${level}: ${message}`)
const stop = 'stop: 100 % meant 640 N on the unit that the values come from and means 800 N on this one: thrust limit 38 % was 243.2 N and would be 304 N.'

describe('percentages brought from another unit', () => {
  it('stop where they read the same and mean another force', () => {
    swapFor('HL50-200V')
    expect(rescale(send('SN-NEW', 'HL50-200V', { thrustLimit: 38 }).checks)).toEqual([stop])
  })

  it('still do after the next upload, and when the version is judged again', () => {
    swapFor('HL50-200V')
    send('SN-NEW', 'HL50-200V', { thrustLimit: 38 })
    plant.now += minute
    const next = send('SN-NEW', 'HL50-200V', { thrustLimit: 38, jogSpeed: 20 })
    expect(rescale(next.checks)).toEqual([stop])
    expect(rescale(judgeVersion(plant.vault, runa, next.version.id).checks)).toEqual([stop])
  })

  it('are silent once they were worked out anew', () => {
    swapFor('HL50-200V')
    expect(rescale(send('SN-NEW', 'HL50-200V', { thrustLimit: 30.4 }).checks)).toEqual([])
  })

  it('are silent on another unit of the same model, and with the same base', () => {
    swapFor('HL40-200V')
    expect(rescale(send('SN-NEW', 'HL40-200V', { thrustLimit: 38 }).checks)).toEqual([])
    plant.nameplate({ model: 'HL41-200V', axisKind: 'linear', stroke: 200, peakThrust: 640, forceBase: 'peak-thrust' })
    plant.vault.sqlite.prepare('UPDATE fitting SET to_at = ? WHERE to_at IS NULL').run(iso(start + 2 * hour))
    plant.fit(axisId, plant.unit('SN-THIRD', { model: 'HL41-200V' }), start + 2 * hour)
    plant.now = start + 3 * hour
    expect(rescale(send('SN-THIRD', 'HL41-200V', { thrustLimit: 38 }).checks)).toEqual([])
  })

  it('are not judged where a nameplate does not say what 100 % means', () => {
    swapFor('HL60-200V')
    expect(rescale(send('SN-NEW', 'HL60-200V', { thrustLimit: 38 }).checks)).toEqual(['unknown: What the percentages mean cannot be judged without nameplate.ratedThrust.'])
  })

  it('do not come from a version that is void', () => {
    const other = send('SN-OLD', 'HL40-200V', { thrustLimit: 99 }, plant.now + minute)
    voidVersion(plant.vault, runa, other.version.id, 'read from the wrong drive')
    swapFor('HL50-200V')
    expect(rescale(send('SN-NEW', 'HL50-200V', { thrustLimit: 99 }).checks)).toEqual([])
  })

  it('are told to who reads a file before it is sent', () => {
    swapFor('HL50-200V')
    expect(judgingContext(plant.vault, runa, { serial: 'SN-NEW' }).broughtFrom).toMatchObject({ forceBase: 640, rescaled: false, content: { setup: { thrustLimit: 38 } } })
    expect(judgingContext(plant.vault, runa, { serial: 'SN-NEW' }).axis).toMatchObject({ controllerScanMs: null })
    expect(rescalingConfirmed(plant.vault.db, { axisId, unitId: 2 })).toBe(false)
  })
})

describe('the scan of the controller', () => {
  it('is part of what the start is judged by', () => {
    plant.nameplate({ model: 'HL45', axisKind: 'linear', stroke: 200, inputFilterTime: 2 })
    swapFor('HL45')
    plant.vault.sqlite.prepare('UPDATE machine SET controller_scan_ms = 10').run()
    const timing = send('SN-NEW', 'HL45', { startPulseTime: 8 }).checks.filter(({ rule, level }) => rule === 'start-timing' && level === 'warn')
    expect(timing.map(({ values }) => values)).toEqual([{ value: 8, least: 12, filter: 2, scan: 10 }])
  })
})
