import { describe, expect, it } from 'vitest'
import type { BoardAxis } from '#shared/api/board'
import type { Swap } from '#shared/api/swaps'
import { axesByLetters } from '~/utils/swap/find'
import { swapOfCode, tagOfLabel } from '~/utils/swap/label'
import { writeLines } from '~/utils/swap/lines'
import { foldedLog } from '~/utils/swap/log'
import { itemNow, listedItems, resultsOf, secondsWords } from '~/utils/swap/motion'
import type { OutboxEntry } from '~/utils/swap/outbox'
import { noteOf, standingOf, ticksOf } from '~/utils/swap/steps'
import { summaryOf } from '~/utils/swap/summary'
import { listedName, valueName } from '~/utils/swap/words'
import { formatWhen } from '~/utils/dates'
import { attempt, begun, fitted, movedAll, readBack, rescaled, running, safe, swapKit } from '../support/swap-answers'

const waiting = (step: string, value: Record<string, unknown> = {}): OutboxEntry => ({
  key: step, personId: 2, person: 'Tobias Achterberg', swapId: 118, tag: 'LID-02.Z', path: `/api/swaps/118/${step}`, rev: 3, body: { kind: 'json', value }, says: step, enteredAt: '2026-11-30T02:10:00.000Z', refused: null,
})
const by = { by: 'Tobias Achterberg', at: '2026-11-30T02:10:00.000Z' }
const ticked = (swap: Swap, ticks: Partial<Swap['ticks']>): Swap => ({ ...swap, ticks: { ...swap.ticks, ...ticks } })
const open = (swap: Swap, entries: OutboxEntry[] = []) => standingOf(swap, entries).open

describe('the step that is open', () => {
  it('goes by what the vault says was done and ticked, on whichever device', () => {
    expect([open(begun), open(rescaled), open(fitted), open(ticked(fitted, { kit: by })), open(safe), open(ticked(safe, { written: by }))]).toEqual([2, 2, 3, 4, 5, 6])
    const read = ticked(readBack, { verdict: { ...by, attempt: 1 } })
    expect([open(readBack), open(read), open(ticked(read, { motion: by })), open(movedAll), open(running)]).toEqual([6, 7, 8, 8, 9])
    expect([open({ ...running, step: 'released' }), open({ ...safe, step: 'abandoned' })]).toEqual([null, null])
  })

  it('counts what was ticked here and waits, and takes back what was taken back', () => {
    expect([open(fitted, [waiting('ticks', { tick: 'kit' })]), open(safe, [waiting('ticks', { tick: 'written' })]), open(readBack, [waiting('ticks', { tick: 'verdict', attempt: 1 })])]).toEqual([4, 6, 7])
    const { lines } = ticksOf(ticked(safe, { lines: [{ ...by, line: 'reset', words: 'Reset' }, { ...by, line: 'clear', words: 'Clear' }] }), [
      waiting('ticks', { tick: 'line', line: 'reset', words: 'Reset', done: false }), waiting('ticks', { tick: 'line', line: 'values', words: 'Write', done: true }),
    ])
    expect([...lines]).toEqual([['clear', by], ['values', undefined]])
    expect([...standingOf(fitted, [waiting('ticks', { tick: 'kit' })]).waits]).toEqual([3])
  })

  it('has the note that waits here before the one that the vault has', () => {
    const draft = { ...by, note: 'Lamp of X4' }
    expect([noteOf(movedAll, []), noteOf({ ...movedAll, draft }, []), noteOf({ ...movedAll, draft }, [waiting('note', { note: 'a' }), waiting('note', { note: '' })])]).toEqual(['', 'Lamp of X4', ''])
    expect(open(movedAll, [waiting('note', { note: 'a' })])).toBe(8)
  })

  it('stays at the unit while newtons or an unfit unit want a name', () => {
    expect(open({ ...rescaled, step: 'safe' })).toBe(2)
    expect(open({ ...rescaled, step: 'safe', forcesConfirmed: { by: 'Tobias Achterberg', at: '2026-11-30T01:36:00.000Z' } })).toBe(3)
    const unfit = { ...fitted, fit: 'unfit' as const, reasons: [{ code: 'actuator-model' as const, hard: false, message: 'Another actuator.', at: [] }] }
    expect(open(unfit)).toBe(2)
    expect(open({ ...unfit, unfit: { by: 'Runa Haldersen', at: '2026-11-30T01:36:00.000Z', reason: 'no other in the house', enteredBy: 'Tobias Achterberg' } })).toBe(3)
  })

  it('counts no read-back of a unit that went out again', () => {
    const back = { ...safe, putBack: true, readBacks: [attempt(1)], log: [...begun.log, { rev: 8, at: '2026-11-30T09:00:00.000Z', by: 'Tobias Achterberg', act: 'put-back', text: 'HL40-23-00417 went back in.' }] }
    expect(open(back)).toBe(5)
    expect(open({ ...back, step: 'first-motion', readBacks: [attempt(1), attempt(2, { at: '2026-11-30T09:10:00.000Z' })], ticks: { ...back.ticks, verdict: { ...by, attempt: 1 } } })).toBe(6)
  })

  it('stays at the first motion while an item is untried or at fault', () => {
    const motion = movedAll.firstMotion!
    expect(open({ ...movedAll, firstMotion: { ...motion, untried: ['move-1'] } })).toBe(7)
    expect(open({ ...movedAll, firstMotion: { ...motion, results: [...motion.results, { ...motion.results[0]!, outcome: 'fault', text: 'sinks' }] } })).toBe(7)
  })

  it('goes on without reception as far as this device can tell', () => {
    const cut = standingOf(ticked(fitted, { kit: by }), [waiting('safe')])
    expect([cut.open, [...cut.waits]]).toEqual([5, [4]])
    expect(open(fitted, [waiting('safe'), waiting('ticks', { tick: 'written' })])).toBe(6)
    expect(open(readBack, [waiting('first-motion')])).toBe(7)
    expect(open(movedAll, [waiting('running')])).toBe(9)
  })
})

