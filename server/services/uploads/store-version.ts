import { ruleSetVersion } from '#shared/checks/table'
import type { UploadFields, UploadSeen, UploadStored } from '#shared/api/uploads'
import type { Normalised } from '#shared/settings/types'
import type { Actor } from '#server/database/actor'
import { insertChanges } from '#server/database/change/queries'
import { insertJudgement } from '#server/database/check/queries'
import type { Write } from '#server/database/client'
import type { VaultDb } from '#server/database/prepared'
import { sightingQueries } from '#server/database/sighting/queries'
import { versionQueries } from '#server/database/version/queries'
import { refreshAxisState } from '../axes/axis-state'
import { findingsOfVersion, otherAxis, otherAxisNamed } from '../findings/of-version'
import { versionRow } from '../versions/read-version'
import { versionSummary } from '../versions/summary'
import { waivedOnWire } from '../waivers/accepted'
import { changesOnWire } from '../wire'
import { engineVersion } from './ingest'
import { layoutOf, type PlannedSighting, type PlannedVersion } from './plan-upload'
import { storeContent, type Source } from './store-parts'
import type { VersionFields } from './version-fields'

/** Stores a planned version with its changes and its judgement. */
export function storeVersion(db: VaultDb, write: Write, source: Source, fields: VersionFields, plan: PlannedVersion): UploadStored {
  const { placed, ingested, changes, judgement, against } = plan
  const axisId = placed.place.axis.id
  const id = insertVersion(db, write, source, fields, plan)
  insertChanges(db, id, changes)
  insertJudgement(db, id, judgement, against.nameplate?.id ?? null, write.now)
  refreshAxisState(db, axisId)
  const findings = findingsOfVersion(db, write, source.sender, fields, plan, versionRow(db, id))
  return {
    version: versionSummary(db, id), changes: changesOnWire(changes), renumbered: [...plan.renumbered], checks: waivedOnWire(db, axisId, judgement, () => ingested.content, write.now),
    judged: {
      ruleSet: judgement.ruleSet, nameplateRevision: against.nameplate?.revision ?? null, judgedAt: write.now,
      judged: [...judgement.judged], notApplicable: [...judgement.notApplicable],
    },
    findings, normalised: normalisedOnWire(ingested.normalised),
  }
}

/** The row of a planned version and its log entry, with the bytes and the content where they are not there yet. */
export function insertVersion(db: VaultDb, write: Write, source: Source, fields: VersionFields, plan: PlannedVersion): number {
  const { placed: { place, unit, times }, ingested: { file, hashes, normalised }, base } = plan
  const { exportedAt, exportedBy, note, readings } = file
  const row = {
    axisId: place.axis.id, number: plan.number, unitId: unit.id, uploadId: source.uploadId(), contentId: storeContent(db, write, plan.ingested),
    baseId: base?.id ?? null, occasion: fields.occasion ?? 'routine',
    capturedAt: new Date(times.capturedAt).toISOString(), receivedAt: write.now, clockDoubtful: times.clockDoubtful, late: plan.late,
    reason: fields.reason ?? null, workOrder: fields.workOrder ?? null, changedBy: fields.changedBy ?? null, allowedBy: fields.allowedBy ?? null,
    storedBy: source.sender.personId, storedByToken: source.sender.tokenId, engine: engineOf(db, fields), copyHash: hashes.copyHash, scribeCode: hashes.scribeCode,
    model: file.unit.model, firmware: file.unit.firmware ?? null, ...plan.counts,
    file: { unit: file.unit, exportedAt, ...(exportedBy === undefined ? {} : { exportedBy }), ...(note === undefined ? {} : { note }), readings, normalised },
  } as const
  const id = versionQueries(db).insert(row)
  write.log({ act: 'version-stored', id, state: { id, ...row, file: definedOnly(row.file) }, note: disagreement(db, write.actor, fields, place.axis) })
  return id
}

/** With the rules that it was judged by, so that the log holds its first judgement to them. A file in a drive's layout can be read again only by the revision that it was read by. */
function engineOf(db: VaultDb, { layout }: VersionFields): string {
  const engine = `${engineVersion}, rules ${ruleSetVersion}`
  return layout === undefined ? engine : `${engine}, entry table of ${layout} revision ${layoutOf(db, layout).revision}`
}

/** A log entry has no place for undefined. */
const definedOnly = (value: object) => JSON.parse(JSON.stringify(value)) as object

function disagreement(db: VaultDb, actor: Actor, fields: VersionFields, stored: { id: number, tag: string }): string | null {
  const named = otherAxisNamed(db, actor, fields, stored.id)
  return named === null ? null : `sent for ${named}; stored at ${stored.tag}, where its serial sits`
}

/** Records that the current content of the axis was seen again. */
export function storeSighting(db: VaultDb, write: Write, source: Source, fields: UploadFields, { placed, current }: PlannedSighting): UploadSeen {
  const row = {
    axisId: current.axisId, versionId: current.id, uploadSha256: source.sha256, name: source.name,
    capturedAt: new Date(placed.times.capturedAt).toISOString(), receivedAt: write.now, ...source.sender,
  }
  const id = sightingQueries(db).insert(row)
  write.log({ act: 'sighting-recorded', id, state: { id, ...row }, note: fields.reason ?? null })
  refreshAxisState(db, current.axisId)
  otherAxis(db, write, placed.place, fields, current)
  return { sighting: { id, at: write.now }, version: versionSummary(db, current.id) }
}

export function normalisedOnWire({ form, rounded, converted, encoding, decodedTexts, delimiter, decimal }: Normalised): UploadStored['normalised'] {
  return { form, rounded, converted, encoding, decodedTexts: [...decodedTexts], ...(delimiter ? { delimiter } : {}), ...(decimal ? { decimal } : {}) }
}
