import { integer, sqliteTable, text } from 'drizzle-orm/sqlite-core'
import { flag, instant } from '../columns'

/** The cookie holds a random id; here stands its SHA-256, so that a copied database opens no session. */
export const session = sqliteTable('session', {
  idHash: text('id_hash').primaryKey(),
  personId: integer('person_id').notNull(),
  panel: flag('panel').notNull(),
  peer: text('peer').notNull(),
  madeAt: instant('made_at').notNull(),
  seenAt: instant('seen_at').notNull(),
  endedAt: instant('ended_at'),
})
export type SessionRow = typeof session.$inferSelect