describe('what is written', () => {
  const keys = (...args: Parameters<typeof writeLines>) => writeLines(...args).map(({ key }) => key)
  it('resets and clears first, restarts before anything turns, proves what is to be proved', () => {
    expect(keys(fitted, swapKit)).toEqual(['reset', 'clear', 'values', 'moves', 'restart', 'home', 'zero', 'prove frictionForce'])
    const lines = writeLines(fitted, swapKit, { model: 'HL40-200V', axisKind: 'linear', stroke: 200, maxMoves: 64 })
    expect(lines.map(({ label }) => label)).toEqual(['Reset HL40-25-00958', 'Clear all 64 rows of the move table', 'Write 37 values and 2 zones', 'Write moves 0 to 7', 'Restart the drive', 'Home at creep speed, 5 mm/s', 'Prove the zero at the scribed mark', 'Prove friction, 25 N'])
  })

  it('teaches a zero that is not in the kit', () => {
    const { homeOffset: _, ...setup } = swapKit.content.setup
    expect(writeLines(fitted, { ...swapKit, content: { ...swapKit.content, setup }, prove: [] }).find(({ key }) => key === 'zero')?.label).toBe('Teach the zero at the scribed mark')
  })

  it('leaves a drive that stays alone', () => {
    expect(keys({ ...fitted, replaced: 'actuator' }, { ...swapKit, prove: [] })).toEqual(['values', 'restart', 'home', 'zero'])
    expect(writeLines({ ...fitted, replaced: 'actuator' }, swapKit)[0]?.label).toBe('The drive keeps its values')
  })
})

describe('what was done', () => {
  const line = (rev: number, act: string, who = 'Tobias Achterberg') => ({ rev, at: '2026-11-30T02:10:00.000Z', by: who, act, text: `${act} ${rev}` })
  it('stands newest first, ticks of one person in a row as one', () => {
    const log = [line(1, 'opened'), line(2, 'ticked'), line(3, 'ticked'), line(4, 'ticked', 'Runa Haldersen'), line(5, 'ticked', 'Runa Haldersen'), line(6, 'read-back'), line(7, 'read-back'), line(8, 'note')]
    expect(foldedLog(log).map(({ newest, before }) => [newest.rev, ...before.map(({ rev }) => rev)])).toEqual([[8], [7], [6], [5, 4], [3, 2], [1]])
  })
})

describe('the list of the first motion', () => {
  const items = listedItems(swapKit.firstMotion, resultsOf({ ...readBack, firstMotion: { speedPercent: 10, untried: [], results: [{ item: 'jog', outcome: 'fault', text: 'wrong way', by: 'T', at: '2026-11-30T08:40:00.000Z' }] } }, [waiting('first-motion', { speedPercent: 10, results: [{ item: 'jog', outcome: 'ok' }, { item: 'brake-hold', outcome: 'fault', text: 'sinks' }] })]))

  it('takes the newest result, those that wait here among them, and keeps what was said before', () => {
    expect(items.map(({ state }) => state)).toEqual(['ok', 'fault', 'to come', 'to come'])
    expect(items[0]?.results.map(({ outcome, waits }) => [outcome, waits])).toEqual([['ok', true], ['fault', false]])
  })

  it('stands at the first that is not as it should, or at what was asked for', () => {
    expect([itemNow(items)?.item, itemNow(items, 'chain-3')?.item]).toEqual(['brake-hold', 'chain-3'])
  })

  it('rounds a longest time up', () => {
    expect([secondsWords({ seconds: 1.01, atLeast: false }), secondsWords({ seconds: 2, atLeast: true }), secondsWords({ seconds: null, atLeast: false })]).toEqual(['1.1 s', 'at least 2.0 s', ''])
  })
})

