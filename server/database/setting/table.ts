import { sqliteTable, text } from 'drizzle-orm/sqlite-core'
import { instant, json } from '../columns'

/** Terms of the whole vault, by name. */
export const setting = sqliteTable('setting', {
  key: text('key').primaryKey(),
  value: json<string | number | boolean | null>('value').notNull(),
  changedAt: instant('changed_at').notNull(),
})
