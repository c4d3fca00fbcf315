import { integer, sqliteTable } from 'drizzle-orm/sqlite-core'
import { id, instant } from '../columns'

/** Which unit sat at which axis, from including to not including. A trigger refuses any overlap. */
export const fitting = sqliteTable('fitting', {
  id: id(),
  axisId: integer('axis_id').notNull(),
  unitId: integer('unit_id').notNull(),
  fromAt: instant('from_at').notNull(),
  toAt: instant('to_at'),
  madeAt: instant('made_at').notNull(),
})
export type FittingRow = typeof fitting.$inferSelect
