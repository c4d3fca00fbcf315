import { integer, sqliteTable, text } from 'drizzle-orm/sqlite-core'
import type { unitStates } from '#shared/api/places'
import { id, instant } from '../columns'

export type UnitState = (typeof unitStates)[number]

/** What holds the settings. Serial and channel together are unique, without case, and kept as first written. */
export const unit = sqliteTable('unit', {
  id: id(),
  rev: integer('rev').notNull().default(1),
  serial: text('serial').notNull(),
  channel: integer('channel'),
  model: text('model').notNull(),
  firmware: text('firmware'),
  actuatorSerial: text('actuator_serial'),
  actuatorModel: text('actuator_model'),
  location: text('location').notNull().default(''),
  state: text('state').$type<UnitState>().notNull(),
  siteId: integer('site_id'),
  madeAt: instant('made_at').notNull(),
})
export type UnitRow = typeof unit.$inferSelect
