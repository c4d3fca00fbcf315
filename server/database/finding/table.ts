import { integer, sqliteTable, text } from 'drizzle-orm/sqlite-core'
import type { closings, findingActKinds, FindingCause, FindingState } from '#shared/api/findings'
import type { FieldChange } from '#shared/diff/types'
import type { Weight } from '#shared/settings/types'
import { id, instant, json } from '../columns'

/** Something that a person must explain. Immutable: what was said of it are acts. */
export const finding = sqliteTable('finding', {
  id: id(),
  /** null: about the vault itself. */
  siteId: integer('site_id'),
  cause: text('cause').$type<FindingCause>().notNull(),
  causeKey: text('cause_key').notNull(),
  title: text('title').notNull(),
  weight: text('weight').$type<Weight>().notNull(),
  openedAt: instant('opened_at').notNull(),
})
export type FindingRow = typeof finding.$inferSelect

/** What showed it, at which axis; a finding that is not closed takes more of them. */
export const findingVersion = sqliteTable('finding_version', {
  id: id(),
  findingId: integer('finding_id').notNull(),
  axisId: integer('axis_id').notNull(),
  versionId: integer('version_id'),
  baseId: integer('base_id'),
  says: text('says').notNull(),
  changes: json<FieldChange[]>('changes').notNull(),
  at: instant('at').notNull(),
})
export type FindingVersionRow = typeof findingVersion.$inferSelect

/** Explained, closed, reopened; append-only. `madeBy` and `allowedBy`: free text, or `person:ID`. */
export const findingAct = sqliteTable('finding_act', {
  id: id(),
  findingId: integer('finding_id').notNull(),
  kind: text('kind').$type<(typeof findingActKinds)[number]>().notNull(),
  at: instant('at').notNull(),
  byPerson: integer('by_person').notNull(),
  text: text('text'),
  madeBy: text('made_by'),
  madeAt: instant('made_at'),
  workOrder: text('work_order'),
  plannedChangeId: integer('planned_change_id'),
  closeAs: text('close_as').$type<(typeof closings)[number]>(),
  allowedBy: text('allowed_by'),
  versionId: integer('version_id'),
})
export type FindingActRow = typeof findingAct.$inferSelect

/** Where a finding stands, derived by one function from its acts; never evidence. */
export const findingState = sqliteTable('finding_state', {
  findingId: integer('finding_id').primaryKey(),
  causeKey: text('cause_key').notNull(),
  state: text('state').$type<FindingState>().notNull(),
  dueAt: instant('due_at').notNull(),
})
