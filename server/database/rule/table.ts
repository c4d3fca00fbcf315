import { integer, real, sqliteTable, text } from 'drizzle-orm/sqlite-core'
import type { ruleScopes } from '#shared/api/places'
import { id, instant, json } from '../columns'

export type RuleScope = (typeof ruleScopes)[number]

/** Immutable; a rule that holds no more has a row in `rule_end`. */
export const rule = sqliteTable('rule', {
  id: id(),
  scope: text('scope').$type<RuleScope>().notNull(),
  scopeId: integer('scope_id').notNull(),
  field: text('field').notNull(),
  min: real('min'),
  max: real('max'),
  fixed: json<number | boolean | string>('fixed'),
  reason: text('reason').notNull(),
  madeAt: instant('made_at').notNull(),
  madeBy: integer('made_by').notNull(),
})
export type RuleRow = typeof rule.$inferSelect

export const ruleEnd = sqliteTable('rule_end', {
  ruleId: integer('rule_id').primaryKey(),
  at: instant('at').notNull(),
  byPerson: integer('by_person').notNull(),
  reason: text('reason').notNull(),
})
