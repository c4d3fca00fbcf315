import type { z } from 'zod'
import type { noteBody, Swap, SwapTick } from '#shared/api/swaps'
import { Refusal } from '#shared/errors/refusal'
import type { SwapStep } from '#shared/swap/types'
import type { PersonActor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import type { By, SwapRow, SwapTicks } from '#server/database/swap/table'
import { attemptsOf } from './facts'
import { readSwap } from './read-swap'
import { byNow, openSwapRow, takeStep } from './take-step'

/** The step that a tick belongs to: those before it are done. */
const stepOfTick: Readonly<Record<SwapTick['tick'], SwapStep>> = { kit: 'safe', line: 'read-back', written: 'read-back', verdict: 'first-motion', motion: 'running' }

/** Most lines of one unit that are kept ticked. */
const mostLines = 200

/** What was done between two steps, one tick at a time, so that another device goes on from there. */
export function tickDone(vault: Vault, actor: PersonActor, id: number, tick: SwapTick): Swap {
  return vault.write(actor, (write) => {
    const { db } = vault
    const before = openSwapRow(db, write, id, tick.rev, stepOfTick[tick.tick])
    if (tick.tick === 'kit' && before.facts.cautions === undefined) throw new Refusal('cautions-unread', 'Read the cautions first; then take the kit.')
    if (tick.tick === 'verdict' && !attemptsOf(db, before).some(({ readBack }) => readBack.attempt === tick.attempt && readBack.versionId !== null)) throw refusedAt('/attempt', 'not-found', `There is no verdict of read-back ${tick.attempt} of this unit.`)
    const ticks = withTick(before.facts.ticks ?? {}, tick, byNow(write))
    if ((ticks.lines?.length ?? 0) > mostLines) throw refusedAt('/line', 'too-many', `At most ${mostLines} lines are kept.`)
    takeStep(db, write, before, { facts: { ...before.facts, ticks } }, { act: 'ticked', text: tickWords(tick, before), said: tick })
    return readSwap(db, id, write.now)
  })
}

function withTick(ticks: SwapTicks, tick: SwapTick, by: By): SwapTicks {
  switch (tick.tick) {
    case 'line': {
      const others = (ticks.lines ?? []).filter(({ line }) => line !== tick.line)
      return { ...ticks, lines: tick.done ? [...others, { ...by, line: tick.line, words: tick.words }] : others }
    }
    case 'verdict': return { ...ticks, verdict: { ...by, attempt: tick.attempt } }
    default: return { ...ticks, [tick.tick]: by }
  }
}

function tickWords(tick: SwapTick, { facts }: SwapRow): string {
  switch (tick.tick) {
    case 'kit': return 'The kit is in hand.'
    case 'line': return `${tick.done ? 'Done' : 'Not done after all'}: ${tick.words}.`
    case 'written': return `All is written, ${facts.ticks?.lines?.length ?? 0} lines.`
    case 'verdict': return `The verdict of read-back ${tick.attempt} was read; on to first motion.`
    case 'motion': return 'The first motion is left as it stands; on to running.'
  }
}

/** The hand-over note as far as it is written: whoever goes on finds it, and hands it over with `running`. */
export function keepNote(vault: Vault, actor: PersonActor, id: number, { rev, note }: z.output<typeof noteBody>): Swap {
  return vault.write(actor, (write) => {
    const before = openSwapRow(vault.db, write, id, rev)
    const draft = { ...byNow(write), note }
    takeStep(vault.db, write, before, { facts: { ...before.facts, draft } }, { act: 'note', text: note === '' ? 'The hand-over note was emptied.' : `Hand-over note, not handed over yet: ${note}`, said: draft })
    return readSwap(vault.db, id, write.now)
  })
}

const refusedAt = (at: string, code: string, message: string) => new Refusal('input', message, { errors: [{ at, code, message }] })
