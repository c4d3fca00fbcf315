import { integer, primaryKey, real, sqliteTable, text } from 'drizzle-orm/sqlite-core'
import type { Section } from '#shared/diff/types'
import type { ExtraValue, Weight } from '#shared/settings/types'
import { flag, json } from '../columns'

/** What a version differs in from its base, flat reading; can be derived again. */
export const change = sqliteTable('change', {
  versionId: integer('version_id').notNull(),
  seq: integer('seq').notNull(),
  section: text('section').$type<Section>().notNull(),
  field: text('field').notNull(),
  row: integer('row'),
  at: text('at').notNull(),
  before: json<ExtraValue>('before'),
  after: json<ExtraValue>('after'),
  unit: text('unit'),
  delta: real('delta'),
  percent: real('percent'),
  points: real('points'),
  weight: text('weight').$type<Weight>().notNull(),
  watched: flag('watched').notNull(),
  affects: json<number[]>('affects'),
}, table => [primaryKey({ columns: [table.versionId, table.seq] })])
export type ChangeRow = typeof change.$inferSelect
