import { existsSync, rmSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { insertChanges } from '../../server/database/change/queries'
import { insertJudgement } from '../../server/database/check/queries'
import { openVault, type Vault, type Write } from '../../server/database/client'
import { judgingQueries, type AxisPlace } from '../../server/database/judging/queries'
import { knownGoodQueries } from '../../server/database/known-good/queries'
import type { UnitRow, VersionRow } from '../../server/database/schema'
import { sightingQueries } from '../../server/database/sighting/queries'
import { unitRows } from '../../server/database/unit/queries'
import { refreshAxisState } from '../../server/services/axes/axis-state'
import { findingsOfVersion } from '../../server/services/findings/of-version'
import { actOn } from '../../server/services/findings/raise'
import { recordTrailKey } from '../../server/services/trail/key'
import { ingest } from '../../server/services/uploads/ingest'
import { planVersion, type PlannedVersion } from '../../server/services/uploads/plan-upload'
import { readAgainst } from '../../server/services/uploads/read-against'
import { sourceOf } from '../../server/services/uploads/store-parts'
import { insertVersion } from '../../server/services/uploads/store-version'
import { versionRow } from '../../server/services/versions/read-version'
import { readSettings } from '../../shared/settings/read'
import { Chain, fileHead, fileText } from './chain'
import { registerPlant, type Fleet, type FleetAxis } from './plant'
import { roundsOf, type FleetSize } from './size'

/*
 * Fills a vault of fleet size. Places, people, units and findings go through the services; versions are planned by the service
 * once a group and stored by it for each axis, with everything around them that an upload stores. What is left out is what the
 * next upload of the axis would replace: the state of the axis is derived once, at the end. `npm run verify -- --derived
 * --reread` finds such a vault sound.
 */

const day = 86_400_000
const span = 330 * day
const openRounds = 2

interface Placed { readonly unit: UnitRow, readonly place: AxisPlace }
interface Group {
  readonly number: number
  readonly chain: Chain
  readonly axes: readonly FleetAxis[]
  readonly placed: ReadonlyMap<number, Placed>
  readonly last: Map<number, VersionRow>
}

/** Fills the folder unless it is filled; told how it goes on. */
export async function buildFleet(folder: string, size: FleetSize, fresh: boolean, tell: (line: string) => void): Promise<void> {
  const done = join(folder, 'fleet-filled')
  if (existsSync(done) && !fresh) return
  rmSync(folder, { recursive: true, force: true })
  let now = Date.now() - span - day
  const vault = openVault(folder, { clock: () => now, scryptCost: 1024 })
  try {
    // A vault that breaks off is made anew: nothing waits for the disk here.
    for (const pragma of ['journal_mode = OFF', 'synchronous = OFF', 'foreign_keys = OFF', 'cache_size = -1000000']) vault.sqlite.pragma(pragma)
    recordTrailKey(vault)
    const fleet = await registerPlant(vault, size.axes)
    tell(`${size.axes} axes registered`)
    fill(vault, fleet, size, (at) => { now = at }, tell)
    vault.sqlite.pragma('foreign_keys = ON')
    vault.sqlite.exec('ANALYZE')
  }
  finally {
    vault.close()
  }
  writeFileSync(done, `${JSON.stringify(size)}\n`)
}

function fill(vault: Vault, fleet: Fleet, size: FleetSize, setClock: (at: number) => void, tell: (line: string) => void): void {
  const rounds = roundsOf(size)
  const groups = Array.from({ length: Math.ceil(size.axes / size.group) }, (_, index) => groupOf(vault, index, fleet.axes.slice(index * size.group, (index + 1) * size.group)))
  const begin = Date.parse(vault.now()) + day / 2
  const began = Date.now()
  for (let round = 0; round < rounds; round += 1) {
    for (const [index, group] of groups.entries()) {
      const at = begin + (round + index / groups.length) * span / rounds
      setClock(at)
      storeRound(vault, fleet, group, { round, rounds, at, sightings: sightingsIn(size, round, rounds) })
    }
    const passed = (Date.now() - began) / 1000
    tell(`${(round + 1) * size.axes} versions, ${Math.floor(passed)} s; about ${Math.floor(passed / (round + 1) * (rounds - round - 1))} s to go`)
  }
  for (let from = 0; from < fleet.axes.length; from += 250) {
    vault.write(fleet.planner, () => { for (const { axisId } of fleet.axes.slice(from, from + 250)) refreshAxisState(vault.db, axisId) })
  }
}

function groupOf({ db }: Vault, index: number, axes: readonly FleetAxis[]): Group {
  const placed = axes.map(({ axisId, unitId }): [number, Placed] => {
    const unit = unitRows(db).byId.get({ id: unitId })
    const place = judgingQueries(db).axis.get({ id: axisId })
    if (!unit || !place) throw new Error(`There is no axis ${axisId}, or no unit ${unitId}.`)
    return [axisId, { unit, place }]
  })
  return { number: index, chain: new Chain(index), axes, placed: new Map(placed), last: new Map() }
}

function placedOf({ placed }: Group, { axisId }: FleetAxis): Placed {
  const found = placed.get(axisId)
  if (!found) throw new Error(`Axis ${axisId} is of another group.`)
  return found
}

const sightingsIn = ({ sightings }: FleetSize, round: number, rounds: number) => Math.floor((round + 1) * sightings / rounds) - Math.floor(round * sightings / rounds)

interface Turn { readonly round: number, readonly rounds: number, readonly at: number, readonly sightings: number }

/** One step of a group, at each of its axes: by the script, or by a person with a reason where something watched was changed. */
function storeRound(vault: Vault, fleet: Fleet, group: Group, turn: Turn): void {
  const watched = turn.round > 0 && group.chain.next().watched
  const rest = fileText(group.chain.settings)
  const actor = watched ? fleet.technician : fleet.station
  vault.write(actor, (write) => {
    let plan: PlannedVersion | undefined
    for (const axis of group.axes) {
      const exportedAt = new Date(turn.at - 300_000).toISOString()
      const text = fileHead(axis.serial, exportedAt, 1000 + turn.round * 80) + rest
      plan = plan === undefined ? planOf(vault, axis, group, text, turn.at) : planFor(plan, axis, group, exportedAt)
      const row = storeOne(vault, write, fleet, plan, text, watched, turn)
      group.last.set(axis.axisId, row)
      for (let index = 1; index <= turn.sightings; index += 1) storeSeen(vault, write, row, turn.at - 300_000 + index)
    }
  })
  // One group in twenty has never been marked, as somewhere in every plant.
  const number = group.number % 20 === 1 ? -1 : Math.floor(turn.rounds * 0.95)
  if (turn.round === number) vault.write(fleet.planner, (write) => { for (const row of group.last.values()) mark(vault, write, fleet, row) })
}

/** As the service plans an upload. */
function planOf({ db }: Vault, axis: FleetAxis, group: Group, text: string, at: number): PlannedVersion {
  const read = readSettings(Buffer.from(text, 'utf8'))
  if (!read.ok) throw new Error(JSON.stringify(read.errors))
  const { unit, place } = placedOf(group, axis)
  const against = readAgainst(db, place, unit)
  const capturedAt = at - 300_000
  const plan = planVersion(db, { ok: true, unit, place, times: { capturedAt, receivedAt: at, orderAt: capturedAt, clockDoubtful: false } }, against, ingest(read.value, against.nameplate?.nameplate.dictionary))
  return { ...plan, base: group.last.get(axis.axisId) ?? null }
}

/** The plan of an axis of the group at another one, which holds the same. */
function planFor(plan: PlannedVersion, axis: FleetAxis, group: Group, exportedAt: string): PlannedVersion {
  const { file } = plan.ingested
  return { ...plan, placed: { ...plan.placed, ...placedOf(group, axis) }, base: group.last.get(axis.axisId) ?? null, ingested: { ...plan.ingested, file: { ...file, exportedAt, unit: { ...file.unit, serial: axis.serial } } } }
}

function storeOne({ db }: Vault, write: Write, fleet: Fleet, plan: PlannedVersion, text: string, watched: boolean, { round, rounds }: Turn): VersionRow {
  const fields = watched ? { reason: 'jar format changed', workOrder: `WO-${round}`, changedBy: `person:${fleet.technician.id}` } : {}
  const source = sourceOf(db, write, { bytes: Buffer.from(text, 'utf8'), name: null }, {})
  const id = insertVersion(db, write, source, fields, plan)
  insertChanges(db, id, plan.changes)
  insertJudgement(db, id, plan.judgement, plan.against.nameplate?.id ?? null, write.now)
  const row = versionRow(db, id)
  if (!watched) return row
  const found = findingsOfVersion(db, write, source.sender, fields, plan, row)
  if (round < rounds - openRounds) for (const { id: findingId } of found) actOn(db, write, findingId, { kind: 'closed', byPerson: fleet.auditor.id, closeAs: 'accepted', allowedBy: `person:${fleet.planner.id}` })
  return row
}

function storeSeen({ db }: Vault, write: Write, { axisId, id: versionId }: VersionRow, capturedAt: number): void {
  const { actor } = write
  if (actor.kind === 'vault') throw new Error('The vault reads no drives.')
  const row = {
    axisId, versionId, uploadSha256: String(capturedAt).padStart(64, '0'), name: null, capturedAt: new Date(capturedAt).toISOString(), receivedAt: write.now,
    personId: actor.kind === 'token' ? actor.ownerId : actor.id, tokenId: actor.kind === 'token' ? actor.id : null, peer: actor.peer,
  }
  const id = sightingQueries(db).insert(row)
  write.log({ act: 'sighting-recorded', id, state: { id, ...row }, note: null })
}

function mark({ db }: Vault, write: Write, fleet: Fleet, { axisId, id: versionId }: VersionRow): void {
  const row = { axisId, versionId, at: write.now, byPerson: fleet.planner.id, meaning: 'approved', note: null, carriedFrom: null } as const
  const id = knownGoodQueries(db).insert(row)
  write.log({ act: 'known-good-marked', id, state: { id, ...row }, note: null })
}
