import { Refusal } from '#shared/errors/refusal'
import { missingFor } from '#shared/swap/steps'
import type { SwapStep } from '#shared/swap/types'
import type { Write } from '#server/database/client'
import { personOf } from '#server/database/actor'
import type { VaultDb } from '#server/database/prepared'
import { swapQueries, updateSwap } from '#server/database/swap/queries'
import type { SwapRow } from '#server/database/swap/table'
import { refreshAxisState } from '../axes/axis-state'
import { attemptsOf, progressOf, stepNow } from './facts'
import { readSwap } from './read-swap'

/** The swap of an id, open, at the rev that the sender read, with all steps before `step` done. */
export function openSwapRow(db: VaultDb, write: Write, id: number, rev: number | undefined, step?: SwapStep): SwapRow {
  const row = swapRow(db, id)
  if (row.step === 'released' || row.step === 'abandoned') throw new Refusal('swap-closed', `This swap was ${row.step} already. What comes now is a new one.`, { current: readSwap(db, id, write.now) })
  if (rev !== undefined && rev !== row.rev) {
    const since = swapQueries(db).steps.all({ swapId: id }).filter(entry => entry.rev > rev).map(({ by, text }) => `${by}: ${text}`)
    throw new Refusal('edited-meanwhile', `Another device went on meanwhile. ${since.join(' ')}`, { current: readSwap(db, id, write.now) })
  }
  if (step !== undefined) assertReached(db, row, step)
  return row
}

export function swapRow(db: VaultDb, id: number): SwapRow {
  const row = swapQueries(db).byId.get({ id })
  if (!row) throw new Refusal('not-found', 'There is no such swap.')
  return row
}

const stepWords: Readonly<Record<SwapStep, string>> = {
  'unit-in': 'say with which unit', 'safe': 'make it safe', 'read-back': 'write and read back', 'first-motion': 'first motion', 'running': 'say that it runs', 'release': 'release',
}

function assertReached(db: VaultDb, row: SwapRow, step: SwapStep): void {
  const missing = missingFor(step, progressOf(row, attemptsOf(db, row)))
  if (missing.length > 0) throw new Refusal('step-missing', `Before that: ${missing.map(each => stepWords[each]).join(', then ')}.`, { missing })
}

/** A person, or the owner of a token, who takes the step. */
export function takerOf({ actor }: Write): number {
  const person = personOf(actor)
  if (person === null) throw new Refusal('role', 'A step of a swap is taken by a person.')
  return person
}

export const byNow = (write: Write) => ({ by: takerOf(write), at: write.now })

export interface Step {
  /** What was done, as the route says it. */
  readonly act: string
  /** In words, for the other device and the log. */
  readonly text: string
  readonly said: Readonly<Record<string, unknown>>
}

/** What a step changes of where the swap stands. */
export type Moved = Partial<Omit<SwapRow, 'id' | 'rev' | 'axisId' | 'step' | 'changedAt'>>

/** Takes the next rev: the step as it was said, and where the swap stands then. Both are logged. */
export function takeStep(db: VaultDb, write: Write, before: SwapRow, moved: Moved, step: Step): SwapRow {
  const queries = swapQueries(db)
  const rev = before.rev + 1
  const next = { ...before, ...moved, rev, changedAt: write.now }
  const after: SwapRow = { ...next, facts: definedOnly(next.facts), step: stepNow(next, attemptsOf(db, next)) }
  updateSwap(db, after)
  logStep(db, write, queries, { swapId: before.id, rev, ...step })
  write.log({ act: 'swap-moved', id: after.id, state: after, note: step.text })
  refreshAxisState(db, after.axisId)
  return after
}

export function logStep(db: VaultDb, write: Write, queries: ReturnType<typeof swapQueries>, { swapId, rev, act, text, said }: Step & { swapId: number, rev: number }): void {
  const row = { swapId, rev, act, at: write.now, byPerson: takerOf(write), text, said: definedOnly(said) }
  const id = queries.insertStep(row)
  write.log({ act: 'swap-step', id, state: { id, ...row } })
}

/** A log entry and a stored fact have no place for undefined. */
const definedOnly = <Value extends object>(value: Value): Value => JSON.parse(JSON.stringify(value)) as Value
