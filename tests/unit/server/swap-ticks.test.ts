import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import type { Swap, SwapTick } from '../../../shared/api/swaps'
import { watchPlace } from '../../../server/services/letters/own'
import { putOldUnitBack } from '../../../server/services/swaps/ending'
import { swapOf } from '../../../server/services/swaps/list-swaps'
import { readCautions } from '../../../server/services/swaps/make-safe'
import { recordMotion, sayRunning } from '../../../server/services/swaps/motion'
import { tellUnreleased } from '../../../server/services/swaps/overdue'
import { releaseSwap } from '../../../server/services/swaps/release'
import { keepNote, tickDone } from '../../../server/services/swaps/tick'
import { codeOf } from '../../support/codes'
import { hour } from '../../support/vault-plant'
import { swapPlant } from '../../support/swap-plant'

/* What one device ticks and writes between two steps, and another goes on from. */

let here: ReturnType<typeof swapPlant>
beforeEach(() => {
  here = swapPlant()
})
afterEach(() => here.plant.close())

const tick = (id: number, body: SwapTick, actor = here.tobias) => tickDone(here.plant.vault, actor, id, body)
const line = (name: string, done = true): SwapTick => ({ tick: 'line', line: name, words: `Words of ${name}`, done })
const lines = ({ ticks }: Swap) => ticks.lines.map(({ line: name, by }) => `${name} ${by}`)
/** Up to a unit that is in and safe. */
function madeSafe(): number {
  const { id } = here.open()
  here.unitIn(id)
  here.safe(id)
  return id
}
function moved(): number {
  const id = madeSafe()
  here.readBack(id, here.file())
  here.motion(id)
  return id
}
/** The newest entry of the log about an act. */
function newest(act: string): { state: { facts: unknown } } {
  const leaves = here.plant.vault.sqlite.prepare('SELECT leaf FROM log ORDER BY seq DESC').all() as { leaf: string }[]
  return leaves.map(({ leaf }) => JSON.parse(leaf) as { act: string, state: { facts: unknown } }).find(entry => entry.act === act)!
}

describe('ticks between two steps', () => {
  it('are kept with who ticked them, and another person goes on from there', () => {
    const id = madeSafe()
    tick(id, line('reset'))
    tick(id, line('clear'))
    expect(lines(tick(id, line('values'), here.runa))).toEqual(['reset Tobias Achterberg', 'clear Tobias Achterberg', 'values Runa Haldersen'])
    expect(lines(tick(id, line('clear', false)))).toEqual(['reset Tobias Achterberg', 'values Runa Haldersen'])
    const done = tick(id, { tick: 'written' })
    expect(done.ticks).toMatchObject({ kit: null, written: { by: 'Tobias Achterberg' }, verdict: null, motion: null })
    expect(done.step).toBe('read-back')
    expect(done.log.slice(-3).map(({ act, by, text }) => [act, by, text])).toEqual([
      ['ticked', 'Runa Haldersen', 'Done: Words of values.'], ['ticked', 'Tobias Achterberg', 'Not done after all: Words of clear.'], ['ticked', 'Tobias Achterberg', 'All is written, 2 lines.'],
    ])
  })

  it('come after the step they belong to', () => {
    const { id } = here.open()
    expect(codeOf(() => tick(id, { tick: 'kit' }))).toBe('step-missing')
    here.unitIn(id)
    expect(codeOf(() => tick(id, { tick: 'kit' }))).toBe('cautions-unread')
    readCautions(here.plant.vault, here.tobias, id, { read: true })
    expect(tick(id, { tick: 'kit' }).ticks.kit).toMatchObject({ by: 'Tobias Achterberg' })
    expect(codeOf(() => tick(id, line('reset')))).toBe('step-missing')
    here.safe(id)
    expect(codeOf(() => tick(id, { tick: 'verdict', attempt: 1 }))).toBe('step-missing')
    here.readBack(id, here.file())
    expect(codeOf(() => tick(id, { tick: 'verdict', attempt: 2 }))).toBe('input')
    expect(tick(id, { tick: 'verdict', attempt: 1 }).ticks.verdict).toMatchObject({ attempt: 1 })
    expect(codeOf(() => tick(id, { tick: 'motion' }))).toBe('step-missing')
    here.motion(id, ['jog'])
    expect(tick(id, { tick: 'motion' }).ticks.motion).toMatchObject({ by: 'Tobias Achterberg' })
  })

  it('of a device that read an older state are refused with what the other did', () => {
    const id = madeSafe()
    const { rev } = swapOf(here.plant.vault, id)
    tick(id, { ...line('reset'), rev } as SwapTick, here.runa)
    expect(() => tick(id, { ...line('reset'), rev } as SwapTick)).toThrow(expect.objectContaining({ code: 'edited-meanwhile', message: expect.stringContaining('Runa Haldersen: Done: Words of reset.') as string }))
  })

  it('belong to one unit and one set of values: another begins without them', () => {
    const { id } = here.open()
    here.unitIn(id)
    readCautions(here.plant.vault, here.tobias, id, { read: true })
    tick(id, { tick: 'kit' })
    expect(here.unitIn(id).ticks.kit).not.toBeNull()
    expect(here.unitIn(id, 'SN-0050').ticks.kit).toBeNull()
    here.unitIn(id)
    here.safe(id)
    tick(id, line('reset'))
    expect(putOldUnitBack(here.plant.vault, here.tobias, id, { reason: 'the plug was loose' }).ticks.lines).toEqual([])
  })

  it('stop at two hundred lines, and every one stands in the log with the whole swap', () => {
    const id = madeSafe()
    for (let number = 0; number < 200; number += 1) tick(id, line(`line ${number}`))
    expect(codeOf(() => tick(id, line('one more')))).toBe('input')
    expect(tick(id, line('line 7')).ticks.lines).toHaveLength(200)
    const row = here.plant.vault.sqlite.prepare('SELECT facts FROM swap WHERE id = ?').get(id) as { facts: string }
    expect(newest('swap-moved').state.facts).toEqual(JSON.parse(row.facts))
  })
})

