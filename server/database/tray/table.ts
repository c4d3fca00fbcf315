import { integer, sqliteTable, text } from 'drizzle-orm/sqlite-core'
import type { ProblemError } from '#shared/api/common'
import type { trayProblems, UploadFields } from '#shared/api/uploads'
import { id, instant, json } from '../columns'

export type TrayProblem = (typeof trayProblems)[number]

/** A file that waits for a person. What became of it is a row of `tray_settled`. */
export const tray = sqliteTable('tray', {
  id: id(),
  uploadId: integer('upload_id').notNull(),
  problem: text('problem').$type<TrayProblem>().notNull(),
  detail: text('detail').notNull(),
  errors: json<ProblemError[]>('errors').notNull().default([]),
  more: integer('more').notNull().default(0),
  fields: json<UploadFields>('fields').notNull().default({}),
  siteId: integer('site_id'),
  serial: text('serial'),
  channel: integer('channel'),
  model: text('model'),
  capturedAt: instant('captured_at'),
  contentId: integer('content_id'),
  guessAxisId: integer('guess_axis_id'),
  guessWhy: text('guess_why'),
})
export type TrayRow = typeof tray.$inferSelect

export const traySettled = sqliteTable('tray_settled', {
  trayId: integer('tray_id').primaryKey(),
  outcome: text('outcome').$type<'assigned' | 'discarded'>().notNull(),
  at: instant('at').notNull(),
  byPerson: integer('by_person').notNull(),
  reason: text('reason'),
  versionId: integer('version_id'),
  sightingId: integer('sighting_id'),
})
export type TraySettledRow = typeof traySettled.$inferSelect
