import { blob, integer, primaryKey, sqliteTable, text } from 'drizzle-orm/sqlite-core'

/** Append-only. `leaf` is the very string that is hashed (shared/trail/entry.ts); seq counts from 0 without gaps. */
export const log = sqliteTable('log', {
  seq: integer('seq').primaryKey(),
  leaf: text('leaf').notNull(),
})

/** Hashes of complete subtrees over the log, for the levels that are kept; the others are reckoned from those below. */
export const logNode = sqliteTable('log_node', {
  level: integer('level').notNull(),
  place: integer('place').notNull(),
  hash: blob('hash', { mode: 'buffer' }).notNull(),
}, table => [primaryKey({ columns: [table.level, table.place] })])
