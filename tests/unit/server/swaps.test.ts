import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import type { Swap } from '../../../shared/api/swaps'
import { makeTextKit } from '../../../server/services/kit/make-kit'
import { markKnownGood } from '../../../server/services/known-good/mark'
import { axisLife } from '../../../server/services/axes/life'
import { listFittings, readAxis } from '../../../server/services/axes/read-axis'
import { readBoard } from '../../../server/services/board/board'
import { abandonSwap, putOldUnitBack } from '../../../server/services/swaps/ending'
import { listSwaps, swapOf } from '../../../server/services/swaps/list-swaps'
import { makeSafe, readCautions } from '../../../server/services/swaps/make-safe'
import { recordMotion } from '../../../server/services/swaps/motion'
import { acceptMissingKeys, type ReadBackOutcome } from '../../../server/services/swaps/read-back'
import { releaseSwap } from '../../../server/services/swaps/release'
import { listSpares } from '../../../server/services/swaps/spares'
import { readSwapKit } from '../../../server/services/swaps/swap-kit'
import { openSwap } from '../../../server/services/swaps/open-swap'
import { chooseSource } from '../../../server/services/swaps/unit-in'
import { storeUpload } from '../../../server/services/uploads/store-upload'
import { readUnit } from '../../../server/services/units/units'
import { readSettings } from '../../../shared/settings/read'
import { codeOf } from '../../support/codes'
import { hour, iso, settingsFile } from '../../support/vault-plant'
import { moves, plates, setup, swapPlant } from '../../support/swap-plant'

let here: ReturnType<typeof swapPlant>
beforeEach(() => {
  here = swapPlant()
})
afterEach(() => here.plant.close())

const answered = (outcome: ReadBackOutcome) => {
  if (!outcome.ok) throw new Error(outcome.refusal.message)
  return outcome.answer
}
const refused = (outcome: ReadBackOutcome) => outcome.ok ? 'none' : outcome.refusal.code
const sits = () => listFittings(here.plant.vault, here.axisId).items.filter(({ to }) => to === null).map(({ serial }) => serial)
const release = (id: number, more: object = {}, actor = here.runa) => releaseSwap(here.plant.vault, actor, id, { meaning: 'approved', ...more })
const take = (serial?: string) => makeTextKit(here.plant.vault, here.tobias, here.axisId, { serial, form: 'json', cautionsRead: true }).kit
/** Up to a read-back that is identical, with the spare of the same model. */
function written(): Swap {
  const { id } = here.open()
  here.unitIn(id)
  here.safe(id)
  return answered(here.readBack(id, here.file()))
}
/** Up to running, with an as-left version. */
function running(): Swap {
  const { id } = written()
  here.motion(id)
  here.readBack(id, here.file())
  return here.running(id)
}

