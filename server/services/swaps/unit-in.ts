import type { z } from 'zod'
import type { Swap, swapSourceBody, unitInBody } from '#shared/api/swaps'
import { Refusal } from '#shared/errors/refusal'
import type { FitAnswer } from '#shared/swap/fit'
import type { PersonActor } from '#server/database/actor'
import type { Vault, Write } from '#server/database/client'
import { judgingQueries } from '#server/database/judging/queries'
import { knownGoodQueries } from '#server/database/known-good/queries'
import type { VaultDb } from '#server/database/prepared'
import type { UnitRow } from '#server/database/schema'
import type { SwapFacts, SwapRow } from '#server/database/swap/table'
import { unitRows } from '#server/database/unit/queries'
import { raiseUnfit } from '../findings/causes'
import { tellWatchers } from '../letters/queue'
import { versionRow } from '../versions/read-version'
import { fitAlone } from './fittings'
import { keepPlate, namedUnit } from './named-unit'
import { asFoundOf, readSwap } from './read-swap'
import { fitCase, judgeKit, kitCase, placeOf, type SwapKitCase } from './sides'
import { openSwapRow, takerOf, takeStep, type Moved } from './take-step'

type Body = z.output<typeof unitInBody>

/**
 * With which unit. One that fits counts as fitted from here on; one that does not is remembered with its reasons, and fitted
 * once a planner allowed it. May be said again until the unit is made safe.
 */
export function takeUnitIn(vault: Vault, actor: PersonActor, id: number, body: Body): Swap {
  return vault.write(actor, (write) => {
    const { db } = vault
    const before = openSwapRow(db, write, id, body.rev)
    assertNotSafe(before)
    const unit = unitOf(vault, write, actor, before, body)
    const goes = kitCase(db, placeOf(db, before.axisId), versionRow(db, before.sourceVersionId ?? 0), unit, { ...before, putBack: false })
    const answer = fitCase(db, goes, judgeKit(db, goes), write.now)
    const facts = factsOf(before, write, body, goes, answer)
    const isIn = answer.fit !== 'unfit' || facts.unfit !== undefined
    const sitsThere = judgingQueries(db).openAtAxis.get({ axisId: before.axisId })?.unit.id
    if (isIn) fitAlone(vault, write, actor, before.axisId, unit.id, sitsThere === before.unitOutId ? 'failed' : 'spare')
    else if (sitsThere !== undefined && sitsThere === before.unitInId && sitsThere !== before.unitOutId && sitsThere !== unit.id) fitAlone(vault, write, actor, before.axisId, null, 'spare')
    takeStep(db, write, before, { unitInId: unit.id, putBack: false, fit: answer.fit, facts }, {
      act: 'unit-in', text: words(unit, goes, answer, facts),
      said: { ...body, unitId: unit.id, fit: answer.fit, reasons: answer.reasons, adjustments: goes.kit.adjustments },
    })
    if (facts.unfit && !before.facts.unfit) tellUnfit(db, write, id, goes, answer, facts.unfit)
    return readSwap(db, id, write.now)
  })
}

/** A finding for the auditor, a letter for those who watch the axis. */
function tellUnfit(db: VaultDb, write: Write, swapId: number, { place, unit }: SwapKitCase, { reasons }: FitAnswer, { by, reason, at }: NonNullable<SwapFacts['unfit']>): void {
  const told = { swapId, unitIn: unit.serial, why: reasons.map(({ message }) => message) }
  raiseUnfit(db, write, place, told, () => tellWatchers(db, write, 'unfit-gone-on', place.axis.id, { ...told, at, allowedBy: by, reason }))
}

function assertNotSafe({ facts }: SwapRow): void {
  if (facts.safe) throw new Refusal('already-safe', 'The unit is in and made safe. To take another one, put the old one back first, or abandon this swap.')
}

function unitOf(vault: Vault, write: Write, actor: PersonActor, swap: SwapRow, { serial, channel, model, firmware, actuatorSerial, actuatorModel }: Body): UnitRow {
  const { db } = vault
  const out = swap.unitOutId === null ? undefined : unitRows(db).byId.get({ id: swap.unitOutId })
  const isOut = out !== undefined && out.serial.toLowerCase() === serial.toLowerCase() && (channel ?? out.channel) === out.channel
  if (swap.replaced === 'actuator' && out && !isOut) throw new Refusal('other-unit', `Only the actuator is changed: the drive ${out.serial} stays. Say its serial, and that of the new actuator beside it.`)
  if (swap.replaced !== 'actuator' && isOut) throw new Refusal('same-unit', `${out.serial} is the unit that comes out. Read the plate of the new one; to leave the old one in, put it back or abandon the swap.`)
  const unit = namedUnit(vault, actor, placeOf(db, swap.axisId), { serial, channel, model, firmware, actuatorSerial, actuatorModel }, out?.channel ?? null)
  // A new drive goes to the actuator that stays.
  const stays = swap.replaced === 'drive' && out ? { actuatorSerial: actuatorSerial ?? out.actuatorSerial, actuatorModel: actuatorModel ?? out.actuatorModel } : { actuatorSerial, actuatorModel }
  return keepPlate(vault, write, unit, { firmware, ...stays })
}

