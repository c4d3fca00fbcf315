import { and, asc, eq, getTableColumns, gt, sql } from 'drizzle-orm'
import { alias } from 'drizzle-orm/sqlite-core'
import { inBounds } from '../bounds'
import { person } from '../person/table'
import { prepared, type VaultDb } from '../prepared'
import { rule, ruleEnd, type RuleRow } from './table'

const placeholder = sql.placeholder

/** Name and site of the place that a rule is for, whichever kind of place that is. */
const place = (forMachine: string, forAxis: string, forSite: string) => sql.raw(`CASE rule.scope
  WHEN 'site' THEN (SELECT ${forSite} FROM site WHERE site.id = rule.scope_id)
  WHEN 'machine' THEN (SELECT ${forMachine} FROM machine JOIN line ON line.id = machine.line_id WHERE machine.id = rule.scope_id)
  ELSE (SELECT ${forAxis} FROM axis JOIN machine ON machine.id = axis.machine_id JOIN line ON line.id = machine.line_id WHERE axis.id = rule.scope_id) END`)

export const ruleRows = prepared((db) => {
  const ender = alias(person, 'ender')
  const named = () => db.select({
    ...getTableColumns(rule), scopeName: sql<string>`${place('machine.name', 'axis.tag', 'site.name')}`, maker: person.name,
    endedAt: ruleEnd.at, endedBy: ender.name, endReason: ruleEnd.reason,
  }).from(rule).innerJoin(person, eq(person.id, rule.madeBy)).leftJoin(ruleEnd, eq(ruleEnd.ruleId, rule.id)).leftJoin(ender, eq(ender.id, ruleEnd.byPerson))
  return {
    named: named().where(eq(rule.id, placeholder('id'))).prepare(),
    page: named().where(and(gt(rule.id, placeholder('after')), inBounds(place('line.site_id', 'line.site_id', 'site.id')))).orderBy(asc(rule.id)).limit(placeholder('limit')).prepare(),
  }
})

export function insertRule(db: VaultDb, values: typeof rule.$inferInsert): RuleRow {
  return db.insert(rule).values(values).returning().get()
}

export function insertRuleEnd(db: VaultDb, values: typeof ruleEnd.$inferInsert): void {
  db.insert(ruleEnd).values(values).run()
}
