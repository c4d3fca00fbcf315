import { integer, primaryKey, sqliteTable, text } from 'drizzle-orm/sqlite-core'
import { instant } from '../columns'

/** The first answer to a keyed request, for 24 hours. `answer` is sealed: it may hold a token that is shown once. */
export const idempotency = sqliteTable('idempotency', {
  actor: text('actor').notNull(),
  keyHash: text('key_hash').notNull(),
  route: text('route').notNull(),
  bodyHash: text('body_hash').notNull(),
  status: integer('status').notNull(),
  answer: text('answer').notNull(),
  at: instant('at').notNull(),
}, table => [primaryKey({ columns: [table.actor, table.keyHash] })])
export type IdempotencyRow = typeof idempotency.$inferSelect
