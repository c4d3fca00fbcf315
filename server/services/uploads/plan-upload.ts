import type { UploadFields } from '#shared/api/uploads'
import { judge } from '#shared/checks/judge'
import type { Judgement } from '#shared/checks/types'
import { diffContents } from '#shared/diff/diff'
import { diffRenumbered } from '#shared/diff/renumber'
import { countByWeight } from '#shared/diff/summary'
import type { FieldChange, Renumbering } from '#shared/diff/types'
import { Refusal } from '#shared/errors/refusal'
import { readEntryFile } from '#shared/settings/entry-table/read-entry'
import { readSettings } from '#shared/settings/read'
import type { FormatError, ReadOutcome, Weight } from '#shared/settings/types'
import type { Actor } from '#server/database/actor'
import { judgingQueries } from '#server/database/judging/queries'
import type { VaultDb } from '#server/database/prepared'
import type { NameplateRow, VersionRow } from '#server/database/schema'
import { versionQueries } from '#server/database/version/queries'
import { ingest, type Ingested } from './ingest'
import { placeFile, type PlacedFile, type UnplacedFile } from './place-file'
import { beforeOf, diffContextOf, judgeInputOf, readAgainst, type ReadAgainst } from './read-against'

export interface PlannedVersion {
  readonly outcome: 'version'
  readonly placed: PlacedFile
  readonly against: ReadAgainst
  readonly ingested: Ingested
  readonly number: number
  readonly late: boolean
  readonly base: VersionRow | null
  readonly changes: readonly FieldChange[]
  /** The same as they are told: rows renumbered are not rows rewritten. */
  readonly told: readonly FieldChange[]
  readonly renumbered: readonly Renumbering[]
  /** Of the reading that says less, as people count. */
  readonly counts: Readonly<Record<Weight, number>>
  readonly judgement: Judgement
}
export interface PlannedSighting {
  readonly outcome: 'sighting'
  readonly placed: PlacedFile
  readonly current: VersionRow
  readonly ingested: Ingested
}
export type UploadPlan
  = | { readonly outcome: 'unreadable', readonly errors: readonly FormatError[], readonly more: number }
    | { readonly outcome: 'unplaced', readonly unplaced: UnplacedFile, readonly ingested: Ingested }
    | PlannedSighting
    | PlannedVersion

/** Reads what came: by the entry table of the model that the fields name, else as the neutral form. Writes nothing. */
export function readSent(db: VaultDb, bytes: Uint8Array, { decimal, layout, serial, firmware, capturedAt }: UploadFields): ReadOutcome {
  if (layout === undefined) return readSettings(bytes, decimal === undefined ? {} : { decimal })
  const { nameplate } = layoutOf(db, layout)
  return readEntryFile(bytes, nameplate, { ...(serial === undefined ? {} : { serial }), ...(firmware === undefined ? {} : { firmware }), ...(capturedAt === undefined ? {} : { exportedAt: capturedAt }) })
}

/** The newest revision of a model by whose entry table a file is read. */
export function layoutOf(db: VaultDb, model: string): NameplateRow {
  const row = judgingQueries(db).nameplate.get({ model })
  if (row?.nameplate.entryTable) return row
  const why = row ? `the nameplate of ${model} has no entry table; a planner makes one there` : `no nameplate of ${model} is registered`
  throw new Refusal('input', `?layout: ${why}.`, { errors: [{ at: '?layout', code: 'no-entry-table', message: why }] })
}

/** What becomes of a file that came in at `receivedAt`; reads the vault and writes nothing. */
export function planUpload(db: VaultDb, actor: Actor, read: ReadOutcome, fields: UploadFields, receivedAt: number): UploadPlan {
  if (!read.ok) return { outcome: 'unreadable', errors: read.errors, more: read.more }
  const placed = placeFile(db, actor, read.value.file, receivedAt, fields.capturedAt)
  if (!placed.ok) return { outcome: 'unplaced', unplaced: placed, ingested: ingest(read.value) }
  const against = readAgainst(db, placed.place, placed.unit)
  const ingested = ingest(read.value, against.nameplate?.nameplate.dictionary)
  const routine = (fields.occasion ?? 'routine') === 'routine'
  if (routine && against.current && against.current.text === ingested.text) return { outcome: 'sighting', placed, current: against.current.version, ingested }
  return planVersion(db, placed, against, ingested)
}

/** A version of a file whose place is known, against what the axis holds now. */
export function planVersion(db: VaultDb, placed: PlacedFile, against: ReadAgainst, ingested: Ingested): PlannedVersion {
  const queries = versionQueries(db)
  const axisId = placed.place.axis.id
  const at = new Date(placed.times.orderAt).toISOString()
  const current = against.current?.version
  const late = current !== undefined && at < current.orderAt
  const base = late ? queries.base.get({ axisId, at }) ?? null : current ?? null
  const before = beforeOf(db, against, base)
  const context = diffContextOf(against)
  const changes = before.content ? diffContents(before.content, ingested.content, context) : []
  const told = before.content && changes.length > 1 ? diffRenumbered(before.content, ingested.content, context) : undefined
  return {
    outcome: 'version', placed, against, ingested, late, base, changes,
    number: (queries.highestNumber.get({ axisId })?.number ?? 0) + 1,
    told: told?.changes ?? changes, renumbered: told?.renumbered ?? [],
    counts: countByWeight(told?.changes ?? changes),
    judgement: judge(judgeInputOf(against, ingested.content, ingested.file.unit, before)),
  }
}
