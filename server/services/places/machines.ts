import type { z } from 'zod'
import type { Machine, machineBody, machinePatch, placeQuery } from '#shared/api/places'
import { Refusal } from '#shared/errors/refusal'
import { boundsText } from '#server/database/bounds'
import type { Actor, PersonActor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { orRefuse } from '#server/database/constraints'
import { insertMachine, machineRows, updateMachine } from '#server/database/machine/queries'
import type { MachineRow } from '#server/database/machine/table'
import { afterOf, limitOf, pageOf } from '../page'
import { assertRev, named } from '../rev'
import { assertPlace } from './bounds'

const machineOut = ({ madeAt: _made, ...rest }: MachineRow): Machine => rest
const nameTaken = 'The line has a machine of this name.'

function machineRow(vault: Vault, id: number): MachineRow {
  const found = machineRows(vault.db).byId.get({ id })
  if (found === undefined) throw new Refusal('not-found', `There is no machine ${id}.`)
  return found
}

export const readMachine = (vault: Vault, id: number): Machine => machineOut(machineRow(vault, id))

export function listMachines(vault: Vault, actor: Actor, query: z.output<typeof placeQuery>) {
  const { siteId = null, lineId = null, machineId = null } = query
  const rows = machineRows(vault.db).page.all({ after: afterOf(query), limit: limitOf(query) + 1, sites: boundsText(actor.sites), siteId, lineId, machineId })
  return pageOf(rows, query, ({ id }) => id, machineOut)
}

export function registerMachine(vault: Vault, actor: PersonActor, body: z.output<typeof machineBody>): { id: number } {
  return vault.write(actor, (write) => {
    assertPlace(vault, actor, 'line', body.lineId, '/lineId')
    const row = orRefuse(nameTaken, '/name', () => insertMachine(vault.db, { ...body, madeAt: write.now }))
    write.log({ act: 'machine-registered', id: row.id, state: row })
    return { id: row.id }
  })
}

export function changeMachine(vault: Vault, actor: PersonActor, id: number, patch: z.output<typeof machinePatch>): Machine {
  return vault.write(actor, (write) => {
    const before = machineRow(vault, id)
    assertRev(patch.rev, before.rev, () => machineOut(before))
    if (patch.lineId !== undefined) assertPlace(vault, actor, 'line', patch.lineId, '/lineId')
    const after = { ...before, ...named(patch), rev: before.rev + 1 }
    orRefuse(nameTaken, '/name', () => updateMachine(vault.db, after))
    write.log({ act: 'machine-changed', id, state: after })
    return machineOut(after)
  })
}
