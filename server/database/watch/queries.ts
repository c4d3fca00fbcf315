import { and, asc, eq, or, sql } from 'drizzle-orm'
import type { WatchScope } from '#shared/api/letters'
import { axis } from '../axis/table'
import { line } from '../line/table'
import { machine } from '../machine/table'
import { prepared, type VaultDb } from '../prepared'
import { site } from '../site/table'
import { watch, type WatchRow } from './table'

const place = sql.placeholder
const on = (scope: WatchScope, name: string) => and(eq(watch.scope, scope), eq(watch.scopeId, place(name)))

export const watchQueries = prepared((db) => {
  const named = { site: sql<string>`(SELECT name FROM ${site} WHERE id = ${watch.scopeId})`, line: sql<string>`(SELECT name FROM ${line} WHERE id = ${watch.scopeId})`, machine: sql<string>`(SELECT name FROM ${machine} WHERE id = ${watch.scopeId})`, axis: sql<string>`(SELECT tag FROM ${axis} WHERE id = ${watch.scopeId})` }
  return {
    /** What a person watches, from the widest place to the narrowest. */
    ofPerson: db.select({ scope: watch.scope, scopeId: watch.scopeId, name: sql<string>`CASE ${watch.scope} WHEN 'site' THEN ${named.site} WHEN 'line' THEN ${named.line} WHEN 'machine' THEN ${named.machine} ELSE ${named.axis} END` })
      .from(watch).where(and(eq(watch.personId, place('personId')), eq(watch.watched, true)))
      .orderBy(sql`CASE ${watch.scope} WHEN 'site' THEN 0 WHEN 'line' THEN 1 WHEN 'machine' THEN 2 ELSE 3 END`, asc(watch.scopeId)).prepare(),
    /** Who watches an axis, or a place that it stands in. */
    ofAxis: db.selectDistinct({ personId: watch.personId }).from(watch)
      .where(and(eq(watch.watched, true), or(on('axis', 'axisId'), on('machine', 'machineId'), on('line', 'lineId'), on('site', 'siteId')))).orderBy(asc(watch.personId)).prepare(),
  }
})

/** Puts what a person says of a place over what they said before; answers the row as it stands. */
export function putWatch(db: VaultDb, row: Omit<WatchRow, 'id'>): WatchRow {
  return db.insert(watch).values(row).onConflictDoUpdate({ target: [watch.personId, watch.scope, watch.scopeId], set: row }).returning().get()
}
