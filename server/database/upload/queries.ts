import { eq, sql } from 'drizzle-orm'
import { deflateSync, inflateSync } from 'node:zlib'
import { inserter } from '../inserter'
import { prepared, type VaultDb } from '../prepared'
import { upload, type UploadRow } from './table'

export const uploadQueries = prepared(db => ({
  facts: db.select({ id: upload.id, sha256: upload.sha256, size: upload.size, form: upload.form, name: upload.name }).from(upload).where(eq(upload.id, sql.placeholder('id'))).prepare(),
  byId: db.select().from(upload).where(eq(upload.id, sql.placeholder('id'))).prepare(),
  insert: inserter(db, upload),
}))

/** Stores the bytes, compressed. */
export function insertUpload(db: VaultDb, row: Omit<UploadRow, 'id' | 'bytes'>, bytes: Uint8Array): number {
  return uploadQueries(db).insert({ ...row, bytes: deflateSync(bytes) })
}

/** The bytes as they came; throws where there is no such upload. */
export function readUploadBytes(db: VaultDb, id: number): Buffer {
  const row = uploadQueries(db).byId.get({ id })
  if (!row) throw new RangeError(`There is no upload ${id}.`)
  return inflateSync(row.bytes)
}
