import type { UploadFields, UploadStored } from '#shared/api/uploads'
import type { VersionSummary } from '#shared/api/versions'
import { Refusal } from '#shared/errors/refusal'
import { countByWeight } from '#shared/diff/summary'
import type { FormatError, Normalised } from '#shared/settings/types'
import { seesSite, type Actor } from '#server/database/actor'
import { insertChanges } from '#server/database/change/queries'
import { insertJudgement } from '#server/database/check/queries'
import type { Vault, Write } from '#server/database/client'
import type { VaultDb } from '#server/database/prepared'
import type { TrayProblem } from '#server/database/schema'
import { sightingQueries } from '#server/database/sighting/queries'
import { versionQueries } from '#server/database/version/queries'
import { refreshAxisState } from '../axes/axis-state'
import { keepInTray } from '../tray/keep'
import { personIn, personName, versionSummary } from '../versions/summary'
import { changesOnWire, checksOnWire } from '../wire'
import { engineVersion } from './ingest'
import { planUpload, readSent, type PlannedSighting, type PlannedVersion } from './plan-upload'
import { axisNamed } from './axis-named'
import { fileHash, senderOf, storeContent, storeUploadBytes, type SentFile } from './store-parts'

export type UploadOutcome =
  | { readonly outcome: 'version', readonly answer: UploadStored }
  | { readonly outcome: 'sighting', readonly answer: { sighting: { id: number, at: string }, version: VersionSummary } }
  | { readonly outcome: 'tray', readonly answer: { tray: number, problem: TrayProblem, detail: string } }
  | { readonly outcome: 'unreadable', readonly refusal: Refusal }

/** Stores what came in, whatever it is: a version, a sighting, or a file in the tray; one write for all of it. */
export function storeUpload(vault: Vault, actor: Actor, sent: SentFile, fields: UploadFields): UploadOutcome {
  assertPeople(vault.db, fields)
  const read = readSent(sent.bytes, fields)
  return vault.write(actor, (write): UploadOutcome => {
    const { db } = vault
    const plan = planUpload(db, actor, read, fields, Date.parse(write.now))
    if (plan.outcome === 'version') return { outcome: 'version', answer: storeVersion(db, write, sent, fields, plan) }
    if (plan.outcome === 'sighting') return { outcome: 'sighting', answer: storeSighting(db, write, sent, fields, plan) }
    if (plan.outcome === 'unplaced') {
      const { problem, detail, siteId } = plan.unplaced
      const tray = keepInTray(db, write, sent, fields, { problem, detail, siteId, errors: [], more: 0, ingested: plan.ingested })
      return { outcome: 'tray', answer: { tray, problem, detail } }
    }
    return { outcome: 'unreadable', refusal: keepUnreadable(db, write, sent, fields, plan) }
  })
}

function assertPeople(db: VaultDb, { changedBy, allowedBy }: UploadFields): void {
  for (const [name, text] of Object.entries({ changedBy, allowedBy })) {
    const id = personIn(text ?? null)
    if (id === null || personName(db, id) !== undefined) continue
    throw new Refusal('input', `?${name}: there is no person ${id}.`, { errors: [{ at: `?${name}`, code: 'not-found', message: `there is no person ${id}` }] })
  }
}

function keepUnreadable(db: VaultDb, write: Write, sent: SentFile, fields: UploadFields, { errors, more }: { errors: readonly FormatError[], more: number }): Refusal {
  const first = errors[0]
  const detail = first ? `${first.message}${errors.length + more > 1 ? ` And ${errors.length + more - 1} more.` : ''}` : 'The file cannot be read.'
  const tray = keepInTray(db, write, sent, fields, { problem: 'unreadable', detail, siteId: null, errors, more, ingested: null })
  return new Refusal('settings-unreadable', detail, { errors, more, tray })
}