function factsOf({ facts, unitInId, rev }: SwapRow, write: Write, { forcesConfirmed, unfit }: Body, { unit, kit }: SwapKitCase, answer: FitAnswer): SwapFacts {
  const same = unitInId === unit.id
  const { forces, unfit: allowed, since, ticks, ...rest } = facts
  const hasForces = kit.adjustments.some(({ newtonsBefore }) => newtonsBefore !== null)
  const confirmed = forcesConfirmed ? { by: takerOf(write), at: write.now, adjustments: kit.adjustments } : forcesConfirmed === undefined && same ? forces : undefined
  const goesOn = answer.fit !== 'unfit' || answer.reasons.some(({ hard }) => hard)
    ? undefined
    : unfit ? { ...unfit, at: pastInstant(unfit.at, write), enteredBy: takerOf(write) } : same ? allowed : undefined
  return {
    ...rest, since: same && since ? since : { rev: rev + 1, at: write.now },
    ...(hasForces && confirmed ? { forces: confirmed } : {}), ...(goesOn ? { unfit: goesOn } : {}), ...(same && ticks ? { ticks } : {}),
  }
}

/** When the planner allowed it on the phone: not later than ten minutes from now, as clocks differ. */
function pastInstant(at: string, { now }: Write): string {
  const instant = new Date(at).toISOString()
  const message = 'The planner cannot have allowed it later than now.'
  if (Date.parse(instant) > Date.parse(now) + 600_000) throw new Refusal('time-order', message, { errors: [{ at: '/unfit/at', code: 'time-order', message }] })
  return instant
}

function words(unit: UnitRow, { kit }: SwapKitCase, { fit, reasons }: FitAnswer, { forces, unfit }: SwapFacts): string {
  const changed = kit.adjustments.length === 0 ? '' : ` ${kit.adjustments.length} values change${forces ? ', read in newtons and confirmed' : ''}.`
  if (fit !== 'unfit') return `${unit.serial} (${unit.model}) goes in.${changed}`
  const why = reasons.map(({ message }) => message).join(' ')
  return unfit ? `${unit.serial} (${unit.model}) goes in though it does not fit: ${why} Allowed by ${unfit.by}: ${unfit.reason}${changed}` : `${unit.serial} (${unit.model}) does not fit: ${why}`
}

/** Which version goes to the new unit: the known-good, or what the old unit held when it was taken out. */
export function chooseSource(vault: Vault, actor: PersonActor, id: number, { rev, versionId, decidedBy, reason }: z.output<typeof swapSourceBody>): Swap {
  return vault.write(actor, (write) => {
    const { db } = vault
    const before = openSwapRow(db, write, id, rev)
    assertNotSafe(before)
    const mark = knownGoodQueries(db).inForce.get({ axisId: before.axisId })?.mark
    const asFound = asFoundOf(db, before)
    if (versionId !== mark?.versionId && versionId !== asFound?.id) {
      const message = 'Either the known-good in force goes back, or the as-found version of this swap.'
      throw new Refusal('input', message, { errors: [{ at: '/versionId', code: 'not-found', message }] })
    }
    const version = versionRow(db, versionId)
    const { forces: _forces, unfit: _unfit, ticks: _ticks, ...facts } = before.facts
    const moved: Moved = { sourceVersionId: versionId, sourceMarkId: versionId === mark?.versionId ? mark.id : null, facts: { ...facts, chosen: { decidedBy, reason } } }
    takeStep(db, write, before, { ...moved, fit: fitAgain(vault, write, { ...before, ...moved }) }, {
      act: 'source', text: `Version ${version.number} goes to the new unit: decided by ${decidedBy}. ${reason}`, said: { versionId, decidedBy, reason },
    })
    return readSwap(db, id, write.now)
  })
}

function fitAgain({ db }: Vault, { now }: Write, swap: SwapRow): SwapRow['fit'] {
  const unit = swap.unitInId === null ? undefined : unitRows(db).byId.get({ id: swap.unitInId })
  if (!unit) return null
  const goes = kitCase(db, placeOf(db, swap.axisId), versionRow(db, swap.sourceVersionId ?? 0), unit, swap)
  return fitCase(db, goes, judgeKit(db, goes), now).fit
}
