import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { markKnownGood } from '../../../../server/services/known-good/mark'
import { swapOf } from '../../../../server/services/swaps/list-swaps'
import { recordMotion } from '../../../../server/services/swaps/motion'
import { acceptMissingKeys } from '../../../../server/services/swaps/read-back'
import { readSwapKit } from '../../../../server/services/swaps/swap-kit'
import { chooseSource } from '../../../../server/services/swaps/unit-in'
import { storeUpload } from '../../../../server/services/uploads/store-upload'
import { codeOf } from '../../../support/codes'
import { iso, settingsFile } from '../../../support/vault-plant'
import { moves, setup, swapPlant } from '../../../support/swap-plant'
import { answered, refused, written, type SwapPlant } from '../../../support/swap-steps'

let here: SwapPlant
beforeEach(() => {
  here = swapPlant()
})
afterEach(() => here.plant.close())

describe('read-backs', () => {
  const attempts = (id: number) => swapOf(here.plant.vault, id).readBacks.map(({ attempt, problem, compare }) => [attempt, problem, compare])

  it('of another serial, another model, an unreadable file and the same file twice are each told apart, and kept', () => {
    const { id } = here.open()
    here.unitIn(id)
    here.safe(id)
    expect(refused(here.readBack(id, here.file({ serial: 'SN-0001' })))).toBe('read-back-serial')
    expect(refused(here.readBack(id, here.file({ serial: 'SN-0002', channel: 2 })))).toBe('read-back-serial')
    expect(refused(here.readBack(id, here.file({ model: 'HL50-200V' })))).toBe('read-back-model')
    expect(refused(here.readBack(id, Buffer.from('{ "schema": ')))).toBe('settings-unreadable')
    const good = here.file()
    answered(here.readBack(id, good))
    const again = here.readBack(id, good)
    expect(again.ok ? '' : again.refusal.message).toMatch(/^This is the very file of attempt 5, from \d\d:\d\d UTC\./)
    expect(attempts(id)).toEqual([[1, 'serial', null], [2, 'serial', null], [3, 'model', null], [4, 'unreadable', null], [5, null, 'identical'], [6, 'twice', null]])
    expect(here.plant.rows().upload).toBe(7)
    expect(here.plant.rows().version).toBe(2)
  })

  it('of a half-written table names the rows that are missing', () => {
    const { id } = here.open()
    here.unitIn(id)
    here.safe(id)
    const back = answered(here.readBack(id, here.file({ moves: moves.slice(0, 1) })))
    expect(back).toMatchObject({ compare: 'differs', readBacks: [{ rowsMissing: [{ section: 'move', row: 1 }, { section: 'move', row: 2 }] }] })
    expect(back.log.at(-1)?.text).toContain('The table was written in part: 2 rows are missing.')
  })

  it('with a clock that lies before the unit came in take the time of receipt', () => {
    const { id } = here.open()
    here.unitIn(id)
    here.safe(id)
    expect(answered(here.readBack(id, here.file({ exportedAt: '1970-01-01T00:00:00Z' }))).version).toMatchObject({ clockDoubtful: true, late: false, current: true })
  })

  it('without a key of the kit differ until that is accepted, once for the model and firmware', () => {
    const { id } = here.open()
    here.unitIn(id)
    here.safe(id)
    const { selectSettleTime: _gone, positionGain: _too, ...less } = setup
    const back = answered(here.readBack(id, here.file({ setup: less })))
    expect(back).toMatchObject({ compare: 'differs', differences: [], missingKeys: [{ key: 'selectSettleTime', weight: 'harm', accepted: false }, { key: 'positionGain', weight: 'motion', accepted: false }] })
    const accept = (keys: string[], allowedBy?: string) => acceptMissingKeys(here.plant.vault, here.tobias, id, { keys, reason: 'not in 2.4', allowedBy })
    expect(codeOf(() => accept(['selectSettleTime']))).toBe('input')
    expect(codeOf(() => accept(['thrustLimit'], 'Runa Haldersen'))).toBe('input')
    accept(['positionGain'])
    const swap = accept(['selectSettleTime'], 'Runa Haldersen')
    expect(swap.readBacks[0]).toMatchObject({ compare: 'same', scribeCode: swap.kit?.scribeCode })
    expect(answered(here.readBack(id, here.file({ setup: less, firmware: '2.4' }))).compare).toBe('same')
    expect(answered(here.readBack(id, here.file({ setup: less, firmware: '2.5' }))).compare).toBe('differs')
  })
})

describe('first motion', () => {
  it('is not offered while a value to be taught was not read back', () => {
    const taught = { ...setup, homingMethod: 'absolute-encoder' }
    const stored = storeUpload(here.plant.vault, here.tobias, { bytes: settingsFile({ setup: taught, moves, exportedAt: iso(here.plant.now) }), name: null }, {})
    const { id } = here.open()
    markKnownGood(here.plant.vault, here.runa, stored.outcome === 'version' ? stored.answer.version.id : 0, { meaning: 'approved' })
    chooseSource(here.plant.vault, here.tobias, id, { versionId: stored.outcome === 'version' ? stored.answer.version.id : 0, decidedBy: 'Runa', reason: 'newest' })
    here.unitIn(id)
    here.safe(id)
    const { homeOffset: _blank, ...without } = taught
    expect(answered(here.readBack(id, here.file({ setup: without })))).toMatchObject({ compare: 'identical', taughtMissing: ['homeOffset'] })
    expect(() => here.motion(id)).toThrow(expect.objectContaining({ code: 'taught-missing', message: expect.stringContaining('Teach homeOffset first') as string }))
    expect(answered(here.readBack(id, here.file({ setup: { ...taught, homeOffset: 77 } })))).toMatchObject({ compare: 'same', taughtMissing: [], aside: [{ field: 'homeOffset', after: 77 }] })
    expect(here.motion(id).step).toBe('running')
  })

  it('takes results piece by piece, the newest of an item holds, and a fault keeps it from running', () => {
    const { id } = written(here)
    here.motion(id, ['jog'])
    recordMotion(here.plant.vault, here.tobias, id, { speedPercent: 10, results: [{ item: 'chain-1', outcome: 'fault', text: 'stops at 90' }] })
    expect(() => here.running(id)).toThrow(expect.objectContaining({ code: 'motion-fault' }))
    expect(here.motion(id, ['chain-1'])).toMatchObject({ firstMotion: { results: [{ item: 'jog' }, { item: 'chain-1', outcome: 'fault', text: 'stops at 90' }, { item: 'chain-1', outcome: 'ok', text: null }], untried: ['enable-loss', 'emergency-stop', 'move-0'] } })
    expect(here.running(id).step).toBe('release')
    expect(codeOf(() => here.motion(id, ['move-9']))).toBe('input')
  })

  it('is listed with times at the reduced speed, chains as chains, and the inputs that are on', () => {
    const { id } = written(here)
    const { firstMotion: items } = readSwapKit(here.plant.vault, id)
    expect(items.map(({ item }) => item)).toEqual(['jog', 'enable-loss', 'emergency-stop', 'move-0', 'chain-1'])
    expect(items.at(-1)).toMatchObject({ words: '1→2 runs by itself, 2 movements, ends at 150 mm.', moves: [1, 2], end: 150, inputs: [0] })
  })
})
