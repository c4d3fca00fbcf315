import type { z } from 'zod'
import type { abandonBody, putBackBody, Swap } from '#shared/api/swaps'
import { Refusal } from '#shared/errors/refusal'
import type { PersonActor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { judgingQueries } from '#server/database/judging/queries'
import type { SwapFacts } from '#server/database/swap/table'
import { unitRows } from '#server/database/unit/queries'
import { assertPlace } from '../places/bounds'
import { versionRow } from '../versions/read-version'
import { fitAlone } from './fittings'
import { keepPlate } from './named-unit'
import { readSwap } from './read-swap'
import { fitCase, judgeKit, kitCase, placeOf } from './sides'
import { openSwapRow, takerOf, takeStep } from './take-step'

/** The swap ends without a release; says which unit truly sits there. */
export function abandonSwap(vault: Vault, actor: PersonActor, id: number, { rev, reason, fittedUnitId }: z.output<typeof abandonBody>): Swap {
  return vault.write(actor, (write) => {
    const { db } = vault
    const before = openSwapRow(db, write, id, rev)
    const sitsThere = judgingQueries(db).openAtAxis.get({ axisId: before.axisId })?.unit
    const fitted = fittedUnitId === null ? undefined : unitRows(db).placed.get({ id: fittedUnitId })
    if (fittedUnitId !== null) {
      assertPlace(vault, actor, 'unit', fittedUnitId, '/fittedUnitId')
      if (fitted?.axisId && fitted.axisId !== before.axisId) throw new Refusal('fitted', `${fitted.unit.serial} sits at ${fitted.axisTag ?? 'another axis'}. End that fitting first.`)
    }
    fitAlone(vault, write, actor, before.axisId, fittedUnitId, sitsThere?.id === before.unitOutId ? 'failed' : 'spare')
    const said = { by: takerOf(write), at: write.now, reason }
    takeStep(db, write, before, { facts: { ...before.facts, abandoned: said } }, {
      act: 'abandoned', text: `Abandoned; ${fitted ? `${fitted.unit.serial} sits there` : 'no unit sits there'}. ${reason}`, said: { ...said, fittedUnitId },
    })
    return readSwap(db, id, write.now)
  })
}

/** The old unit goes back in, with the values that are its own; the same job goes on from making it safe. */
export function putOldUnitBack(vault: Vault, actor: PersonActor, id: number, { rev, reason, unitState }: z.output<typeof putBackBody>): Swap {
  return vault.write(actor, (write) => {
    const { db } = vault
    const before = openSwapRow(db, write, id, rev)
    const old = before.unitOutId === null ? undefined : unitRows(db).byId.get({ id: before.unitOutId })
    if (!old) throw new Refusal('not-fitted', 'No unit sat at this axis before: there is none to put back.')
    if (before.putBack || before.unitInId === null) throw new Refusal('already-back', `${old.serial} is in: ${before.putBack ? 'it was put back already' : 'no other unit was taken in yet'}.`)
    const { actuatorOut } = before.facts
    const unit = actuatorOut ? keepPlate(vault, write, old, { actuatorSerial: actuatorOut.serial, actuatorModel: actuatorOut.model }) : old
    fitAlone(vault, write, actor, before.axisId, unit.id, unitState ?? 'spare')
    const { forces: _forces, unfit: _unfit, safe: _safe, firstMotion: _motion, running: _running, ticks: _ticks, ...kept } = before.facts
    const facts: SwapFacts = { ...kept, since: { rev: before.rev + 1, at: write.now } }
    const goes = kitCase(db, placeOf(db, before.axisId), versionRow(db, before.sourceVersionId ?? 0), unit, { ...before, putBack: true, facts })
    // The unit sat here until tonight: that its values have stops is told, and keeps nobody from putting it back.
    const { fit } = fitCase(db, goes, judgeKit(db, goes), write.now)
    takeStep(db, write, before, { unitInId: unit.id, putBack: true, fit: fit === 'unfit' ? 'same' : fit, facts, runningAt: null }, {
      act: 'put-back', text: `${unit.serial} goes back in. ${reason}`, said: { reason, unitId: unit.id, unitState: unitState ?? 'spare' },
    })
    return readSwap(db, id, write.now)
  })
}