describe('a swap from a dead unit to a released one', () => {
  it('goes step by step, and the mark names the version that was left', () => {
    const opened = here.open()
    expect(opened).toMatchObject({ step: 'unit-in', rev: 1, unitOut: { serial: 'SN-0001' }, unitIn: null, source: { number: 1, released: true, mark: { by: 'Runa Haldersen' } }, versionId: here.versionId })
    const { id } = opened
    expect(here.unitIn(id)).toMatchObject({ step: 'safe', rev: 2, fit: 'same', adjustments: [], unitIn: { serial: 'SN-0002', state: 'fitted' }, kit: { teach: [], moves: 3 } })
    expect(sits()).toEqual(['SN-0002'])
    expect(readUnit(here.plant.vault, here.old).state).toBe('failed')
    expect(here.safe(id)).toMatchObject({ step: 'read-back', safe: { by: 'Tobias Achterberg', blocked: null } })
    const back = answered(here.readBack(id, here.file()))
    expect(back).toMatchObject({ step: 'first-motion', attempt: 1, compare: 'identical', version: { number: 2, occasion: 'read-back', serial: 'SN-0002' } })
    expect(back.readBacks[0]?.scribeCode).toBe(back.kit?.scribeCode)
    expect(here.motion(id)).toMatchObject({ step: 'running', firstMotion: { untried: [] } })
    const left = answered(here.readBack(id, here.file()))
    expect(left.asLeft).toMatchObject({ number: 3, compare: 'identical' })
    expect(here.running(id)).toMatchObject({ step: 'release' })
    expect(release(id, { oldUnitState: 'repair' })).toMatchObject({ step: 'released', released: { by: 'Runa Haldersen', carriedOver: true, oldUnitState: 'repair' } })
    expect(readAxis(here.plant.vault, here.axisId)).toMatchObject({ status: 'in-line', knownGood: { number: 3, by: 'Runa Haldersen' } })
    expect(here.plant.vault.sqlite.prepare('SELECT version_id, carried_from FROM known_good ORDER BY id DESC').get()).toEqual({ version_id: left.version.id, carried_from: here.versionId })
    expect(readUnit(here.plant.vault, here.old).state).toBe('repair')
    expect(swapOf(here.plant.vault, id).log.map(({ act }) => act)).toEqual(['opened', 'unit-in', 'safe', 'read-back', 'first-motion', 'read-back', 'running', 'released'])
  })

  it('stands in the life of the axis: begun, running, released, between what was fitted and read', () => {
    const { id } = running()
    release(id)
    const { items } = axisLife(here.plant.vault, here.axisId, { limit: 200 })
    expect(items.filter(({ kind }) => kind === 'swap').map(({ by, text }) => `${by}: ${text}`)).toEqual([
      'Runa Haldersen: Released; the mark names version 3 now.', 'Tobias Achterberg: Running, not released; as-left is version 3.', 'Tobias Achterberg: Swap opened: unit of SN-0001. following error, motor hot',
    ])
    const paged = [axisLife(here.plant.vault, here.axisId, { limit: 4 })]
    while (paged.at(-1)?.next) paged.push(axisLife(here.plant.vault, here.axisId, { limit: 4, cursor: paged.at(-1)?.next ?? '' }))
    expect(paged.flatMap(page => page.items)).toEqual(items)
  })

  it('leaves each row equal to the newest entry of the log about it', () => {
    const { id } = running()
    release(id)
    const newest = new Map<string, unknown>()
    for (const leaf of here.plant.vault.sqlite.prepare('SELECT leaf FROM log ORDER BY seq').pluck().all() as string[]) {
      const { subject, state } = JSON.parse(leaf) as { subject: { kind: string, id: number }, state: object }
      newest.set(`${subject.kind} ${subject.id}`, state)
    }
    const row = here.plant.vault.sqlite.prepare('SELECT rev, step, facts FROM swap').get() as { rev: number, step: string, facts: string }
    expect(newest.get(`swap ${id}`)).toMatchObject({ rev: row.rev, step: row.step, facts: JSON.parse(row.facts) as object })
    expect([...newest.keys()].filter(key => key.startsWith('swap-step'))).toHaveLength(row.rev)
    expect([...newest.keys()].filter(key => key.startsWith('read-back'))).toHaveLength(2)
  })

  it('says that nothing carries over without a read-back after first motion', () => {
    const { id } = written()
    here.motion(id)
    expect(here.running(id)).toMatchObject({ asLeft: null })
    expect(swapOf(here.plant.vault, id).log.at(-1)?.text).toContain('no read-back after first motion')
    expect(release(id)).toMatchObject({ released: { carriedOver: false } })
    expect(readAxis(here.plant.vault, here.axisId).knownGood?.number).toBe(1)
  })

  it('is late on the board once it runs longer than the site allows', () => {
    const { id } = running()
    expect(listSwaps(here.plant.vault, here.runa, { open: 'true' }).items).toMatchObject([{ id, overdue: false, serialOut: 'SN-0001', serialIn: 'SN-0002' }])
    const onBoard = () => readBoard(here.plant.vault, here.runa).attention.find(({ kind }) => kind === 'swap-unreleased')
    expect(onBoard()).toBeUndefined()
    here.plant.now += 25 * hour
    expect(listSwaps(here.plant.vault, here.runa, {}).items).toMatchObject([{ id, overdue: true }])
    expect(onBoard()).toMatchObject({ count: 1, items: [{ tag: 'LID-02.Z', text: 'runs with SN-0002, not released' }] })
    release(id)
    expect(listSwaps(here.plant.vault, here.runa, { open: 'true' }).items).toEqual([])
    expect(listSwaps(here.plant.vault, here.runa, { axis: 'tag:LID-02.Z', open: 'false' }).items).toMatchObject([{ id, step: 'released', releaseDueAt: null }])
  })
})

