import type { z } from 'zod'
import type { releaseBody, Swap } from '#shared/api/swaps'
import { Refusal } from '#shared/errors/refusal'
import type { PersonActor } from '#server/database/actor'
import type { Vault, Write } from '#server/database/client'
import { knownGoodQueries } from '#server/database/known-good/queries'
import type { VaultDb } from '#server/database/prepared'
import type { NamedReadBack } from '#server/database/swap/queries'
import type { SwapRow } from '#server/database/swap/table'
import { unitRows } from '#server/database/unit/queries'
import { carryMarkOver } from '../known-good/mark'
import { tellWatchers } from '../letters/queue'
import { changeUnit } from '../units/units'
import { versionRow } from '../versions/read-version'
import { asLeftOf, attemptsOf, lastCompared } from './facts'
import { verdictNow } from './read-back-view'
import { readSwap } from './read-swap'
import { placeOf } from './sides'
import { openSwapRow, takerOf, takeStep } from './take-step'

type Words = Omit<z.output<typeof releaseBody>, 'password'>

/**
 * A planner signs, by day, and not the one who sent the last read-back. Where the axis was left with the kit's values the mark
 * carries over to them; values that differ have to be marked known-good on their own first.
 */
export function releaseSwap(vault: Vault, actor: PersonActor, id: number, { rev, meaning, note, oldUnitState }: Words): Swap {
  return vault.write(actor, (write) => {
    const { db } = vault
    const before = openSwapRow(db, write, id, rev, 'release')
    const attempts = attemptsOf(db, before)
    const last = lastCompared(attempts)
    assertAnother(db, before, write, last)
    const asLeft = asLeftOf(before, attempts)
    assertNothingDiffers(db, before, asLeft ?? last)
    const carriedOver = carries(db, before, asLeft)
    if (carriedOver && asLeft) carryMarkOver(db, write, versionRow(db, asLeft.readBack.versionId ?? 0), before.sourceVersionId ?? 0, { meaning, note: note ?? `Carried over by swap ${id}.` })
    const left = oldUnitState === undefined ? null : settleOldUnit(vault, actor, before, oldUnitState)
    const said = { by: takerOf(write), at: write.now, meaning, note: note ?? null, carriedOver, oldUnitState: left }
    const words = carriedOver ? `the mark names version ${asLeft?.number} now` : 'no mark carries over'
    takeStep(db, write, before, { facts: { ...before.facts, released: said } }, { act: 'released', text: `Released; ${words}.${note ? ` ${note}` : ''}`, said })
    const released = readSwap(db, id, write.now)
    const mark = knownGoodQueries(db).inForce.get({ axisId: before.axisId })?.mark.versionId
    tellWatchers(db, write, 'swap-released', before.axisId, {
      swapId: id, at: write.now, by: actor.name, unitOut: released.unitOut?.serial ?? 'none', unitIn: released.unitIn?.serial ?? 'none', knownGood: mark ? versionRow(db, mark).number : null,
    })
    return released
  })
}

function assertAnother(db: VaultDb, swap: SwapRow, write: Write, last: NamedReadBack | undefined): void {
  if (last?.readBack.byPerson !== takerOf(write) || !placeOf(db, swap.axisId).site.fourEyes) return
  const message = `You sent the last read-back (attempt ${last.readBack.attempt}): another planner releases it.`
  throw new Refusal('four-eyes', message, { errors: [{ at: '', code: 'four-eyes', message }] })
}

function assertNothingDiffers(db: VaultDb, { axisId }: SwapRow, attempt: NamedReadBack | undefined): void {
  if (!attempt || verdictNow(db, attempt) !== 'differs') return
  if (knownGoodQueries(db).inForce.get({ axisId })?.mark.versionId === attempt.readBack.versionId) return
  const { compared } = attempt.readBack
  const errors = (compared?.differences ?? []).slice(0, 100).map(({ at, field, before, after }) => ({ at, code: 'read-back-differs', message: `${field}: kit ${String(before ?? 'none')}, unit ${String(after ?? 'none')}` }))
  const gaps = (compared?.missingKeys ?? []).map(({ key }) => ({ at: '', code: 'missing', message: `${key} is not in the read-back` }))
  throw new Refusal('read-back-differs', `Version ${attempt.number} differs from the kit. Write the values again and read back; or mark version ${attempt.number} known-good, if that is what the axis is to hold, and release then.`, { errors: [...errors, ...gaps], more: Math.max(0, (compared?.differences.length ?? 0) - 100) })
}

/** What was left is the same as the kit made from a known-good that still is it. */
function carries(db: VaultDb, { axisId, sourceMarkId }: SwapRow, asLeft: NamedReadBack | undefined): boolean {
  const verdict = asLeft && verdictNow(db, asLeft)
  return (verdict === 'identical' || verdict === 'same') && sourceMarkId !== null && knownGoodQueries(db).inForce.get({ axisId })?.mark.id === sourceMarkId
}

/** What becomes of the unit that came out; one that sits somewhere again is left as it is. */
function settleOldUnit(vault: Vault, actor: PersonActor, { unitOutId, unitInId }: SwapRow, state: 'repair' | 'scrapped' | 'spare'): typeof state | null {
  const unit = unitOutId === null || unitOutId === unitInId ? undefined : unitRows(vault.db).byId.get({ id: unitOutId })
  if (!unit || unit.state === 'fitted') return null
  changeUnit(vault, actor, unit.id, { rev: unit.rev, state })
  return state
}
