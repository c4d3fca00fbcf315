import type { z } from 'zod'
import type { Unit, unitBody, unitPatch, unitQuery } from '#shared/api/places'
import { Refusal } from '#shared/errors/refusal'
import { boundsText } from '#server/database/bounds'
import type { Actor, PersonActor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { orRefuse } from '#server/database/constraints'
import { insertUnit, unitRows, updateUnit } from '#server/database/unit/queries'
import type { UnitRow, UnitState } from '#server/database/unit/table'
import { refreshAxisState } from '../axes/axis-state'
import { afterOf, limitOf, pageOf } from '../page'
import { assertPlace } from '../places/bounds'
import { assertRev, named } from '../rev'

const serialTaken = 'A unit of this serial and channel is registered; case makes no difference.'

interface Placed { readonly unit: UnitRow, readonly axisId: number | null, readonly axisTag: string | null, readonly modelKnown: number }

const unitOut = ({ unit: { madeAt: _made, ...rest }, axisId, axisTag, modelKnown }: Placed): Unit =>
  ({ ...rest, axis: axisId === null || axisTag === null ? null : { id: axisId, tag: axisTag }, modelKnown: modelKnown === 1 })

function placedUnit(vault: Vault, id: number): Placed {
  const found = unitRows(vault.db).placed.get({ id })
  if (found === undefined) throw new Refusal('not-found', `There is no unit ${id}.`)
  return found
}

export const readUnit = (vault: Vault, id: number): Unit => unitOut(placedUnit(vault, id))

export function listUnits(vault: Vault, actor: Actor, query: z.output<typeof unitQuery>) {
  const { search, state = null, model = null } = query
  const rows = unitRows(vault.db).page.all({ after: afterOf(query), limit: limitOf(query) + 1, sites: boundsText(actor.sites), search: search?.toLowerCase() ?? null, state, model })
  return pageOf(rows, query, ({ unit }) => unit.id, unitOut)
}

export function registerUnit(vault: Vault, actor: PersonActor, body: z.output<typeof unitBody>): { id: number } {
  return vault.write(actor, (write) => {
    if (body.siteId !== undefined) assertPlace(vault, actor, 'site', body.siteId, '/siteId')
    assertNotFittedByHand(body.state)
    const row = orRefuse(serialTaken, '/serial', () => insertUnit(vault.db, { ...body, state: body.state ?? 'spare', madeAt: write.now }))
    write.log({ act: 'unit-registered', id: row.id, state: row })
    return { id: row.id }
  })
}

export function changeUnit(vault: Vault, actor: PersonActor, id: number, patch: z.output<typeof unitPatch>): Unit {
  return vault.write(actor, (write) => {
    const before = placedUnit(vault, id)
    assertRev(patch.rev, before.unit.rev, () => unitOut(before))
    if (typeof patch.siteId === 'number') assertPlace(vault, actor, 'site', patch.siteId, '/siteId')
    if (patch.state !== undefined && patch.state !== before.unit.state) {
      assertNotFittedByHand(patch.state)
      if (before.axisTag !== null) throw new Refusal('fitted', `The unit sits at ${before.axisTag}. End the fitting first; that says what the unit is then.`)
    }
    const after = { ...before.unit, ...named(patch), rev: before.unit.rev + 1 }
    updateUnit(vault.db, after)
    write.log({ act: 'unit-changed', id, state: after })
    // Another model means another nameplate, and with it another reading of what differs.
    if (before.axisId !== null) refreshAxisState(vault.db, before.axisId)
    return readUnit(vault, id)
  })
}

function assertNotFittedByHand(state: UnitState | undefined): void {
  if (state === 'fitted') throw new Refusal('not-fitted', 'A unit becomes fitted by saying at which axis it sits since when.')
}
