import type { VersionSummary } from '#shared/api/versions'
import { Refusal } from '#shared/errors/refusal'
import { personQueries } from '#server/database/person/queries'
import type { VaultDb } from '#server/database/prepared'
import { versionQueries, type VersionSummaryRow } from '#server/database/version/queries'

const reference = /^person:([1-9]\d{0,15})$/

/** The name of a person, those who left too; undefined where there never was one. */
export const personName = (db: VaultDb, id: number): string | undefined => personQueries(db).byId.get({ id })?.name

/** Who changed or allowed something, as people read it: free text as it stands, `person:ID` as the name. */
export function namedPerson(db: VaultDb, text: string | null): string | null {
  const id = text === null ? undefined : reference.exec(text)?.[1]
  return id === undefined ? text : personName(db, Number(id)) ?? text
}

/** The id in `person:ID`; null for free text. */
export function personIn(text: string | null): number | null {
  const id = text === null ? undefined : reference.exec(text)?.[1]
  return id === undefined ? null : Number(id)
}

export function summaryOnWire(db: VaultDb, row: VersionSummaryRow): VersionSummary {
  const { version, checks, mark } = row
  return {
    id: version.id, axisId: version.axisId, axisTag: row.axisTag, unitId: version.unitId, serial: row.serial, number: version.number,
    occasion: version.occasion, capturedAt: version.capturedAt, receivedAt: version.receivedAt, clockDoubtful: version.clockDoubtful,
    late: version.late, current: row.currentVersionId === version.id,
    void: row.void?.at && row.void.by ? { at: row.void.at, by: row.void.by, reason: row.void.reason ?? '' } : null,
    baseId: version.baseId, baseNumber: row.baseNumber, contentHash: row.contentHash, copyHash: version.copyHash, scribeCode: version.scribeCode,
    storedBy: row.tokenName === null ? row.storedByName : `${row.tokenName} (${row.storedByName})`,
    changedBy: namedPerson(db, version.changedBy), allowedBy: namedPerson(db, version.allowedBy), reason: version.reason, workOrder: version.workOrder,
    firmware: version.firmware, model: version.model, changes: { harm: version.harm, motion: version.motion, text: version.text }, checks,
    sightings: row.sightings, lastSeenAt: row.lastSeenAt,
    mark: mark?.at && mark.by && mark.meaning ? { by: mark.by, at: mark.at, meaning: mark.meaning, note: mark.note, inForce: row.knownGoodVersionId === version.id } : null,
  }
}

export function versionSummary(db: VaultDb, id: number): VersionSummary {
  const row = versionQueries(db).summary.get({ id })
  if (!row) throw new Refusal('not-found', 'There is no such version.')
  return summaryOnWire(db, row)
}
