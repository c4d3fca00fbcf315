import { integer, sqliteTable, text } from 'drizzle-orm/sqlite-core'
import type { papers } from '#shared/api/places'
import { flag, id, instant, json } from '../columns'

export const site = sqliteTable('site', {
  id: id(),
  rev: integer('rev').notNull().default(1),
  name: text('name').notNull(),
  timeZone: text('time_zone').notNull(),
  fourEyes: flag('four_eyes').notNull().default(true),
  releaseHours: integer('release_hours').notNull().default(24),
  knownGoodMonths: integer('known_good_months').notNull().default(24),
  watched: json<string[]>('watched').notNull().default([]),
  madeAt: instant('made_at').notNull(),
  /** Readiness asks for the drive tool's own backup, for a printed label. */
  attachmentWanted: flag('attachment_wanted').notNull().default(false),
  labelWanted: flag('label_wanted').notNull().default(true),
  /** What restore sheets are printed on. */
  paper: text('paper').$type<(typeof papers)[number]>().notNull().default('A4'),
})
export type SiteRow = typeof site.$inferSelect