/** Stores a planned version with its changes and its judgement. */
export function storeVersion(db: VaultDb, write: Write, sent: SentFile, fields: UploadFields, plan: PlannedVersion): UploadStored {
  const { placed, ingested, changes, judgement, against } = plan
  const axisId = placed.place.axis.id
  const id = insertVersion(db, write, fields, plan, storeUploadBytes(db, write, sent))
  insertChanges(db, id, changes)
  insertJudgement(db, id, judgement, against.nameplate?.id ?? null, write.now)
  refreshAxisState(db, axisId)
  return {
    version: versionSummary(db, id), changes: changesOnWire(changes), renumbered: [...plan.renumbered], checks: checksOnWire(judgement.results),
    judged: {
      ruleSet: judgement.ruleSet, nameplateRevision: against.nameplate?.revision ?? null, judgedAt: write.now,
      judged: [...judgement.judged], notApplicable: [...judgement.notApplicable],
    },
    findings: [], normalised: normalisedOnWire(ingested.normalised),
  }
}

function insertVersion(db: VaultDb, write: Write, fields: UploadFields, plan: PlannedVersion, uploadId: number): number {
  const { placed: { place, unit, times }, ingested: { file, hashes, normalised }, base } = plan
  const { personId, tokenId } = senderOf(write)
  const { exportedAt, exportedBy, note, readings } = file
  const row = {
    axisId: place.axis.id, number: plan.number, unitId: unit.id, uploadId, contentId: storeContent(db, write, plan.ingested),
    baseId: base?.id ?? null, occasion: fields.occasion ?? 'routine',
    capturedAt: new Date(times.capturedAt).toISOString(), receivedAt: write.now, clockDoubtful: times.clockDoubtful, late: plan.late,
    reason: fields.reason ?? null, workOrder: fields.workOrder ?? null, changedBy: fields.changedBy ?? null, allowedBy: fields.allowedBy ?? null,
    storedBy: personId, storedByToken: tokenId, engine: engineVersion, copyHash: hashes.copyHash, scribeCode: hashes.scribeCode,
    model: file.unit.model, firmware: file.unit.firmware ?? null, ...countByWeight(plan.changes),
    file: { unit: file.unit, exportedAt, ...(exportedBy === undefined ? {} : { exportedBy }), ...(note === undefined ? {} : { note }), readings, normalised },
  } as const
  const id = versionQueries(db).insert(row)
  write.log({ act: 'version-stored', id, state: { id, ...row, file: definedOnly(row.file) }, note: disagreement(db, write.actor, fields, place.axis) })
  return id
}

/** A log entry has no place for undefined. */
const definedOnly = (value: object) => JSON.parse(JSON.stringify(value)) as object

function disagreement(db: VaultDb, actor: Actor, { axis }: UploadFields, stored: { id: number, tag: string }): string | null {
  if (axis === undefined) return null
  const named = axisNamed(db, axis)
  if (named?.axis.id === stored.id) return null
  return `sent for ${named && seesSite(actor, named.site.id) ? named.axis.tag : axis}; stored at ${stored.tag}, where its serial sits`
}

function storeSighting(db: VaultDb, write: Write, sent: SentFile, fields: UploadFields, { placed, current }: PlannedSighting) {
  const row = {
    axisId: current.axisId, versionId: current.id, uploadSha256: fileHash(sent), name: sent.name,
    capturedAt: new Date(placed.times.capturedAt).toISOString(), receivedAt: write.now, ...senderOf(write),
  }
  const id = sightingQueries(db).insert(row)
  write.log({ act: 'sighting-recorded', id, state: { id, ...row }, note: fields.reason ?? null })
  refreshAxisState(db, current.axisId)
  return { sighting: { id, at: write.now }, version: versionSummary(db, current.id) }
}

export function normalisedOnWire({ form, rounded, converted, encoding, decodedTexts, delimiter, decimal }: Normalised): UploadStored['normalised'] {
  return { form, rounded, converted, encoding, decodedTexts: [...decodedTexts], ...(delimiter ? { delimiter } : {}), ...(decimal ? { decimal } : {}) }
}
