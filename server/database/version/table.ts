import { sql } from 'drizzle-orm'
import { integer, sqliteTable, text } from 'drizzle-orm/sqlite-core'
import type { Occasion } from '#shared/api/versions'
import type { ExtraValue, Normalised, UnitIdentity } from '#shared/settings/types'
import { flag, id, instant, json } from '../columns'

/** What the file says besides content, and the receipt of reading it. */
export interface FileFacts {
  unit: UnitIdentity
  exportedAt: string
  exportedBy?: string
  note?: string
  readings: Readonly<Record<string, ExtraValue>>
  normalised: Normalised
}

/** Immutable. `changedBy` and `allowedBy`: free text, or `person:ID`. harm, motion, text: changes against the base, by weight. */
export const version = sqliteTable('version', {
  id: id(),
  axisId: integer('axis_id').notNull(),
  number: integer('number').notNull(),
  unitId: integer('unit_id').notNull(),
  uploadId: integer('upload_id').notNull(),
  contentId: integer('content_id').notNull(),
  baseId: integer('base_id'),
  occasion: text('occasion').$type<Occasion>().notNull(),
  capturedAt: instant('captured_at').notNull(),
  receivedAt: instant('received_at').notNull(),
  clockDoubtful: flag('clock_doubtful').notNull(),
  /** What order, late and base go by: received-at where the clock is doubtful. */
  orderAt: instant('order_at').notNull().generatedAlwaysAs(sql`iif(clock_doubtful = 1, received_at, captured_at)`),
  late: flag('late').notNull(),
  reason: text('reason'),
  workOrder: text('work_order'),
  changedBy: text('changed_by'),
  allowedBy: text('allowed_by'),
  storedBy: integer('stored_by').notNull(),
  storedByToken: integer('stored_by_token'),
  engine: text('engine').notNull(),
  copyHash: text('copy_hash').notNull(),
  scribeCode: text('scribe_code').notNull(),
  model: text('model').notNull(),
  firmware: text('firmware'),
  harm: integer('harm').notNull(),
  motion: integer('motion').notNull(),
  text: integer('text').notNull(),
  file: json<FileFacts>('file').notNull(),
})
export type VersionRow = typeof version.$inferSelect

/** A wrong upload; the version stays readable. */
export const versionVoid = sqliteTable('version_void', {
  versionId: integer('version_id').primaryKey(),
  at: instant('at').notNull(),
  byPerson: integer('by_person').notNull(),
  reason: text('reason').notNull(),
})
export type VersionVoidRow = typeof versionVoid.$inferSelect
