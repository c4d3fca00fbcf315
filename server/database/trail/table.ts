import { integer, sqliteTable, text } from 'drizzle-orm/sqlite-core'
import type { Fault } from '#shared/api/trail'
import { id, instant, json } from '../columns'

/** A signed checkpoint that was given away, or kept for the day. */
export const checkpoint = sqliteTable('checkpoint', {
  id: id(),
  size: integer('size').notNull(),
  note: text('note').notNull(),
  takenAt: instant('taken_at').notNull(),
})

/** What a verification of the whole vault found. `rows`: how many rows beside the log were held against it. */
export const verification = sqliteTable('verification', {
  id: id(),
  begunAt: instant('begun_at').notNull(),
  endedAt: instant('ended_at').notNull(),
  outcome: text('outcome').$type<'sound' | 'damage' | 'failed'>().notNull(),
  entries: integer('entries').notNull(),
  rows: integer('rows').notNull(),
  found: json<Fault[]>('found').notNull(),
  faults: integer('faults').notNull(),
})
export type VerificationRow = typeof verification.$inferSelect
