import { integer, real, sqliteTable, text } from 'drizzle-orm/sqlite-core'
import { id, instant, json } from '../columns'

/** Announced before it is made. Immutable; one that was called off has a row in `planned_change_end`. */
export const plannedChange = sqliteTable('planned_change', {
  id: id(),
  axisIds: json<number[]>('axis_ids').notNull(),
  fields: json<string[]>('fields').notNull(),
  min: real('min'),
  max: real('max'),
  fromAt: instant('from_at').notNull(),
  untilAt: instant('until_at').notNull(),
  reason: text('reason').notNull(),
  allowedBy: text('allowed_by').notNull(),
  madeAt: instant('made_at').notNull(),
  madeBy: integer('made_by').notNull(),
  /** Fields with a range of their own; min and max hold for the others. */
  ranges: json<{ field: string, min: number | null, max: number | null }[] | null>('ranges'),
})
export type PlannedChangeRow = typeof plannedChange.$inferSelect

export const plannedChangeEnd = sqliteTable('planned_change_end', {
  plannedChangeId: integer('planned_change_id').primaryKey(),
  at: instant('at').notNull(),
  byPerson: integer('by_person').notNull(),
  reason: text('reason').notNull(),
})
