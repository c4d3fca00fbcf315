import type { PersonActor, TokenActor } from '../../server/database/actor'
import type { Vault } from '../../server/database/client'
import { registerNameplate } from '../../server/services/nameplates/nameplates'
import { registerFirstAdmin } from '../../server/services/people/first-start'
import { findPerson, hashFor, registerPerson } from '../../server/services/people/people'
import { findToken, makeToken } from '../../server/services/people/tokens'
import { registerAxis } from '../../server/services/places/axes'
import { registerLine } from '../../server/services/places/lines'
import { registerMachine } from '../../server/services/places/machines'
import { registerSite } from '../../server/services/places/sites'
import { openFitting } from '../../server/services/units/fittings'
import { registerUnit } from '../../server/services/units/units'
import type { Role } from '../../shared/api/common'
import type { Nameplate } from '../../shared/settings/nameplate'
import { admin } from '../built-server'

/*
 * The plant that the fleet belongs to, through the services that the routes call: 4 sites, 10 lines each, machines of 8 axes,
 * a unit at each axis, and one spare to twenty.
 */

const nameplate: Nameplate = {
  model: 'HL40-200V', axisKind: 'linear', stroke: 200, hardMargin: 2, maxSpeed: 800, maxAcceleration: 6000, ratedThrust: 640, peakThrust: 1600, forceBase: 'rated-thrust',
  pressForceMin: 10, pressForceMax: 90, maxPressSpeed: 20, resolution: 0.005, shownDigit: 0.01, repeatability: 0.02, lead: 10, movingMass: 1.8, rotorInertia: 0.42,
  maxPayloadLevel: 30, maxPayloadVertical: 12, firstMove: 0, inputFilterTime: 3, brakeFitted: true, brakeCloseTime: 40, brakeHolding: 320, maxOverloadTime: 2000,
}

export interface FleetAxis { readonly axisId: number, readonly unitId: number, readonly serial: string }
export interface Fleet {
  readonly planner: PersonActor
  readonly technician: PersonActor
  readonly auditor: PersonActor
  readonly station: TokenActor
  readonly axes: readonly FleetAxis[]
}

export async function registerPlant(vault: Vault, count: number): Promise<Fleet> {
  const adminId = await registerFirstAdmin(vault, { name: 'Marit Solheim', ...admin, plant: 'Larkfield Preserves' })
  const marit = actorOf(adminId, 'Marit Solheim', ['admin'])
  const person = async (name: string, role: Role) => {
    const email = `${name.toLowerCase().replace(' ', '.')}@larkfield.example`
    const { id } = registerPerson(vault, marit, { name, email, roles: [role], siteIds: [], password: admin.password }, await hashFor(vault, admin.password, []))
    return actorOf(id, findPerson(vault, id).name, [role])
  }
  const planner = await person('Runa Haldersen', 'planner')
  const technician = await person('Tobias Achterberg', 'technician')
  const auditor = await person('Ines Morel', 'auditor')
  const { token } = makeToken(vault, marit, { name: 'engineering station', scopes: ['upload'], siteIds: [], endsAt: new Date(Date.parse(vault.now()) + 364 * 86_400_000).toISOString() })
  const station = findToken(vault, token, '192.0.2.17')
  if (station === null) throw new Error('The token is not known.')
  registerNameplate(vault, planner, nameplate)
  return { planner, technician, auditor, station, axes: registerPlaces(vault, planner, count) }
}

const actorOf = (id: number, name: string, roles: readonly Role[]): PersonActor => ({ kind: 'person', id, name, roles, sites: null, shared: false, session: null, peer: '192.0.2.5' })

function registerPlaces(vault: Vault, planner: PersonActor, count: number): FleetAxis[] {
  const sites = [1, 2, 3, 4].map(site => registerSite(vault, planner, { name: `Larkfield ${site}`, timeZone: 'Europe/Copenhagen' }).id)
  const lines = Array.from({ length: 40 }, (_, line) => registerLine(vault, planner, { siteId: sites[line % 4] ?? 0, name: `Jar line ${line + 1}` }).id)
  const machines = Array.from({ length: Math.ceil(count / 8) }, (_, machine) => registerMachine(vault, planner, { lineId: lines[machine % 40] ?? 0, name: `Lid press ${machine + 1}` }).id)
  const axes: FleetAxis[] = []
  for (let from = 0; from < count; from += 250) {
    // One write for many: the bench does not wait for the disk.
    vault.write(planner, () => {
      for (let index = from; index < Math.min(from + 250, count); index += 1) axes.push(registerOne(vault, planner, index, machines[Math.floor(index / 8)] ?? 0))
    })
  }
  return axes
}

function registerOne(vault: Vault, planner: PersonActor, index: number, machineId: number): FleetAxis {
  const serial = `LP-${String(index).padStart(6, '0')}`
  const tag = `LID-${String(Math.floor(index / 8)).padStart(4, '0')}.${'XYZABCUV'[index % 8] ?? 'X'}`
  const axisId = registerAxis(vault, planner, { machineId, tag, axisKind: 'linear', role: 'lid press', uploadEveryHours: 168 }).id
  const unitId = registerUnit(vault, planner, { serial, model: 'HL40-200V', firmware: '2.4' }).id
  openFitting(vault, planner, { axisId, unitId, at: vault.now() })
  if (index % 20 === 0) registerUnit(vault, planner, { serial: `${serial}-S`, model: 'HL40-200V', firmware: '2.4' })
  return { axisId, unitId, serial }
}