describe('steps out of turn', () => {
  it('say which come first', () => {
    const { id } = here.open()
    const missing = (run: () => unknown) => {
      try {
        run()
      }
      catch (error) {
        return (error as { details: { missing?: string[] } }).details.missing
      }
      return 'nothing'
    }
    expect(missing(() => here.safe(id))).toEqual(['unit-in'])
    expect(missing(() => here.readBack(id, here.file()))).toEqual(['unit-in', 'safe'])
    expect(missing(() => here.motion(id))).toEqual(['unit-in', 'safe', 'read-back'])
    expect(missing(() => release(id))).toEqual(['unit-in', 'safe', 'read-back', 'first-motion', 'running'])
  })

  it('a second swap of the axis is refused while one is open', () => {
    here.open()
    expect(codeOf(() => here.open())).toBe('swap-open')
  })

  it('another unit after the first is safe, and anything after the end, are refused', () => {
    const { id } = written()
    expect(codeOf(() => here.unitIn(id, 'SN-0050'))).toBe('already-safe')
    abandonSwap(here.plant.vault, here.tobias, id, { reason: 'cable was it', fittedUnitId: here.spare })
    expect(codeOf(() => here.motion(id))).toBe('swap-closed')
  })
})

describe('two devices', () => {
  it('a stale rev is refused with what the other device did', () => {
    const { id, rev } = here.open()
    here.unitIn(id, 'SN-0002', { rev })
    try {
      makeSafe(here.plant.vault, here.tobias, id, { rev, confirmed: true })
      expect.unreachable()
    }
    catch (error) {
      const { code, message, details } = error as { code: string, message: string, details: { current: Swap } }
      expect([code, message]).toEqual(['edited-meanwhile', 'Another device went on meanwhile. Tobias Achterberg: SN-0002 (HL40-200V) goes in.'])
      expect(details.current).toMatchObject({ rev: 2, step: 'safe' })
    }
    expect(makeSafe(here.plant.vault, here.tobias, id, { rev: 2, confirmed: true })).toMatchObject({ rev: 3, step: 'read-back' })
  })
})

