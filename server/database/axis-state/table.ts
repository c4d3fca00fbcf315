import { integer, sqliteTable, text } from 'drizzle-orm/sqlite-core'
import type { axisStatuses } from '#shared/api/versions'
import { instant, json } from '../columns'

export type AxisStatus = (typeof axisStatuses)[number]

/** A result that a waiver covers, and until when it does. */
export interface AcceptedUntil { readonly level: 'stop' | 'unknown', readonly until: string }

/** Where an axis stands, derived by one function from versions, sightings, marks and fittings; never evidence. */
export const axisState = sqliteTable('axis_state', {
  axisId: integer('axis_id').primaryKey(),
  status: text('status').$type<AxisStatus>().notNull(),
  offHarm: integer('off_harm').notNull(),
  offMotion: integer('off_motion').notNull(),
  offText: integer('off_text').notNull(),
  offSince: instant('off_since'),
  sense: text('sense').$type<'more' | 'less'>(),
  knownGoodId: integer('known_good_id'),
  knownGoodVersionId: integer('known_good_version_id'),
  currentVersionId: integer('current_version_id'),
  fittingId: integer('fitting_id'),
  lastUploadAt: instant('last_upload_at'),
  versions: integer('versions').notNull(),
  sightings: integer('sightings').notNull(),
  stop: integer('stop').notNull(),
  warn: integer('warn').notNull(),
  note: integer('note').notNull(),
  unknown: integer('unknown').notNull(),
  accepted: json<AcceptedUntil[]>('accepted').notNull(),
  /** How many backups of the drive's own tool the known-good version has. */
  backups: integer('backups').notNull(),
  /** Tag on the newest printed label; null = none was printed. */
  labelTag: text('label_tag'),
})
export type AxisStateRow = typeof axisState.$inferSelect
