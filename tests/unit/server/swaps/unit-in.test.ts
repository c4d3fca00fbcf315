import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { readAxis } from '../../../../server/services/axes/read-axis'
import { swapOf } from '../../../../server/services/swaps/list-swaps'
import { listSpares } from '../../../../server/services/swaps/spares'
import { storeUpload } from '../../../../server/services/uploads/store-upload'
import { readUnit } from '../../../../server/services/units/units'
import { readSettings } from '../../../../shared/settings/read'
import { codeOf } from '../../../support/codes'
import { hour, iso } from '../../../support/vault-plant'
import { moves, plates, setup, swapPlant } from '../../../support/swap-plant'
import { answered, release, sits, take, type SwapPlant } from '../../../support/swap-steps'

let here: SwapPlant
beforeEach(() => {
  here = swapPlant()
})
afterEach(() => here.plant.close())

describe('which unit goes in', () => {
  it('not the one that came out, nor one that sits elsewhere, nor one whose plate says another model', () => {
    const { id } = here.open()
    expect(codeOf(() => here.unitIn(id, 'sn-0001'))).toBe('same-unit')
    const other = here.plant.axis('LID-03.Z')
    here.plant.fit(other, here.plant.unit('SN-0003'), here.plant.now - hour)
    expect(() => here.unitIn(id, 'SN-0003')).toThrow(expect.objectContaining({ code: 'fitted', message: expect.stringContaining('SN-0003 sits at LID-03.Z') as string }))
    expect(() => here.unitIn(id, 'SN-0002', { model: 'HL50-200V' })).toThrow(expect.objectContaining({ code: 'input', message: expect.stringContaining('registered as HL40-200V') as string }))
    expect(sits(here)).toEqual(['SN-0001'])
  })

  it('a new serial is registered with its model, and asks for it', () => {
    const { id } = here.open()
    expect(() => here.unitIn(id, 'SN-9001')).toThrow(expect.objectContaining({ code: 'input', message: expect.stringContaining('No unit SN-9001 is registered') as string }))
    expect(here.unitIn(id, 'SN-9001', { model: 'HL40-200V', firmware: '2.4' })).toMatchObject({ fit: 'same', unitIn: { serial: 'SN-9001', firmware: '2.4', state: 'fitted' } })
  })

  it('may be another until it is safe; the one before goes back to the shelf', () => {
    const { id } = here.open()
    here.unitIn(id)
    here.unitIn(id, 'SN-0050', { forcesConfirmed: true })
    expect(sits(here)).toEqual(['SN-0050'])
    expect(readUnit(here.plant.vault, here.spare).state).toBe('spare')
    expect(readUnit(here.plant.vault, here.old).state).toBe('failed')
  })

  it('spares that fit come first, the same model before one that is adjusted, and say why others do not', () => {
    here.plant.nameplate({ ...plates.press, model: 'HL40-100V', stroke: 100 })
    here.plant.unit('SN-0100', { model: 'HL40-100V', siteId: here.plant.siteId })
    const { id } = here.open()
    const { items } = listSpares(here.plant.vault, id)
    expect(items.map(({ unit, fit, hard, adjusted }) => [unit.serial, fit, hard, adjusted])).toEqual([['SN-0002', 'same', false, 0], ['SN-0050', 'adjust', false, 4], ['SN-0100', 'unfit', true, 0]])
    expect(items[2]?.reasons[0]?.message).toBe('The moves go from 0 mm to 150 mm, 150 mm in all; HL40-100V has a stroke of 100 mm.')
  })

  it('uploads of its serial land on the axis from then on', () => {
    const { id } = here.open()
    here.unitIn(id)
    const stored = storeUpload(here.plant.vault, here.tobias, { bytes: here.file({ setup: { ...setup, nodeAddress: 8 } }), name: null }, {})
    expect(stored).toMatchObject({ outcome: 'version', answer: { version: { axisId: here.axisId, serial: 'SN-0002' } } })
  })
})

