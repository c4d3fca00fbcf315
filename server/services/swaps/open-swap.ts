import type { z } from 'zod'
import type { Swap, swapOpenBody } from '#shared/api/swaps'
import { Refusal } from '#shared/errors/refusal'
import type { PersonActor } from '#server/database/actor'
import type { Vault, Write } from '#server/database/client'
import { judgingQueries } from '#server/database/judging/queries'
import { knownGoodQueries } from '#server/database/known-good/queries'
import type { VaultDb } from '#server/database/prepared'
import type { UnitRow } from '#server/database/schema'
import { swapQueries } from '#server/database/swap/queries'
import { unitRows } from '#server/database/unit/queries'
import { versionQueries } from '#server/database/version/queries'
import { refreshAxisState } from '../axes/axis-state'
import { assertPlace } from '../places/bounds'
import { fitAlone } from './fittings'
import { namedUnit } from './named-unit'
import { readSwap } from './read-swap'
import { placeOf } from './sides'
import { logStep, takerOf } from './take-step'

const replacedWords = { unit: 'the whole unit', drive: 'the drive alone', actuator: 'the actuator alone' } as const

/** Begins a swap. What goes to the new unit is the known-good in force, else the newest version, which is then not released. */
export function openSwap(vault: Vault, actor: PersonActor, body: z.output<typeof swapOpenBody>): Swap {
  return vault.write(actor, (write) => {
    const { db } = vault
    assertPlace(vault, actor, 'axis', body.axisId, '/axisId')
    const place = placeOf(db, body.axisId)
    const open = swapQueries(db).openAtAxis.get({ axisId: body.axisId })
    if (open) throw new Refusal('swap-open', `A swap of ${place.axis.tag} is open since ${open.openedAt.slice(0, 16).replace('T', ' ')} UTC. Go on with that one.`, { current: { id: open.id, step: open.step } })
    const source = sourceOf(db, body.axisId)
    const unitOut = body.unitOut ? corrected(vault, write, actor, body.axisId, body.unitOut) : judgingQueries(db).openAtAxis.get({ axisId: body.axisId })?.unit
    const facts = body.replaced === 'actuator' && unitOut ? { actuatorOut: { serial: unitOut.actuatorSerial, model: unitOut.actuatorModel } } : {}
    const row = {
      rev: 1, axisId: body.axisId, replaced: body.replaced, failure: body.failure, workOrder: body.workOrder ?? null, step: 'unit-in' as const,
      unitOutId: unitOut?.id ?? null, unitInId: null, putBack: false, fit: null, ...source, facts, openedAt: write.now, openedBy: takerOf(write), changedAt: write.now, runningAt: null,
    }
    if (body.replaced === 'actuator' && !unitOut) throw new Refusal('not-fitted', 'No unit sits at this axis: which drive keeps its place?')
    const id = swapQueries(db).insert(row)
    const text = `Swap opened: ${unitOut?.serial ?? 'an axis without a unit'}, ${replacedWords[body.replaced]}. ${body.failure}`
    logStep(db, write, swapQueries(db), { swapId: id, rev: 1, act: 'opened', text, said: { replaced: body.replaced, failure: body.failure, unitOutId: row.unitOutId, ...source } })
    write.log({ act: 'swap-opened', id, state: { id, ...row }, note: text })
    refreshAxisState(db, body.axisId)
    return readSwap(db, id, write.now)
  })
}

function sourceOf(db: VaultDb, axisId: number): { sourceVersionId: number, sourceMarkId: number | null } {
  const inForce = knownGoodQueries(db).inForce.get({ axisId })?.mark
  if (inForce?.versionId) return { sourceVersionId: inForce.versionId, sourceMarkId: inForce.id }
  const newest = versionQueries(db).current.get({ axisId })
  if (!newest) throw new Refusal('no-known-good', 'This axis was never read: there is nothing to bring over. If the old unit still talks, upload its as-found file first.')
  return { sourceVersionId: newest.id, sourceMarkId: null }
}

/** The unit on the plate is not the one that the vault believed: the register follows the plate. */
function corrected(vault: Vault, write: Write, actor: PersonActor, axisId: number, named: { serial: string, channel?: number | undefined, model?: string | undefined }): UnitRow {
  const place = placeOf(vault.db, axisId)
  const believed = judgingQueries(vault.db).openAtAxis.get({ axisId })?.unit
  const unit = namedUnit(vault, actor, place, named, believed?.channel ?? null)
  if (unit.id !== believed?.id) fitAlone(vault, write, actor, axisId, unit.id, 'spare')
  return unitRows(vault.db).byId.get({ id: unit.id }) ?? unit
}
