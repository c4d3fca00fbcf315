import { and, asc, count, eq, getTableColumns, sql } from 'drizzle-orm'
import { createHash } from 'node:crypto'
import { inserter } from '../inserter'
import { person } from '../person/table'
import { prepared, type VaultDb } from '../prepared'
import { token } from '../token/table'
import { unit } from '../unit/table'
import { version } from '../version/table'
import { attachment, attachmentChunk, type AttachmentRow } from './table'

const place = sql.placeholder

export const attachmentQueries = prepared((db) => {
  const named = () => db.select({ ...getTableColumns(attachment), by: person.name, token: token.name, serial: unit.serial, model: version.model }).from(attachment)
    .innerJoin(person, eq(person.id, attachment.personId)).innerJoin(version, eq(version.id, attachment.versionId)).innerJoin(unit, eq(unit.id, version.unitId))
    .leftJoin(token, eq(token.id, attachment.tokenId))
  return {
    byId: db.select().from(attachment).where(eq(attachment.id, place('id'))).prepare(),
    named: named().where(eq(attachment.id, place('id'))).prepare(),
    /** The drive tool's own backups first, then in the order they came. */
    ofVersion: named().where(eq(attachment.versionId, place('versionId'))).orderBy(asc(sql`${attachment.kind} <> 'drive-backup'`), asc(attachment.id)).prepare(),
    same: db.select({ id: attachment.id }).from(attachment).where(and(eq(attachment.versionId, place('versionId')), eq(attachment.sha256, place('sha256')))).prepare(),
    backups: db.select({ count: count() }).from(attachment).where(and(eq(attachment.versionId, place('versionId')), eq(attachment.kind, 'drive-backup'))).prepare(),
    chunk: db.select({ bytes: attachmentChunk.bytes }).from(attachmentChunk).where(and(eq(attachmentChunk.attachmentId, place('id')), eq(attachmentChunk.seq, place('seq')))).prepare(),
    insert: inserter(db, attachment),
    insertChunk: inserter(db, attachmentChunk),
  }
})

export type NamedAttachment = NonNullable<ReturnType<ReturnType<typeof attachmentQueries>['named']['get']>>

/** Stored bytes that are not those that came in: the disk or a hand has altered them. */
export class DamagedAttachment extends Error {}

/**
 * The bytes, one chunk after the other. The last one is held back until the hash over all of them is the stored one; where it
 * is another, DamagedAttachment is thrown in its place, so that nobody holds a whole file that is not the one that came in.
 */
export function* attachmentBytes(db: VaultDb, { id, sha256, size }: Pick<AttachmentRow, 'id' | 'sha256' | 'size'>): Generator<Buffer> {
  const hash = createHash('sha256')
  let held: Buffer | undefined
  let come = 0
  for (let seq = 0; come < size; seq += 1) {
    const next = attachmentQueries(db).chunk.get({ id, seq })
    if (!next || next.bytes.length === 0) break
    hash.update(next.bytes)
    come += next.bytes.length
    if (held) yield held
    held = next.bytes
  }
  if (come !== size || hash.digest('hex') !== sha256) throw new DamagedAttachment(`The stored bytes of attachment ${id} are not those that came in (SHA-256 ${sha256}).`)
  if (held) yield held
}