describe('which unit goes in', () => {
  it('not the one that came out, nor one that sits elsewhere, nor one whose plate says another model', () => {
    const { id } = here.open()
    expect(codeOf(() => here.unitIn(id, 'sn-0001'))).toBe('same-unit')
    const other = here.plant.axis('LID-03.Z')
    here.plant.fit(other, here.plant.unit('SN-0003'), here.plant.now - hour)
    expect(() => here.unitIn(id, 'SN-0003')).toThrow(expect.objectContaining({ code: 'fitted', message: expect.stringContaining('SN-0003 sits at LID-03.Z') as string }))
    expect(() => here.unitIn(id, 'SN-0002', { model: 'HL50-200V' })).toThrow(expect.objectContaining({ code: 'input', message: expect.stringContaining('registered as HL40-200V') as string }))
    expect(sits()).toEqual(['SN-0001'])
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
    expect(sits()).toEqual(['SN-0050'])
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
    expect(codeOf(() => take())).toBe('forces-unconfirmed')
    expect(here.unitIn(id, 'SN-0050', { forcesConfirmed: true })).toMatchObject({ forcesConfirmed: { by: 'Tobias Achterberg' }, step: 'safe' })
    const read = readSettings(take('SN-0050').bytes)
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
    expect(release(id)).toMatchObject({ released: { carriedOver: true } })
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
    expect(sits()).toEqual(['SN-0001'])
    expect(codeOf(() => here.safe(id))).toBe('unfit')
    expect(codeOf(() => take())).toBe('unfit')
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
    expect(sits()).toEqual(['SN-0200'])
    expect(swapOf(here.plant.vault, id).log.at(-1)?.text).toContain('Allowed by Runa Haldersen')
    expect(codeOf(() => here.unitIn(id, 'SN-0200', { unfit: { ...unfit, at: iso(here.plant.now + hour) } }))).toBe('time-order')
  })
})

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
    const { id } = written()
    here.motion(id, ['jog'])
    recordMotion(here.plant.vault, here.tobias, id, { speedPercent: 10, results: [{ item: 'chain-1', outcome: 'fault', text: 'stops at 90' }] })
    expect(() => here.running(id)).toThrow(expect.objectContaining({ code: 'motion-fault' }))
    expect(here.motion(id, ['chain-1'])).toMatchObject({ firstMotion: { results: [{ item: 'jog' }, { item: 'chain-1', outcome: 'fault', text: 'stops at 90' }, { item: 'chain-1', outcome: 'ok', text: null }], untried: ['enable-loss', 'emergency-stop', 'move-0'] } })
    expect(here.running(id).step).toBe('release')
    expect(codeOf(() => here.motion(id, ['move-9']))).toBe('input')
  })

  it('is listed with times at the reduced speed, chains as chains, and the inputs that are on', () => {
    const { id } = written()
    const { firstMotion: items } = readSwapKit(here.plant.vault, id)
    expect(items.map(({ item }) => item)).toEqual(['jog', 'enable-loss', 'emergency-stop', 'move-0', 'chain-1'])
    expect(items.at(-1)).toMatchObject({ words: '1→2 runs by itself, 2 movements, ends at 150 mm.', moves: [1, 2], end: 150, inputs: [0] })
  })
})

describe('release', () => {
  it('takes another person than who sent the last read-back, unless the site does without', () => {
    const both = here.plant.person('Jule Ostrow', ['technician', 'planner'])
    const { id } = written()
    here.motion(id)
    here.readBack(id, here.file(), both)
    here.running(id)
    expect(codeOf(() => release(id, {}, both))).toBe('four-eyes')
    expect(release(id)).toMatchObject({ step: 'released' })
  })

  it('is refused where the last read-back differs, until that version is marked itself', () => {
    const { id } = written()
    here.motion(id)
    const left = answered(here.readBack(id, here.file({ setup: { ...setup, thrustLimit: 50 } })))
    here.running(id)
    expect(() => release(id)).toThrow(expect.objectContaining({ code: 'read-back-differs', message: expect.stringContaining('mark version 3 known-good') as string }))
    markKnownGood(here.plant.vault, here.runa, left.version.id, { meaning: 'approved' })
    expect(release(id)).toMatchObject({ released: { carriedOver: false } })
    expect(readAxis(here.plant.vault, here.axisId).knownGood?.number).toBe(3)
  })

  it('carries nothing over where another version was marked meanwhile', () => {
    const { id } = running()
    const newest = swapOf(here.plant.vault, id).asLeft?.versionId ?? 0
    markKnownGood(here.plant.vault, here.runa, newest, { meaning: 'reviewed' })
    expect(release(id)).toMatchObject({ released: { carriedOver: false } })
  })
})

