import { integer, primaryKey, sqliteTable, text } from 'drizzle-orm/sqlite-core'
import type { CheckValue, Level } from '#shared/checks/types'
import { id, instant, json } from '../columns'

/** One judgement of a version; judging again adds a set. stop, warn, note, unknown: how many results of each level. */
export const checkSet = sqliteTable('check_set', {
  id: id(),
  versionId: integer('version_id').notNull(),
  ruleSet: text('rule_set').notNull(),
  nameplateRevisionId: integer('nameplate_revision_id'),
  judgedAt: instant('judged_at').notNull(),
  judged: json<string[]>('judged').notNull(),
  notApplicable: json<string[]>('not_applicable').notNull(),
  stop: integer('stop').notNull(),
  warn: integer('warn').notNull(),
  note: integer('note').notNull(),
  unknown: integer('unknown').notNull(),
})
export type CheckSetRow = typeof checkSet.$inferSelect

export const checkResult = sqliteTable('check_result', {
  checkSetId: integer('check_set_id').notNull(),
  seq: integer('seq').notNull(),
  rule: text('rule').notNull(),
  level: text('level').$type<Level>().notNull(),
  at: json<string[]>('at').notNull(),
  message: text('message').notNull(),
  values: json<Record<string, CheckValue>>('values').notNull(),
  missing: json<string[]>('missing'),
}, table => [primaryKey({ columns: [table.checkSetId, table.seq] })])
export type CheckResultRow = typeof checkResult.$inferSelect
