import { integer, sqliteTable, text } from 'drizzle-orm/sqlite-core'
import { id, instant } from '../columns'

/** The axis' current content came in again: evidence without a version. The bytes are not kept, their hash is. */
export const sighting = sqliteTable('sighting', {
  id: id(),
  axisId: integer('axis_id').notNull(),
  versionId: integer('version_id').notNull(),
  uploadSha256: text('upload_sha256').notNull(),
  name: text('name'),
  capturedAt: instant('captured_at').notNull(),
  receivedAt: instant('received_at').notNull(),
  personId: integer('person_id').notNull(),
  tokenId: integer('token_id'),
  peer: text('peer').notNull(),
})
export type SightingRow = typeof sighting.$inferSelect
