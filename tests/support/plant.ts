import type { Role } from '../../shared/api/common'
import type { PersonActor } from '../../server/database/actor'
import type { Vault } from '../../server/database/client'
import { insertPerson } from '../../server/database/person/queries'
import { registerAxis } from '../../server/services/places/axes'
import { registerLine } from '../../server/services/places/lines'
import { registerMachine } from '../../server/services/places/machines'
import { registerSite } from '../../server/services/places/sites'
import { registerUnit } from '../../server/services/units/units'

/** A person straight into the vault, without a password; acts as whoever the test needs. */
export function personActor(vault: Vault, name: string, roles: Role[], siteIds: number[] = []): PersonActor {
  const row = insertPerson(vault.db, { name, email: `${name.toLowerCase().replaceAll(' ', '.')}@larkfield.example`, roles, siteIds, madeAt: vault.now() })
  return { kind: 'person', id: row.id, name, roles, sites: siteIds.length === 0 ? null : siteIds, shared: false, session: null, peer: '127.0.0.1' }
}

/** One site, line, machine, axis and unit of the invented plant, and a planner who registered them. */
export function smallPlant(vault: Vault, tag = 'LID-02.Z') {
  const planner = personActor(vault, 'Runa Haldersen', ['planner'])
  const siteId = registerSite(vault, planner, { name: 'Larkfield Preserves', timeZone: 'Europe/Copenhagen' }).id
  const lineId = registerLine(vault, planner, { siteId, name: 'Jar line 1' }).id
  const machineId = registerMachine(vault, planner, { lineId, name: 'Lid press 2' }).id
  const axisId = registerAxis(vault, planner, { machineId, tag, axisKind: 'linear' }).id
  const unitId = registerUnit(vault, planner, { serial: 'A4471', model: 'HL40-200V' }).id
  return { planner, siteId, lineId, machineId, axisId, unitId }
}
