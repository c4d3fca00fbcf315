import { asc, eq, getTableColumns, sql } from 'drizzle-orm'
import type { SQLiteTable } from 'drizzle-orm/sqlite-core'
import { inflateSync } from 'node:zlib'
import { copyHashOfText, sha256Hex } from '#shared/settings/hash'
import { scribeCode } from '#shared/settings/scribe'
import type { Entry } from '#shared/trail/entry'
import { attachmentBytes, DamagedAttachment } from '../attachment/queries'
import type { AttachmentRow } from '../attachment/table'
import { prepared, type VaultDb } from '../prepared'
import * as schema from '../schema'
import { sha256 } from '../sha256'
import type { CopyHashes } from './copy-hashes'

/*
 * For each kind of subject that the log speaks of: the table of its rows, and how a row reads as the state that the newest
 * entry about it must carry. A new kind of subject must be put here before anything compiles.
 */

export type SubjectKind = Entry['subject']['kind']
export type Row = Record<string, unknown>

export interface SubjectTable {
  readonly table: SQLiteTable
  /** The column that an entry calls the subject by. */
  readonly key: string
  /** Columns that no entry carries: secrets, bytes, what is reckoned, what changes without an act. */
  readonly without?: readonly string[]
  /** Rows that end by a row elsewhere. */
  readonly end?: { readonly table: SQLiteTable, readonly key: string }
  /** What the row itself must hold besides; a sentence where it does not. Rows of contents are looked at before those of versions. */
  readonly check?: (db: VaultDb, row: Row, copies: CopyHashes) => string | null
  /** Rows that come with another act and have no entry of their own. */
  readonly unlogged?: (db: VaultDb, row: Row) => boolean
}

/** The bytes behind a compressed column; null where they cannot be unpacked. */
function unpacked(value: unknown): Buffer | null {
  try {
    return inflateSync(value as Buffer)
  }
  catch {
    // Damage is the answer; the caller names the record.
    return null
  }
}

function bytesFault(bytes: Buffer | null, { sha256: ofUpload, hash = ofUpload, size }: Row): string | null {
  if (bytes === null) return 'its bytes cannot be unpacked'
  if (sha256Hex(bytes, sha256) !== hash) return 'its bytes do not give its hash'
  return bytes.length === size ? null : `it has ${bytes.length} bytes and says ${String(size)}`
}

function contentFault(_: VaultDb, row: Row, copies: CopyHashes): string | null {
  const bytes = unpacked(row.text)
  const copyHash = bytes === null ? undefined : copyHashOfText(bytes.toString('utf8'), sha256)
  if (copyHash !== undefined) copies.note(row.id as number, copyHash)
  return bytesFault(bytes, row)
}

/** Copy hash and scribe code from the content; the content itself is looked at in its own row. */
function versionFault(_: VaultDb, row: Row, copies: CopyHashes): string | null {
  const copyHash = copies.of(row.contentId as number)
  if (copyHash === undefined) return `its content ${String(row.contentId)} cannot be read`
  if (copyHash !== row.copyHash) return 'its copy hash is not that of its content'
  return scribeCode(copyHash) === row.scribeCode ? null : 'its scribe code is not that of its content'
}

function attachmentFault(db: VaultDb, row: Row): string | null {
  try {
    for (const _ of attachmentBytes(db, row as unknown as AttachmentRow)) continue
    return null
  }
  catch (error) {
    if (error instanceof DamagedAttachment) return 'its bytes do not give its hash'
    throw error
  }
}

export const subjects: Readonly<Record<SubjectKind, SubjectTable | null>> = {
  // Acts that leave no row.
  'vault': null,
  'kit': null,
  // A queue, not evidence: its rows change while nobody acts.
  'letter': null,
  'setting': { table: schema.setting, key: 'key' },
  'person': { table: schema.person, key: 'id', without: ['passwordHash', 'lastSignInAt'] },
  'token': { table: schema.token, key: 'id', without: ['secretHash', 'lastUsedAt'] },
  'site': { table: schema.site, key: 'id' },
  'line': { table: schema.line, key: 'id' },
  'machine': { table: schema.machine, key: 'id' },
  'axis': { table: schema.axis, key: 'id' },
  'unit': { table: schema.unit, key: 'id' },
  'fitting': { table: schema.fitting, key: 'id' },
  'nameplate': { table: schema.nameplateRevision, key: 'id' },
  'rule': { table: schema.rule, key: 'id', end: { table: schema.ruleEnd, key: 'ruleId' } },
  'waiver': { table: schema.waiver, key: 'id', end: { table: schema.waiverEnd, key: 'waiverId' } },
  'upload': { table: schema.upload, key: 'id', without: ['bytes'], check: (_, row) => bytesFault(unpacked(row.bytes), row) },
  'content': { table: schema.content, key: 'id', without: ['text'], check: contentFault },
  'version': { table: schema.version, key: 'id', without: ['orderAt'], check: versionFault },
  'version-void': { table: schema.versionVoid, key: 'versionId' },
  'check-set': { table: schema.checkSet, key: 'id', unlogged: firstOfItsVersion },
  'sighting': { table: schema.sighting, key: 'id' },
  'tray': { table: schema.tray, key: 'id' },
  'tray-settled': { table: schema.traySettled, key: 'trayId' },
  'known-good': { table: schema.knownGood, key: 'id' },
  'letter-choice': { table: schema.letterChoice, key: 'id' },
  'watch': { table: schema.watch, key: 'id' },
  'attachment': { table: schema.attachment, key: 'id', check: attachmentFault },
  'label-print': { table: schema.labelPrint, key: 'id' },
  'finding': { table: schema.finding, key: 'id' },
  'finding-version': { table: schema.findingVersion, key: 'id' },
  'finding-act': { table: schema.findingAct, key: 'id' },
  'planned-change': { table: schema.plannedChange, key: 'id', end: { table: schema.plannedChangeEnd, key: 'plannedChangeId' } },
  'swap': { table: schema.swap, key: 'id' },
  'swap-step': { table: schema.swapStep, key: 'id' },
  'read-back': { table: schema.readBack, key: 'id' },
  'firmware-gap': { table: schema.firmwareGap, key: 'id' },
  'checkpoint': { table: schema.checkpoint, key: 'id' },
  'verification': { table: schema.verification, key: 'id' },
  'report': { table: schema.report, key: 'id' },
}

const queries = prepared(db => ({
  firstSet: db.select({ id: schema.checkSet.id }).from(schema.checkSet).where(eq(schema.checkSet.versionId, sql.placeholder('versionId'))).orderBy(asc(schema.checkSet.id)).limit(1).prepare(),
}))

/** The judgement that a version came with is derived from it; later ones were an act. */
function firstOfItsVersion(db: VaultDb, { id, versionId }: Row): boolean {
  return queries(db).firstSet.get({ versionId })?.id === id
}

/** What a row would say to the log; values as JSON holds them. */
export function stateOf({ without = [], end }: SubjectTable, row: Row, ended: Row | undefined): Row {
  const state: Record<string, unknown> = {}
  for (const name in row) if (row[name] !== undefined && !without.includes(name)) state[name] = row[name]
  if (end === undefined) return state
  return ended === undefined ? { ...state, endedAt: null } : { ...state, endedAt: ended.at, endedByPerson: ended.byPerson, endReason: ended.reason }
}

/** What a column holds where an entry is older than the column. */
export function valueBefore({ table }: SubjectTable, name: string): unknown {
  return getTableColumns(table)[name]?.default ?? null
}
