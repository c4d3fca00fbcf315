import { integer, sqliteTable, text } from 'drizzle-orm/sqlite-core'
import type { Waiver } from '#shared/checks/waivers'
import { id, instant, json } from '../columns'

/** Immutable; a waiver that somebody took back has a row in `waiver_end`. */
export const waiver = sqliteTable('waiver', {
  id: id(),
  axisId: integer('axis_id').notNull(),
  rule: text('rule').notNull(),
  places: json<string[]>('places').notNull(),
  covers: json<Waiver['covers']>('covers').notNull(),
  reason: text('reason').notNull(),
  untilAt: instant('until_at').notNull(),
  givenAt: instant('given_at').notNull(),
  givenBy: integer('given_by').notNull(),
})
export type WaiverRow = typeof waiver.$inferSelect

export const waiverEnd = sqliteTable('waiver_end', {
  waiverId: integer('waiver_id').primaryKey(),
  at: instant('at').notNull(),
  byPerson: integer('by_person').notNull(),
  reason: text('reason').notNull(),
})
