import { integer, real, sqliteTable, text } from 'drizzle-orm/sqlite-core'
import { id, instant } from '../columns'

export const machine = sqliteTable('machine', {
  id: id(),
  rev: integer('rev').notNull().default(1),
  lineId: integer('line_id').notNull(),
  name: text('name').notNull(),
  madeAt: instant('made_at').notNull(),
  controllerScanMs: real('controller_scan_ms'),
})
export type MachineRow = typeof machine.$inferSelect
