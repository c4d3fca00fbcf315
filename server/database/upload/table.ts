import { blob, integer, sqliteTable, text } from 'drizzle-orm/sqlite-core'
import { id, instant } from '../columns'

/** The bytes as they came, zlib-compressed; `sha256` and `size` are those of the bytes before that. With a token, `personId` is its owner. */
export const upload = sqliteTable('upload', {
  id: id(),
  sha256: text('sha256').notNull(),
  size: integer('size').notNull(),
  bytes: blob('bytes', { mode: 'buffer' }).notNull(),
  form: text('form').$type<'json' | 'csv'>().notNull(),
  name: text('name'),
  receivedAt: instant('received_at').notNull(),
  personId: integer('person_id').notNull(),
  tokenId: integer('token_id'),
  peer: text('peer').notNull(),
})
export type UploadRow = typeof upload.$inferSelect
