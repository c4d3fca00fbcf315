import { integer, sqliteTable, text } from 'drizzle-orm/sqlite-core'
import type { WatchScope } from '#shared/api/letters'
import { flag, id, instant } from '../columns'

/** Who wants to hear of the axes of a place; watched false once they want no more. */
export const watch = sqliteTable('watch', {
  id: id(),
  personId: integer('person_id').notNull(),
  scope: text('scope').$type<WatchScope>().notNull(),
  scopeId: integer('scope_id').notNull(),
  watched: flag('watched').notNull(),
  chosenAt: instant('chosen_at').notNull(),
})
export type WatchRow = typeof watch.$inferSelect
