import { integer, sqliteTable, text } from 'drizzle-orm/sqlite-core'
import type { labelSizes } from '#shared/api/labels'
import { id, instant } from '../columns'

export type LabelSize = (typeof labelSizes)[number]

/** Append-only: that a label of an axis was printed, with the tag that stands on it. */
export const labelPrint = sqliteTable('label_print', {
  id: id(),
  axisId: integer('axis_id').notNull(),
  tag: text('tag').notNull(),
  size: text('size').$type<LabelSize>().notNull(),
  at: instant('at').notNull(),
  byPerson: integer('by_person').notNull(),
})
