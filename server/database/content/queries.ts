import { eq, sql } from 'drizzle-orm'
import { deflateSync, inflateSync } from 'node:zlib'
import { contentOfText } from '#shared/settings/stored-content'
import type { Content } from '#shared/settings/types'
import { inserter } from '../inserter'
import { prepared, type VaultDb } from '../prepared'
import { content } from './table'

const contentQueries = prepared(db => ({
  byHash: db.select({ id: content.id }).from(content).where(eq(content.hash, sql.placeholder('hash'))).prepare(),
  byId: db.select().from(content).where(eq(content.id, sql.placeholder('id'))).prepare(),
  insert: inserter(db, content),
}))

/** The canonical text of a stored content and its hash; throws where there is no such id. */
export function readContentText(db: VaultDb, id: number): { text: string, hash: string } {
  const row = contentQueries(db).byId.get({ id })
  if (!row) throw new RangeError(`There is no content ${id}.`)
  return { text: inflateSync(row.text).toString('utf8'), hash: row.hash }
}

/** A stored content as it was validated when it came in. */
export const readContent = (db: VaultDb, id: number): Content => contentOfText(readContentText(db, id).text)

/** The id of the content of this hash; undefined where it was never stored. */
export const contentIdOf = (db: VaultDb, hash: string): number | undefined => contentQueries(db).byHash.get({ hash })?.id

/** Stores a content that is not there yet. */
export function insertContent(db: VaultDb, hash: string, text: string): number {
  const bytes = Buffer.from(text, 'utf8')
  return contentQueries(db).insert({ hash, size: bytes.length, text: deflateSync(bytes) })
}
