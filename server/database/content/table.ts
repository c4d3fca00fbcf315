import { blob, integer, sqliteTable, text } from 'drizzle-orm/sqlite-core'
import { id } from '../columns'

/** Canonical settings, stored once a hash: look for the hash first, an insert over a known one is refused. `text` is zlib-compressed. */
export const content = sqliteTable('content', {
  id: id(),
  hash: text('hash').notNull(),
  size: integer('size').notNull(),
  text: blob('text', { mode: 'buffer' }).notNull(),
})
export type ContentRow = typeof content.$inferSelect