describe('three characters of a tag', () => {
  const axes = ['LID-02.Z', 'LID-12.Z', 'CAS-02.X', 'LID-02.C'].map((tag, id) => ({ id, tag }) as unknown as BoardAxis)
  it('find it without dots and dashes, those that end in them first', () => {
    expect(axesByLetters(axes, '02z').map(({ tag }) => tag)).toEqual(['LID-02.Z'])
    expect(axesByLetters(axes, '2 Z').map(({ tag }) => tag)).toEqual(['LID-02.Z', 'LID-12.Z'])
    expect(axesByLetters(axes, 'd02').map(({ tag }) => tag)).toEqual(['LID-02.C', 'LID-02.Z'])
    expect(axesByLetters(axes, ' . ')).toEqual([])
  })
})

describe('a label', () => {
  it('says its tag by address or bare; anything else is none of ours', () => {
    expect(['https://vault.example/axes/LID-02.Z', 'http://10.0.0.4:3000/axes/A%2E1/?x=1#y', 'LID-02.Z'].map(tagOfLabel)).toEqual(['LID-02.Z', 'A.1', 'LID-02.Z'])
    expect(['https://vault.example/swaps/118', '/swaps/9/?x=1#y'].map(swapOfCode)).toEqual([118, 9])
    expect(['https://vault.example/axes/LID-02.Z', '/swaps/', '/swaps/0', '/swaps/9x', '118'].map(swapOfCode)).toEqual([undefined, undefined, undefined, undefined, undefined])
    expect(['https://vault.example/units/7', 'WIFI:S:plant;;', '/axes/%E0%A4%A', ''].map(tagOfLabel)).toEqual([undefined, undefined, undefined, undefined])
  })
})

describe('words', () => {
  const when = (iso: string) => formatWhen(iso, 'Europe/Berlin', new Date('2026-11-30T10:00:00Z'))
  it('name a value where it stands by itself', () => {
    expect(valueName({ section: 'setup', field: 'homingForceLimit' }, 'linear')).toEqual({ label: 'Homing force limit', place: 'setup', unit: '%' })
    expect(valueName({ section: 'move', row: 3, field: 'dwell' }, 'linear').place).toBe('move 3')
    expect([listedName('velocityGain', 'linear'), listedName('extra:K-017', 'linear')]).toMatchObject([{ label: 'Velocity gain', unit: 'drive’s own' }, { label: 'K-017' }])
  })

  it('put the clock and its zone first, the day where it is another', () => {
    expect([when('2026-11-30T01:19:00Z'), when('2026-11-29T01:19:00Z'), when('2025-06-02T10:00:00Z')]).toEqual(['02:19 CET', 'Sun 29 Nov 02:19 CET', 'Mon 2 Jun 2025 12:00 CEST'])
  })

  it('say a done step in a line', () => {
    const done = (swap: typeof begun, step: Parameters<typeof summaryOf>[1]) => summaryOf(swap, step, true, when)
    expect(done(running, 1)).toBe('02:19 CET, Tobias Achterberg. Whole unit HL40-23-00417, encoder fault.')
    expect(done({ ...rescaled, forcesConfirmed: { by: 'Tobias Achterberg', at: '2026-11-30T01:36:00.000Z' } }, 2)).toBe('HL50-25-01203, 2 values rescaled, confirmed by Tobias Achterberg.')
    expect(done(running, 4)).toBe('03:05 CET, Tobias Achterberg. Blocked: pin.')
    expect([done(running, 5), done(ticked(running, { written: by, lines: [{ ...by, line: 'reset', words: 'Reset' }] }), 5)]).toEqual(['Written, line by line.', '1 line written, 03:10 CET, Tobias Achterberg.'])
    expect(done({ ...running, readBacks: [attempt(1, { compare: null, problem: 'serial' })] }, 6)).toBe('Not taken, 09:02 CET, Tobias Achterberg. 1 attempt.')
    expect(done(running, 7)).toBe('4 items at 10 %, all as they should.')
    expect(summaryOf(running, 9, false, when)).toBe('A planner signs, by day')
  })
})