describe('other ways out', () => {
  it('the old unit goes back in, and the same swap goes on from there', () => {
    const { id } = written()
    const back = putOldUnitBack(here.plant.vault, here.tobias, id, { reason: 'it was the cable' })
    expect(back).toMatchObject({ step: 'safe', putBack: true, unitIn: { serial: 'SN-0001' }, safe: null, kit: { teach: [], prove: [] } })
    expect(sits()).toEqual(['SN-0001'])
    expect(readUnit(here.plant.vault, here.spare).state).toBe('spare')
    expect(codeOf(() => putOldUnitBack(here.plant.vault, here.tobias, id, { reason: 'again' }))).toBe('already-back')
    here.safe(id)
    expect(answered(here.readBack(id, here.file({ serial: 'SN-0001', setup: { ...setup, homeOffset: 9 } })))).toMatchObject({ compare: 'differs', differences: [{ field: 'homeOffset' }], readBacks: [{ attempt: 1 }, { attempt: 2, scribeCode: null }] })
    expect(answered(here.readBack(id, here.file({ serial: 'SN-0001' }))).compare).toBe('identical')
    here.motion(id)
    here.readBack(id, here.file({ serial: 'SN-0001' }))
    here.running(id)
    expect(release(id)).toMatchObject({ step: 'released', released: { carriedOver: true } })
  })

  it('abandoned: says which unit is truly fitted, and the axis is free for another swap', () => {
    const { id } = here.open()
    here.unitIn(id)
    abandonSwap(here.plant.vault, here.tobias, id, { reason: 'new one is dead too', fittedUnitId: null })
    expect(sits()).toEqual([])
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
    expect(sits()).toEqual(['SN-0001'])
  })
})

describe('what stands before the steps', () => {
  it('a load that can fall asks how it is blocked', () => {
    here.plant.vault.sqlite.exec(`UPDATE axis SET flags = '["gravity"]'`)
    const { id } = here.open()
    here.unitIn(id)
    expect(swapOf(here.plant.vault, id).loadCanFall).toBe(true)
    expect(codeOf(() => here.safe(id))).toBe('input')
    expect(makeSafe(here.plant.vault, here.tobias, id, { confirmed: true, blocked: 'pin' })).toMatchObject({ safe: { blocked: 'pin' } })
  })

  it('the cautions are read once a swap, or with each kit', () => {
    const { id } = here.open()
    here.unitIn(id)
    const unread = () => makeTextKit(here.plant.vault, here.tobias, here.axisId, { form: 'json', cautionsRead: false }).kit
    expect(codeOf(unread)).toBe('cautions-unread')
    expect(readCautions(here.plant.vault, here.tobias, id, { read: true })).toMatchObject({ cautions: { by: 'Tobias Achterberg' } })
    expect(unread().released).toBe(true)
    expect(codeOf(() => take('SN-0050'))).toBe('other-unit')
  })

  it('an as-found file that differs may go back instead, if somebody decides so', () => {
    const asFound = storeUpload(here.plant.vault, here.tobias, { bytes: here.file({ serial: 'SN-0001', setup: { ...setup, thrustLimit: 55 } }), name: null }, { occasion: 'as-found' })
    const asFoundId = asFound.outcome === 'version' ? asFound.answer.version.id : 0
    const { id, asFound: told } = here.open()
    expect(told).toMatchObject({ versionId: asFoundId, compare: 'differs' })
    expect(codeOf(() => chooseSource(here.plant.vault, here.tobias, id, { versionId: 999, decidedBy: 'Runa', reason: 'r' }))).toBe('input')
    expect(chooseSource(here.plant.vault, here.tobias, id, { versionId: asFoundId, decidedBy: 'Runa Haldersen', reason: 'proved last week' })).toMatchObject({ versionId: asFoundId, source: { released: false, chosen: { decidedBy: 'Runa Haldersen' } } })
  })

  it('the serial on the plate corrects what the vault believed', () => {
    const swap = openSwap(here.plant.vault, here.tobias, { axisId: here.axisId, replaced: 'unit', failure: 'dead', unitOut: { serial: 'SN-0007', model: 'HL40-200V' } })
    expect(swap.unitOut).toMatchObject({ serial: 'SN-0007', state: 'fitted' })
    expect(sits()).toEqual(['SN-0007'])
    expect(readUnit(here.plant.vault, here.old).state).toBe('spare')
  })
})
