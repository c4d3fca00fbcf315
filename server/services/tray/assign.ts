import type { z } from 'zod'
import type { trayAssignBody, trayAssigned } from '#shared/api/uploads'
import { Refusal } from '#shared/errors/refusal'
import type { ReadSettings } from '#shared/settings/types'
import type { PersonActor } from '#server/database/actor'
import type { Vault, Write } from '#server/database/client'
import { judgingQueries } from '#server/database/judging/queries'
import type { UnitRow } from '#server/database/schema'
import { trayQueries, waitingLike, type TrayItemRow } from '#server/database/tray/queries'
import { unitRows } from '#server/database/unit/queries'
import { readUploadBytes } from '#server/database/upload/queries'
import { assertPlace } from '../places/bounds'
import { endFitting, openFitting } from '../units/fittings'
import { registerUnit } from '../units/units'
import { placeUnit } from '../uploads/place-file'
import { planUpload, readSent } from '../uploads/plan-upload'
import type { Source } from '../uploads/store-parts'
import { storeSighting, storeVersion } from '../uploads/store-version'
import { settle } from './discard'
import { waitingItem } from './list'

type Assignment = z.output<typeof trayAssignBody>
type Assigned = z.input<typeof trayAssigned>

/**
 * Says at which axis a file in the tray belongs, its equals with it. A unit that is unknown is registered and one that does not
 * sit there is fitted, the unit it replaced taken out: both take a planner.
 */
export function assignFromTray(vault: Vault, actor: PersonActor, id: number, assignment: Assignment): Assigned {
  return vault.write(actor, (write) => {
    const item = waitingItem(vault.db, id)
    assertPlace(vault, actor, 'axis', assignment.axisId, '/axisId')
    const read = readAgain(vault, item)
    seatUnit(vault, actor, write, item, read, assignment)
    const [first, ...equals] = waitingLike(vault.db, actor.sites, id).map(({ id: trayId }) => store(vault, actor, write, trayId, assignment))
    if (!first) throw new Refusal('tray-settled', 'This file does not wait any more.')
    return equals.reduce((answer, next) => ('sighting' in answer ? next : answer), first)
  })
}

function readAgain(vault: Vault, { tray }: TrayItemRow): ReadSettings {
  const read = readSent(vault.db, readUploadBytes(vault.db, tray.uploadId), tray.fields)
  if (read.ok) return read.value
  throw new Refusal('settings-unreadable', `The file cannot be read: ${read.errors[0]?.message ?? ''} Set it aside and send a corrected one.`, { errors: read.errors, more: read.more })
}

function seatUnit(vault: Vault, actor: PersonActor, write: Write, { tray }: TrayItemRow, { file }: ReadSettings, { axisId, at, reason }: Assignment): void {
  const unit = unitOf(vault, actor, file.unit)
  const capturedAt = tray.fields.capturedAt ?? file.exportedAt
  const { place, times } = placeUnit(vault.db, unit, capturedAt, Date.parse(write.now))
  if (place?.axis.id === axisId) return
  assertPlanner(actor, `Unit ${unit.serial} does not sit there yet.`)
  const since = at ?? new Date(Math.min(times.orderAt, Date.parse(write.now))).toISOString()
  const taken = judgingQueries(vault.db).openAtAxis.get({ axisId })
  if (taken) {
    if (!reason) throw new Refusal('input', `Unit ${taken.unit.serial} sits there. Say why and when it was swapped.`, { errors: [{ at: '/reason', code: 'missing', message: 'why was the unit swapped?' }] })
    endFitting(vault, actor, taken.fitting.id, { at: since, unitState: 'repair' })
  }
  openFitting(vault, actor, { axisId, unitId: unit.id, at: since })
}

function unitOf(vault: Vault, actor: PersonActor, { serial, channel, model, firmware, actuatorSerial, actuatorModel }: ReadSettings['file']['unit']): UnitRow {
  const find = () => unitRows(vault.db).bySerial.get({ serial, channel: channel ?? 0 })
  const known = find()
  if (known) return known
  assertPlanner(actor, `Unit ${serial} is not registered yet.`)
  registerUnit(vault, actor, { serial, channel, model, firmware, actuatorSerial, actuatorModel })
  const registered = find()
  if (!registered) throw new RangeError(`Unit ${serial} was registered and is not there.`)
  return registered
}

function assertPlanner({ roles }: PersonActor, why: string): void {
  if (!roles.includes('planner')) throw new Refusal('role', `${why} Registering and fitting a unit takes a planner.`)
}

function store(vault: Vault, actor: PersonActor, write: Write, trayId: number, { axisId, reason = null }: { axisId: number, reason?: string | null | undefined }): Assigned {
  const { db } = vault
  const row = trayQueries(db).byId.get({ id: trayId })
  if (!row) throw new RangeError(`There is no tray file ${trayId}.`)
  const { tray, upload } = row
  const plan = planUpload(db, actor, readSent(db, readUploadBytes(db, tray.uploadId), tray.fields), tray.fields, Date.parse(write.now))
  if (plan.outcome === 'unplaced' || plan.outcome === 'unreadable') throw unfit(plan.outcome === 'unplaced' ? plan.unplaced.detail : 'The file cannot be read.')
  if (plan.placed.place.axis.id !== axisId) throw unfit(`At the time of the file the unit sat at ${plan.placed.place.axis.tag}.`)
  const source: Source = { sha256: upload.sha256, name: upload.name, sender: { personId: upload.personId, tokenId: upload.tokenId, peer: upload.peer }, uploadId: () => upload.id }
  if (plan.outcome === 'sighting') {
    const seen = storeSighting(db, write, source, tray.fields, plan)
    settle(db, write, trayId, { outcome: 'assigned', reason, versionId: seen.version.id, sightingId: seen.sighting.id })
    return seen
  }
  const { version } = storeVersion(db, write, source, tray.fields, plan)
  settle(db, write, trayId, { outcome: 'assigned', reason, versionId: version.id })
  return { version }
}

const unfit = (detail: string) => new Refusal('axis-kind', detail)
