import { integer, sqliteTable, text } from 'drizzle-orm/sqlite-core'
import { id, instant } from '../columns'

export const line = sqliteTable('line', {
  id: id(),
  rev: integer('rev').notNull().default(1),
  siteId: integer('site_id').notNull(),
  name: text('name').notNull(),
  madeAt: instant('made_at').notNull(),
})
export type LineRow = typeof line.$inferSelect
