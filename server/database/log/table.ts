import { integer, sqliteTable, text } from 'drizzle-orm/sqlite-core'

/** Append-only. `leaf` is the very string that is hashed (shared/trail/entry.ts); seq counts from 0 without gaps. */
export const log = sqliteTable('log', {
  seq: integer('seq').primaryKey(),
  leaf: text('leaf').notNull(),
})
