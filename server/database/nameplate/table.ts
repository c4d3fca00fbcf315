import { integer, sqliteTable, text } from 'drizzle-orm/sqlite-core'
import type { Nameplate } from '#shared/settings/nameplate'
import { id, instant, json } from '../columns'

/** Immutable: a change of a model's nameplate is its next revision. */
export const nameplateRevision = sqliteTable('nameplate_revision', {
  id: id(),
  model: text('model').notNull(),
  revision: integer('revision').notNull(),
  nameplate: json<Nameplate>('nameplate').notNull(),
  madeAt: instant('made_at').notNull(),
  madeBy: integer('made_by').notNull(),
})
export type NameplateRow = typeof nameplateRevision.$inferSelect
