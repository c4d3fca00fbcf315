import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import type { Swap } from '../../../../shared/api/swaps'
import { makeTextKit } from '../../../../server/services/kit/make-kit'
import { axisLife } from '../../../../server/services/axes/life'
import { readAxis } from '../../../../server/services/axes/read-axis'
import { readBoard } from '../../../../server/services/board/board'
import { abandonSwap } from '../../../../server/services/swaps/ending'
import { listSwaps, swapOf } from '../../../../server/services/swaps/list-swaps'
import { makeSafe, readCautions } from '../../../../server/services/swaps/make-safe'
import { openSwap } from '../../../../server/services/swaps/open-swap'
import { chooseSource } from '../../../../server/services/swaps/unit-in'
import { storeUpload } from '../../../../server/services/uploads/store-upload'
import { readUnit } from '../../../../server/services/units/units'
import { codeOf } from '../../../support/codes'
import { hour } from '../../../support/vault-plant'
import { setup, swapPlant } from '../../../support/swap-plant'
import { answered, release, running, sits, take, written, type SwapPlant } from '../../../support/swap-steps'

let here: SwapPlant
beforeEach(() => {
  here = swapPlant()
})
afterEach(() => here.plant.close())

describe('a swap from a dead unit to a released one', () => {
  it('goes step by step, and the mark names the version that was left', () => {
    const opened = here.open()
    expect(opened).toMatchObject({ step: 'unit-in', rev: 1, unitOut: { serial: 'SN-0001' }, unitIn: null, source: { number: 1, released: true, mark: { by: 'Runa Haldersen' } }, versionId: here.versionId })
    const { id } = opened
    expect(here.unitIn(id)).toMatchObject({ step: 'safe', rev: 2, fit: 'same', adjustments: [], unitIn: { serial: 'SN-0002', state: 'fitted' }, kit: { teach: [], moves: 3 } })
    expect(sits(here)).toEqual(['SN-0002'])
    expect(readUnit(here.plant.vault, here.old).state).toBe('failed')
    expect(here.safe(id)).toMatchObject({ step: 'read-back', safe: { by: 'Tobias Achterberg', blocked: null } })
    const back = answered(here.readBack(id, here.file()))
    expect(back).toMatchObject({ step: 'first-motion', attempt: 1, compare: 'identical', version: { number: 2, occasion: 'read-back', serial: 'SN-0002' } })
    expect(back.readBacks[0]?.scribeCode).toBe(back.kit?.scribeCode)
    expect(here.motion(id)).toMatchObject({ step: 'running', firstMotion: { untried: [] } })
    const left = answered(here.readBack(id, here.file()))
    expect(left.asLeft).toMatchObject({ number: 3, compare: 'identical' })
    expect(here.running(id)).toMatchObject({ step: 'release' })
    expect(release(here, id, { oldUnitState: 'repair' })).toMatchObject({ step: 'released', released: { by: 'Runa Haldersen', carriedOver: true, oldUnitState: 'repair' } })
    expect(readAxis(here.plant.vault, here.axisId)).toMatchObject({ status: 'in-line', knownGood: { number: 3, by: 'Runa Haldersen' } })
    expect(here.plant.vault.sqlite.prepare('SELECT version_id, carried_from FROM known_good ORDER BY id DESC').get()).toEqual({ version_id: left.version.id, carried_from: here.versionId })
    expect(readUnit(here.plant.vault, here.old).state).toBe('repair')
    expect(swapOf(here.plant.vault, id).log.map(({ act }) => act)).toEqual(['opened', 'unit-in', 'cautions', 'safe', 'read-back', 'first-motion', 'read-back', 'running', 'released'])
  })

  it('stands in the life of the axis: begun, running, released, between what was fitted and read', () => {
    const { id } = running(here)
    release(here, id)
    const { items } = axisLife(here.plant.vault, here.axisId, { limit: 200 })
    expect(items.filter(({ kind }) => kind === 'swap').map(({ by, text }) => `${by}: ${text}`)).toEqual([
      'Runa Haldersen: Released; the mark names version 3 now.', 'Tobias Achterberg: Running, not released; as-left is version 3.', 'Tobias Achterberg: Swap opened: SN-0001, the whole unit. following error, motor hot',
    ])
    const paged = [axisLife(here.plant.vault, here.axisId, { limit: 4 })]
    while (paged.at(-1)?.next) paged.push(axisLife(here.plant.vault, here.axisId, { limit: 4, cursor: paged.at(-1)?.next ?? '' }))
    expect(paged.flatMap(page => page.items)).toEqual(items)
  })

  it('leaves each row equal to the newest entry of the log about it', () => {
    const { id } = running(here)
    release(here, id)
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
    const { id } = written(here)
    here.motion(id)
    expect(here.running(id)).toMatchObject({ asLeft: null })
    expect(swapOf(here.plant.vault, id).log.at(-1)?.text).toContain('no read-back after first motion')
    expect(release(here, id)).toMatchObject({ released: { carriedOver: false } })
    expect(readAxis(here.plant.vault, here.axisId).knownGood?.number).toBe(1)
  })

  it('is late on the board once it runs longer than the site allows', () => {
    const { id } = running(here)
    expect(listSwaps(here.plant.vault, here.runa, { open: 'true' }).items).toMatchObject([{ id, overdue: false, serialOut: 'SN-0001', serialIn: 'SN-0002' }])
    const onBoard = () => readBoard(here.plant.vault, here.runa).attention.find(({ kind }) => kind === 'swap-unreleased')
    expect(onBoard()).toBeUndefined()
    here.plant.now += 25 * hour
    expect(listSwaps(here.plant.vault, here.runa, {}).items).toMatchObject([{ id, overdue: true }])
    expect(onBoard()).toMatchObject({ count: 1, items: [{ tag: 'LID-02.Z', text: 'runs with SN-0002, not released' }] })
    release(here, id)
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
    expect(missing(() => release(here, id))).toEqual(['unit-in', 'safe', 'read-back', 'first-motion', 'running'])
  })

  it('a second swap of the axis is refused while one is open', () => {
    here.open()
    expect(codeOf(() => here.open())).toBe('swap-open')
  })

  it('another unit after the first is safe, and anything after the end, are refused', () => {
    const { id } = written(here)
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
    here.cautions(id)
    expect(makeSafe(here.plant.vault, here.tobias, id, { rev: 3, confirmed: true })).toMatchObject({ rev: 4, step: 'read-back' })
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

  it('nobody goes to the machine with the cautions unread', () => {
    const { id } = here.open()
    here.unitIn(id)
    expect(codeOf(() => makeSafe(here.plant.vault, here.tobias, id, { confirmed: true }))).toBe('cautions-unread')
    here.cautions(id)
    expect(makeSafe(here.plant.vault, here.tobias, id, { confirmed: true })).toMatchObject({ step: 'read-back' })
  })

  it('the cautions are read once a swap, or with each kit', () => {
    const { id } = here.open()
    here.unitIn(id)
    const unread = () => makeTextKit(here.plant.vault, here.tobias, here.axisId, { form: 'json', cautionsRead: false }).kit
    expect(codeOf(unread)).toBe('cautions-unread')
    expect(readCautions(here.plant.vault, here.tobias, id, { read: true })).toMatchObject({ cautions: { by: 'Tobias Achterberg' } })
    expect(unread().released).toBe(true)
    expect(codeOf(() => take(here, 'SN-0050'))).toBe('other-unit')
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
    expect(sits(here)).toEqual(['SN-0007'])
    expect(readUnit(here.plant.vault, here.old).state).toBe('spare')
  })
})
