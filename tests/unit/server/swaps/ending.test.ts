import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { markKnownGood } from '../../../../server/services/known-good/mark'
import { readAxis } from '../../../../server/services/axes/read-axis'
import { abandonSwap, putOldUnitBack } from '../../../../server/services/swaps/ending'
import { swapOf } from '../../../../server/services/swaps/list-swaps'
import { readSwapKit } from '../../../../server/services/swaps/swap-kit'
import { readUnit } from '../../../../server/services/units/units'
import { codeOf } from '../../../support/codes'
import { iso } from '../../../support/vault-plant'
import { setup, swapPlant } from '../../../support/swap-plant'
import { answered, release, running, sits, written, type SwapPlant } from '../../../support/swap-steps'

let here: SwapPlant
beforeEach(() => {
  here = swapPlant()
})
afterEach(() => here.plant.close())

describe('release', () => {
  it('takes another person than who sent the last read-back, unless the site does without', () => {
    const both = here.plant.person('Jule Ostrow', ['technician', 'planner'])
    const { id } = written(here)
    here.motion(id)
    here.readBack(id, here.file(), both)
    here.running(id)
    expect(codeOf(() => release(here, id, {}, both))).toBe('four-eyes')
    expect(release(here, id)).toMatchObject({ step: 'released' })
  })

  it('is refused where the last read-back differs, until that version is marked itself', () => {
    const { id } = written(here)
    here.motion(id)
    const left = answered(here.readBack(id, here.file({ setup: { ...setup, thrustLimit: 50 } })))
    here.running(id)
    expect(() => release(here, id)).toThrow(expect.objectContaining({ code: 'read-back-differs', message: expect.stringContaining('mark version 3 known-good') as string }))
    markKnownGood(here.plant.vault, here.runa, left.version.id, { meaning: 'approved' })
    expect(release(here, id)).toMatchObject({ released: { carriedOver: false } })
    expect(readAxis(here.plant.vault, here.axisId).knownGood?.number).toBe(3)
  })

  it('carries nothing over where another version was marked meanwhile', () => {
    const { id } = running(here)
    const newest = swapOf(here.plant.vault, id).asLeft?.versionId ?? 0
    markKnownGood(here.plant.vault, here.runa, newest, { meaning: 'reviewed' })
    expect(release(here, id)).toMatchObject({ released: { carriedOver: false } })
  })
})

describe('other ways out', () => {
  it('the old unit goes back in, and the same swap goes on from there', () => {
    const { id } = written(here)
    const back = putOldUnitBack(here.plant.vault, here.tobias, id, { reason: 'it was the cable' })
    expect(back).toMatchObject({ step: 'safe', putBack: true, unitIn: { serial: 'SN-0001' }, safe: null, kit: { teach: [], prove: [] } })
    expect(sits(here)).toEqual(['SN-0001'])
    expect(readUnit(here.plant.vault, here.spare).state).toBe('spare')
    expect(codeOf(() => putOldUnitBack(here.plant.vault, here.tobias, id, { reason: 'again' }))).toBe('already-back')
    here.safe(id)
    expect(answered(here.readBack(id, here.file({ serial: 'SN-0001', setup: { ...setup, homeOffset: 9 } })))).toMatchObject({ compare: 'differs', differences: [{ field: 'homeOffset' }], readBacks: [{ attempt: 1 }, { attempt: 2, scribeCode: null }] })
    expect(answered(here.readBack(id, here.file({ serial: 'SN-0001' }))).compare).toBe('identical')
    here.motion(id)
    here.readBack(id, here.file({ serial: 'SN-0001' }))
    here.running(id)
    expect(release(here, id)).toMatchObject({ step: 'released', released: { carriedOver: true } })
  })

  it('abandoned: says which unit is truly fitted, and the axis is free for another swap', () => {
    const { id } = here.open()
    here.unitIn(id)
    abandonSwap(here.plant.vault, here.tobias, id, { reason: 'new one is dead too', fittedUnitId: null })
    expect(sits(here)).toEqual([])
    expect(readUnit(here.plant.vault, here.spare).state).toBe('spare')
    expect(here.open().unitOut).toBeNull()
  })

  it('only the drive: the actuator goes along, and the home it finds by its encoder is proved', () => {
    const { id } = here.open('drive')
    expect(here.unitIn(id)).toMatchObject({ fit: 'same', kit: { teach: [], prove: ['homeOffset', 'positionGain'] } })
    const { carried } = readSwapKit(here.plant.vault, id)
    expect(carried.find(({ field }) => field === 'homeOffset')?.why).toBe('Home is found again by hard-stop: copied, and proved at the scribed mark.')
  })

  it('only the actuator: the drive stays, and another serial is refused', () => {
    const { id } = here.open('actuator')
    expect(codeOf(() => here.unitIn(id, 'SN-0002'))).toBe('other-unit')
    expect(here.unitIn(id, 'SN-0001', { actuatorSerial: 'ACT-9', actuatorModel: 'HA-200' })).toMatchObject({ fit: 'unfit', reasons: [{ code: 'actuator-model', hard: false }] })
    const unfit = { by: 'Runa Haldersen', at: iso(here.plant.now), reason: 'same stroke by its plate' }
    expect(here.unitIn(id, 'SN-0001', { unfit })).toMatchObject({ step: 'safe', unitIn: { actuatorSerial: 'ACT-9' } })
    expect(sits(here)).toEqual(['SN-0001'])
  })
})
