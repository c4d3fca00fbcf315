import { integer, primaryKey, sqliteTable, text } from 'drizzle-orm/sqlite-core'
import { flag } from '../columns'

/** Whether a kind of spare fits an axis, by the terms that it was worked out by; derived, never evidence. */
export const spareFit = sqliteTable('spare_fit', {
  axisId: integer('axis_id').notNull(),
  kind: text('kind').notNull(),
  terms: text('terms').notNull(),
  fits: flag('fits').notNull(),
}, table => [primaryKey({ columns: [table.axisId, table.kind] })])
export type SpareFitRow = typeof spareFit.$inferSelect
