import type { PersonActor } from '../server/database/actor'
import { openVault, type Vault } from '../server/database/client'
import { insertPerson } from '../server/database/person/queries'
import { markKnownGood } from '../server/services/known-good/mark'
import { registerNameplate } from '../server/services/nameplates/nameplates'
import { settleFits } from '../server/services/readiness/keep-fits'
import { registerAxis } from '../server/services/places/axes'
import { registerLine } from '../server/services/places/lines'
import { registerMachine } from '../server/services/places/machines'
import { registerSite } from '../server/services/places/sites'
import { openFitting } from '../server/services/units/fittings'
import { registerUnit } from '../server/services/units/units'
import { storeUpload } from '../server/services/uploads/store-upload'
import { sampleFile, sampleSerial } from './sample-file'

/*
 * A plant of many axes in a real file. One axis of each model comes in as any does, by upload and mark; the others are copies of
 * their rows, since what is measured is how they are read.
 */

const models = 20
/** Of every model but each fourth a spare lies in stock; of those the others have none that fits by name. */
const inStock = (model: number) => model % 4 !== 3
const modelOf = (model: number) => `HL40-${200 + model}V`

/** A vault of so many axes, a multiple of 20, all marked, and the planner who may see them. */
export async function largePlant(folder: string, axes: number): Promise<{ vault: Vault, actor: PersonActor }> {
  const vault = openVault(folder)
  const row = insertPerson(vault.db, { name: 'Runa Haldersen', email: 'runa.haldersen@larkfield.example', roles: ['planner'], siteIds: [], madeAt: vault.now() })
  const actor: PersonActor = { kind: 'person', id: row.id, name: row.name, roles: ['planner'], sites: null, shared: false, session: null, peer: '127.0.0.1' }
  const siteId = registerSite(vault, actor, { name: 'Larkfield Preserves', timeZone: 'Europe/Copenhagen' }).id
  const lineId = registerLine(vault, actor, { siteId, name: 'Jar line 1' }).id
  const first = Array.from({ length: models }, (_, model) => {
    const machineId = registerMachine(vault, actor, { lineId, name: `Lid press ${model}` }).id
    const axisId = registerAxis(vault, actor, { machineId, tag: `LID-${model}.Z`, axisKind: 'linear' }).id
    registerNameplate(vault, actor, { model: modelOf(model), axisKind: 'linear', stroke: 210, ratedThrust: 400 + 10 * model, peakThrust: 1200, maxSpeed: 1000, brakeFitted: true })
    const serial = `${sampleSerial}-${model}`
    openFitting(vault, actor, { axisId, unitId: registerUnit(vault, actor, { serial, model: modelOf(model), firmware: '2.4' }).id, at: '2020-01-01T00:00:00Z' })
    if (inStock(model)) registerUnit(vault, actor, { serial: `SP-${model}`, model: modelOf(model), firmware: '2.4', siteId })
    const file = JSON.parse(sampleFile(model, vault.now()).toString('utf8')) as { unit: object }
    const stored = storeUpload(vault, actor, { bytes: Buffer.from(JSON.stringify({ ...file, unit: { serial, model: modelOf(model), firmware: '2.4' } })), name: null }, {})
    if (stored.outcome !== 'version') throw new Error(JSON.stringify(stored))
    markKnownGood(vault, actor, stored.answer.version.id, { meaning: 'approved' })
    return axisId
  })
  await settleFits(vault)
  first.forEach((axisId, index) => copyAxis(vault, axisId, axes / models - 1, 1_000_000 * (index + 1)))
  // What is kept in mind knows nothing of rows that came by no act.
  vault.close()
  return { vault: openVault(folder), actor }
}

/** Rows that an axis is told from, each with the columns that a copy has of its own. */
const copied: readonly { readonly table: string, readonly of: string, readonly own: Readonly<Record<string, string>> }[] = [
  { table: 'axis', of: 'id = :axis', own: { id: ':at', tag: 'tag || \':\' || CAST(:at AS INTEGER)' } },
  { table: 'unit', of: 'id IN (SELECT unit_id FROM fitting WHERE axis_id = :axis)', own: { id: ':at', serial: 'serial || \':\' || CAST(:at AS INTEGER)' } },
  { table: 'fitting', of: 'axis_id = :axis', own: { id: ':at', axis_id: ':at', unit_id: ':at' } },
  { table: 'version', of: 'axis_id = :axis', own: { id: ':at', axis_id: ':at', unit_id: ':at' } },
  { table: 'known_good', of: 'axis_id = :axis', own: { id: ':at', axis_id: ':at', version_id: ':at' } },
  { table: 'axis_state', of: 'axis_id = :axis', own: { axis_id: ':at', known_good_id: ':at', known_good_version_id: ':at', current_version_id: ':at', fitting_id: ':at' } },
  { table: 'spare_fit', of: 'axis_id = :axis', own: { axis_id: ':at', terms: `replace(substr(terms, 1, 12), ';' || (SELECT id FROM version WHERE axis_id = :axis) || ';', ';' || CAST(:at AS INTEGER) || ';') || substr(terms, 13)` } },
]

function copyAxis({ sqlite }: Vault, axisId: number, times: number, from: number): void {
  const statements = copied.map(({ table, of, own }) => {
    const columns = (sqlite.prepare(`PRAGMA table_xinfo(${table})`).all() as { name: string, hidden: number }[]).filter(({ hidden }) => hidden === 0).map(({ name }) => name)
    return sqlite.prepare(`INSERT INTO ${table} (${columns.join(', ')}) SELECT ${columns.map(name => own[name] ?? name).join(', ')} FROM ${table} WHERE ${of}`)
  })
  sqlite.transaction(() => {
    for (let copy = 0; copy < times; copy += 1) for (const statement of statements) statement.run({ axis: axisId, at: from + copy })
  })()
}