describe('the hand-over note', () => {
  it('is kept while it is written, outlives another unit, and goes with the hand-over', () => {
    const { id } = here.open()
    expect(keepNote(here.plant.vault, here.tobias, id, { note: 'Lamp of X4' }).draft).toMatchObject({ note: 'Lamp of X4', by: 'Tobias Achterberg' })
    here.unitIn(id)
    here.safe(id)
    here.readBack(id, here.file())
    here.motion(id)
    expect(keepNote(here.plant.vault, here.runa, id, { note: 'Lamp of X4 is dim.' }).draft).toMatchObject({ note: 'Lamp of X4 is dim.', by: 'Runa Haldersen' })
    expect(sayRunning(here.plant.vault, here.tobias, id, { note: 'Lamp of X4 is dim.' })).toMatchObject({ draft: null, running: { note: 'Lamp of X4 is dim.' } })
  })
})

describe('a fault of the first motion that was repeated', () => {
  it('keeps each time it was told; the newest holds', () => {
    const id = madeSafe()
    here.readBack(id, here.file())
    const told = (outcome: 'ok' | 'fault', text?: string) => recordMotion(here.plant.vault, here.tobias, id, { speedPercent: 10, results: [{ item: 'chain-1', outcome, ...(text ? { text } : {}) }] })
    told('fault', 'stops at 90')
    here.plant.now += 60_000
    told('fault', 'stops at 95')
    expect(codeOf(() => here.running(id))).toBe('motion-fault')
    here.plant.now += 60_000
    const results = told('ok').firstMotion?.results ?? []
    expect(results.map(({ item, outcome, text }) => [item, outcome, text])).toEqual([['chain-1', 'fault', 'stops at 90'], ['chain-1', 'fault', 'stops at 95'], ['chain-1', 'ok', null]])
    expect(new Set(results.map(({ at }) => at)).size).toBe(3)
    expect(here.running(id).step).toBe('release')
  })
})

describe('a swap that runs unreleased for longer than its site allows', () => {
  const letters = () => here.plant.vault.sqlite.prepare('SELECT person_id, title FROM letter WHERE kind = ?').all('swap-unreleased')

  it('is told once to those who watch the axis, not again, and not once it was released', () => {
    watchPlace(here.plant.vault, here.runa, { scope: 'axis', scopeId: here.axisId, watched: true })
    const id = moved()
    here.plant.now += 30 * hour
    // It was opened long ago, but does not run yet: nothing of the kind is told.
    expect(tellUnreleased(here.plant.vault)).toBe(0)
    here.running(id)
    here.plant.now += 23 * hour
    expect(tellUnreleased(here.plant.vault)).toBe(0)
    here.plant.now += 2 * hour
    expect(tellUnreleased(here.plant.vault)).toBe(1)
    expect(letters()).toMatchObject([{ person_id: here.runa.id, title: expect.stringContaining('LID-02.Z') as string }])
    here.plant.now += 30 * hour
    expect(tellUnreleased(here.plant.vault)).toBe(0)
    releaseSwap(here.plant.vault, here.runa, id, { meaning: 'approved' })
    expect(tellUnreleased(here.plant.vault)).toBe(0)
    expect(letters()).toHaveLength(1)
  })
})