describe('a unit of another force base', () => {
  // 38 % of 400 N are 152 N, and 152 N are 23.75 % of 640 N.
  const adjustments = [
    { at: '/setup/homingForceLimit', before: 20, after: 12.5, newtonsBefore: 80, newtonsAfter: 80 },
    { at: '/setup/thrustLimit', before: 60, after: 37.5, newtonsBefore: 240, newtonsAfter: 240 },
    { at: '/setup/overloadLevel', before: 90, after: 56.25, newtonsBefore: 360, newtonsAfter: 360 },
    { at: '/moves/2/forceLimit', before: 38, after: 23.75, newtonsBefore: 152, newtonsAfter: 152 },
  ]
  const brought = () => here.file({ serial: 'SN-0050', model: 'HL50-200V', setup: { ...setup, homingForceLimit: 12.5, thrustLimit: 37.5, overloadLevel: 56.25, positionGain: 55 }, moves: moves.map(move => 'forceLimit' in move ? { ...move, forceLimit: 23.75 } : move) })

  it('has its percentages rescaled, and nothing goes on before they are confirmed in newtons', () => {
    const { id } = here.open()
    const swap = here.unitIn(id, 'SN-0050')
    expect(swap).toMatchObject({ fit: 'adjust', adjustments, forcesConfirmed: null, kit: { attachmentFits: false, teach: ['positionGain'] } })
    expect(codeOf(() => here.safe(id))).toBe('forces-unconfirmed')
    expect(codeOf(() => take(here))).toBe('forces-unconfirmed')
    expect(here.unitIn(id, 'SN-0050', { forcesConfirmed: true })).toMatchObject({ forcesConfirmed: { by: 'Tobias Achterberg' }, step: 'safe' })
    const read = readSettings(take(here, 'SN-0050').bytes)
    expect(read.ok && [read.value.file.setup.thrustLimit, read.value.file.moves[2]?.forceLimit, read.value.file.setup.positionGain]).toEqual([37.5, 23.75, undefined])
    here.safe(id)
    expect(answered(here.readBack(id, brought()))).toMatchObject({ compare: 'same', aside: [{ field: 'positionGain' }], taughtMissing: [] })
  })

  it('read back with the old percentages differs, each value with what to write', () => {
    const { id } = here.open()
    here.unitIn(id, 'SN-0050', { forcesConfirmed: true })
    here.safe(id)
    const back = answered(here.readBack(id, here.file({ serial: 'SN-0050', model: 'HL50-200V' })))
    expect(back.compare).toBe('differs')
    expect(back.differences.map(({ field, before, after }) => [field, before, after])).toEqual(expect.arrayContaining([['thrustLimit', 37.5, 60], ['forceLimit', 23.75, 38]]))
    expect(back.readBacks[0]?.scribeCode).not.toBe(back.kit?.scribeCode)
  })

  it('carries the mark over as well: another person read back, and the newtons are the same', () => {
    const { id } = here.open()
    here.unitIn(id, 'SN-0050', { forcesConfirmed: true })
    here.safe(id)
    here.readBack(id, brought())
    here.motion(id)
    here.readBack(id, brought())
    here.running(id)
    expect(release(here, id)).toMatchObject({ released: { carriedOver: true } })
    expect(readAxis(here.plant.vault, here.axisId)).toMatchObject({ status: 'in-line', checks: { stop: 0 } })
  })
})

describe('a unit that does not fit', () => {
  it('hard: is not fitted, and nobody may go on with it', () => {
    here.plant.nameplate({ ...plates.press, model: 'HL40-100V', stroke: 100 })
    const { id } = here.open()
    const unfit = { by: 'Runa Haldersen', at: iso(here.plant.now), reason: 'nothing else there' }
    const swap = here.unitIn(id, 'SN-0100', { model: 'HL40-100V', unfit })
    expect(swap).toMatchObject({ fit: 'unfit', step: 'unit-in', unfit: null, reasons: [{ code: 'stroke-short', hard: true }, ...swap.reasons.slice(1)] })
    expect(sits(here)).toEqual(['SN-0001'])
    expect(codeOf(() => here.safe(id))).toBe('unfit')
    expect(codeOf(() => take(here))).toBe('unfit')
  })

  it('otherwise: goes on with a planner by name, time and reason', () => {
    here.plant.nameplate({ ...plates.press, model: 'HL40-200S', maxSpeed: 150 })
    const { id } = here.open()
    const first = here.unitIn(id, 'SN-0200', { model: 'HL40-200S' })
    expect(first).toMatchObject({ fit: 'unfit', step: 'unit-in' })
    expect(first.reasons.every(({ hard, code }) => !hard && code === 'stop-check')).toBe(true)
    expect(codeOf(() => here.safe(id))).toBe('unfit')
    const unfit = { by: 'Runa Haldersen', at: iso(here.plant.now), reason: 'runs at half speed till Monday' }
    expect(here.unitIn(id, 'SN-0200', { unfit })).toMatchObject({ fit: 'unfit', step: 'safe', unfit: { by: 'Runa Haldersen', reason: 'runs at half speed till Monday', enteredBy: 'Tobias Achterberg' } })
    expect(sits(here)).toEqual(['SN-0200'])
    expect(swapOf(here.plant.vault, id).log.at(-1)?.text).toContain('Allowed by Runa Haldersen')
    expect(codeOf(() => here.unitIn(id, 'SN-0200', { unfit: { ...unfit, at: iso(here.plant.now + hour) } }))).toBe('time-order')
  })
})
