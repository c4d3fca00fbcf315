import { existsSync, mkdirSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import type { Role } from '../shared/api/common'
import type { PersonActor, TokenActor } from '../server/database/actor'
import { openVault, type Vault } from '../server/database/client'
import { findPerson, hashFor, registerPerson } from '../server/services/people/people'
import { registerFirstAdmin } from '../server/services/people/first-start'
import { findToken, makeToken } from '../server/services/people/tokens'
import { recordLabel } from '../server/services/labels/print-label'
import { registerAxis } from '../server/services/places/axes'
import { registerLine } from '../server/services/places/lines'
import { registerMachine } from '../server/services/places/machines'
import { registerSite } from '../server/services/places/sites'
import { registerNameplate } from '../server/services/nameplates/nameplates'
import { openFitting } from '../server/services/units/fittings'
import { registerUnit } from '../server/services/units/units'
import { plantFile, storyFile, type Plant } from './demo-files'
import { tellStory, type Cast } from './demo-story'

/*
 * Fills an empty vault with the invented plant, through the same services that the routes call, with a clock that is set to
 * the day of each act. A folder that is filled already is left as it is.
 */

const folder = process.argv[2]
if (!folder) throw new Error('say which folder')
const done = join(folder, 'demo-filled')
if (existsSync(done)) {
  console.log('The demo plant is there already; `npm run demo -- --fresh` begins anew.')
}
else {
  mkdirSync(folder, { recursive: true })
  await fill(folder)
  writeFileSync(done, 'The invented plant was filled in here.\n')
}

async function fill(into: string): Promise<void> {
  const plant = plantFile()
  const story = storyFile()
  const today = new Date()
  let now = today.getTime() - 740 * 86_400_000
  const vault = openVault(into, { clock: () => now })
  try {
    const cast = await register(vault, plant)
    const told = tellStory(vault, cast, plant, story, today, (at) => {
      now = at
    })
    console.log(`Larkfield Preserves: ${told.versions} versions, ${told.sightings} sightings, ${told.tray} files in the tray, ${told.marks} marks, ${told.waivers} waivers.`)
  }
  finally {
    vault.close()
  }
}

async function register(vault: Vault, plant: Plant): Promise<Cast> {
  const admin = plant.people.find(person => person.key === 'admin')
  if (!admin) throw new Error('the plant has no administrator')
  const adminId = await registerFirstAdmin(vault, { name: admin.name, email: admin.email, password: admin.password, plant: plant.plant })
  const people: Record<string, PersonActor> = { admin: actorOf(adminId, admin.name, ['admin']) }
  for (const { key, password, ...body } of plant.people.filter(person => person.key !== 'admin')) {
    const { id } = registerPerson(vault, people.admin as PersonActor, { ...body, siteIds: [], password }, await hashFor(vault, password, [body.name, body.email]))
    people[key] = actorOf(id, findPerson(vault, id).name, body.roles)
  }
  const planner = people.planner
  if (!planner || !people.admin) throw new Error('the plant has no planner')
  const { axisIds, siteId } = registerPlaces(vault, planner, plant)
  return { people, station: stationOf(vault, people.admin, plant), axisIds, siteId }
}

/** The station's token, made anew when it has ended. */
function stationOf(vault: Vault, admin: PersonActor, { token: { name, scopes } }: Plant): () => TokenActor {
  const made = () => makeToken(vault, admin, { name, scopes, siteIds: [], endsAt: new Date(Date.parse(vault.now()) + 360 * 86_400_000).toISOString() }).token
  let secret = made()
  return () => {
    const known = findToken(vault, secret, 'demo')
    if (known) return known
    secret = made()
    return findToken(vault, secret, 'demo') as TokenActor
  }
}

function registerPlaces(vault: Vault, planner: PersonActor, plant: Plant) {
  const { id: siteId } = registerSite(vault, planner, plant.site)
  for (const nameplate of plant.nameplates) registerNameplate(vault, planner, nameplate)
  const machineIds: Record<string, number> = {}
  for (const line of plant.lines) {
    const { id: lineId } = registerLine(vault, planner, { siteId, name: line.name })
    for (const name of line.machines) machineIds[name] = registerMachine(vault, planner, { lineId, name, controllerScanMs: line.controllerScanMs }).id
  }
  const axisIds: Record<string, number> = {}
  for (const { unit, ...axis } of plant.axes) {
    const machineId = machineIds[axis.tag.replace(/\..*$/, '')]
    if (!machineId) throw new Error(`no machine for ${axis.tag}`)
    axisIds[axis.tag] = registerAxis(vault, planner, { ...axis, machineId }).id
    const { id: unitId } = registerUnit(vault, planner, { ...unit, state: 'spare', siteId })
    openFitting(vault, planner, { axisId: axisIds[axis.tag] as number, unitId, at: vault.now() })
    if (!plant.unlabelled.includes(axis.tag)) recordLabel(vault, planner, axisIds[axis.tag] as number, { size: '50x25' })
  }
  for (const spare of plant.spares) registerUnit(vault, planner, { ...spare, state: 'spare', siteId })
  return { axisIds, siteId }
}

function actorOf(id: number, name: string, roles: readonly Role[]): PersonActor {
  return { kind: 'person', id, name, roles, sites: null, shared: false, session: null, peer: 'demo' }
}
