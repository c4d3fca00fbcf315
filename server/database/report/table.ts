import { integer, sqliteTable, text } from 'drizzle-orm/sqlite-core'
import type { papers } from '#shared/api/places'
import type { ReportScope } from '#shared/api/reports'
import type { SiteBounds } from '../actor'
import { id, instant, json } from '../columns'

/** An audit report that was asked for. Immutable: the paper is made of what the vault held then. */
export const report = sqliteTable('report', {
  id: id(),
  /** null: every axis of its sites. */
  scope: text('scope').$type<ReportScope>(),
  scopeId: integer('scope_id'),
  /** Sites that it tells of; null = all of them. */
  sites: json<SiteBounds>('sites'),
  fromAt: instant('from_at'),
  toAt: instant('to_at'),
  paper: text('paper').$type<(typeof papers)[number]>().notNull(),
  askedAt: instant('asked_at').notNull(),
  askedBy: integer('asked_by').notNull(),
  /** Entries of the log then, and the signed checkpoint over them. */
  size: integer('size').notNull(),
  note: text('note').notNull(),
})
export type ReportRow = typeof report.$inferSelect
