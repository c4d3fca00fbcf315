import { blob, integer, sqliteTable, text } from 'drizzle-orm/sqlite-core'
import type { attachmentKinds } from '#shared/api/attachments'
import { id, instant } from '../columns'

export type AttachmentKind = (typeof attachmentKinds)[number]

/** A file that the vault keeps without reading it; `size` and `sha256` are those of its chunks in order. With a token, `personId` is its owner. */
export const attachment = sqliteTable('attachment', {
  id: id(),
  versionId: integer('version_id').notNull(),
  kind: text('kind').$type<AttachmentKind>().notNull(),
  name: text('name').notNull(),
  mediaType: text('media_type').notNull(),
  note: text('note'),
  size: integer('size').notNull(),
  sha256: text('sha256').notNull(),
  receivedAt: instant('received_at').notNull(),
  personId: integer('person_id').notNull(),
  tokenId: integer('token_id'),
  peer: text('peer').notNull(),
})
export type AttachmentRow = typeof attachment.$inferSelect

export const attachmentChunk = sqliteTable('attachment_chunk', {
  id: id(),
  attachmentId: integer('attachment_id').notNull(),
  seq: integer('seq').notNull(),
  bytes: blob('bytes', { mode: 'buffer' }).notNull(),
})
