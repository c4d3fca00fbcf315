import type { z } from 'zod'
import type { Fitting, fittingBody, fittingEndBody } from '#shared/api/places'
import { Refusal } from '#shared/errors/refusal'
import type { Actor } from '#server/database/actor'
import type { Vault, Write } from '#server/database/client'
import { orRefuse } from '#server/database/constraints'
import { closeFitting, fittingRows, insertFitting } from '#server/database/fitting/queries'
import type { FittingRow } from '#server/database/fitting/table'
import { unitRows, updateUnit } from '#server/database/unit/queries'
import type { UnitRow, UnitState } from '#server/database/unit/table'
import { refreshAxisState } from '../axes/axis-state'
import { assertPlace } from '../places/bounds'

/** How far ahead of the vault's clock a person's may run, ms. */
const clockSlack = 10 * 60 * 1000

interface Named extends FittingRow { readonly axisTag: string, readonly serial: string }
const fittingOut = ({ fromAt, toAt, madeAt: _made, ...rest }: Named): Fitting => ({ ...rest, from: fromAt, to: toAt })

/** A unit sits at an axis since `at`; the unit becomes fitted and lies at the axis' site. Throws `overlaps` where either is taken. */
export function openFitting(vault: Vault, actor: Actor, { axisId, unitId, at }: z.output<typeof fittingBody>): { id: number } {
  return vault.write(actor, (write) => {
    const siteId = assertPlace(vault, actor, 'axis', axisId, '/axisId')
    assertPlace(vault, actor, 'unit', unitId, '/unitId')
    const fromAt = pastInstant(at, write)
    const row = orRefuse('The axis or the unit is taken in that time. End the other fitting first.', '/at', () => insertFitting(vault.db, { axisId, unitId, fromAt, madeAt: write.now }))
    write.log({ act: 'fitting-opened', id: row.id, state: row })
    moveUnit(vault, write, unitId, { state: 'fitted', siteId })
    refreshAxisState(vault.db, axisId)
    return { id: row.id }
  })
}

/** The unit was taken out at `at`, and what it is now. */
export function endFitting(vault: Vault, actor: Actor, id: number, { at, unitState }: z.output<typeof fittingEndBody>): Fitting {
  return vault.write(actor, (write) => {
    const before = fittingRows(vault.db).byId.get({ id })
    if (before === undefined) throw new Refusal('not-found', `There is no fitting ${id}.`)
    if (before.toAt !== null) throw new Refusal('already-ended', 'This fitting has ended already.')
    const toAt = pastInstant(at, write)
    if (toAt < before.fromAt) throw timeOrder(`It was fitted at ${before.fromAt}, after that.`)
    closeFitting(vault.db, id, toAt)
    write.log({ act: 'fitting-closed', id, state: { ...before, toAt } })
    moveUnit(vault, write, before.unitId, { state: unitState })
    refreshAxisState(vault.db, before.axisId)
    return fittingOut(fittingRows(vault.db).named.get({ id }) as Named)
  })
}

function moveUnit(vault: Vault, write: Write, id: number, fields: { state: UnitState, siteId?: number | null }): void {
  const before = unitRows(vault.db).byId.get({ id }) as UnitRow
  const after = { ...before, ...fields, rev: before.rev + 1 }
  updateUnit(vault.db, after)
  write.log({ act: 'unit-changed', id, state: after })
}

function pastInstant(at: string, { now }: Write): string {
  const instant = new Date(at).toISOString()
  if (Date.parse(instant) > Date.parse(now) + clockSlack) throw timeOrder('That lies in the future.')
  return instant
}

const timeOrder = (message: string) => new Refusal('time-order', message, { errors: [{ at: '/at', code: 'time-order', message }] })
