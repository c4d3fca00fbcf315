import type { z } from 'zod'
import type { axisBody, axisPatch } from '#shared/api/places'
import type { Axis } from '#shared/api/versions'
import { Refusal } from '#shared/errors/refusal'
import type { PersonActor } from '#server/database/actor'
import { axisRows, insertAxis, updateAxis } from '#server/database/axis/queries'
import type { AxisRow } from '#server/database/axis/table'
import type { Vault } from '#server/database/client'
import { orRefuse } from '#server/database/constraints'
import { refreshAxisState } from '../axes/axis-state'
import { readAxis } from '../axes/read-axis'
import { assertRev, named } from '../rev'
import { assertPlace } from './bounds'

const tagTaken = 'Another axis has this tag; case makes no difference.'

export function registerAxis(vault: Vault, actor: PersonActor, body: z.output<typeof axisBody>): { id: number } {
  return vault.write(actor, (write) => {
    assertPlace(vault, actor, 'machine', body.machineId, '/machineId')
    const row = orRefuse(tagTaken, '/tag', () => insertAxis(vault.db, { ...body, flags: sorted(body.flags ?? []), madeAt: write.now }))
    write.log({ act: 'axis-registered', id: row.id, state: row })
    refreshAxisState(vault.db, row.id)
    return { id: row.id }
  })
}

/** Changes what the patch names; the history stays with the axis under a new tag. */
export function changeAxis(vault: Vault, actor: PersonActor, id: number, patch: z.output<typeof axisPatch>): Axis {
  return vault.write(actor, (write) => {
    const before = axisRows(vault.db).byId.get({ id })
    if (before === undefined) throw new Refusal('not-found', `There is no axis ${id}.`)
    assertRev(patch.rev, before.rev, () => readAxis(vault, id))
    if (patch.machineId !== undefined) assertPlace(vault, actor, 'machine', patch.machineId, '/machineId')
    const fields = named(patch)
    const after: AxisRow = { ...before, ...fields, ...(fields.flags === undefined ? {} : { flags: sorted(fields.flags) }), rev: before.rev + 1 }
    orRefuse(tagTaken, '/tag', () => updateAxis(vault.db, after))
    write.log({ act: 'axis-changed', id, state: after })
    refreshAxisState(vault.db, id)
    return readAxis(vault, id)
  })
}

/** Each flag once, in one order, so that the same set is the same state. */
const sorted = <Flag extends string>(flags: readonly Flag[]): Flag[] => [...new Set(flags)].sort()
