import { and, asc, desc, eq, gt, isNull, lt, lte, sql } from 'drizzle-orm'
import { alias } from 'drizzle-orm/sqlite-core'
import { axis } from '../axis/table'
import { finding, findingAct, findingState } from '../finding/table'
import { inserter } from '../inserter'
import { line } from '../line/table'
import { machine } from '../machine/table'
import { person } from '../person/table'
import { prepared } from '../prepared'
import { plannedChange, plannedChangeEnd } from './table'

const place = sql.placeholder
const ender = alias(person, 'ender')
/** True where every axis of the plan stands at a site of `sites`. */
const allSeen = sql`(${place('sites')} IS NULL OR NOT EXISTS (
  SELECT 1 FROM json_each(${plannedChange.axisIds}) AS named JOIN ${axis} ON ${axis.id} = named.value JOIN ${machine} ON ${machine.id} = ${axis.machineId} JOIN ${line} ON ${line.id} = ${machine.lineId}
  WHERE ${line.siteId} NOT IN (SELECT value FROM json_each(${place('sites')}))))`

export const plannedChangeQueries = prepared((db) => {
  const named = () => db.select({ plan: plannedChange, announcer: person.name, end: { at: plannedChangeEnd.at, by: ender.name, reason: plannedChangeEnd.reason } }).from(plannedChange)
    .innerJoin(person, eq(person.id, plannedChange.madeBy)).leftJoin(plannedChangeEnd, eq(plannedChangeEnd.plannedChangeId, plannedChange.id)).leftJoin(ender, eq(ender.id, plannedChangeEnd.byPerson))
  return {
    one: named().where(eq(plannedChange.id, place('id'))).prepare(),
    page: named().where(and(lt(plannedChange.id, place('below')), allSeen)).orderBy(desc(plannedChange.id)).limit(place('limit')).prepare(),
    /** Those of an axis that hold in some part of a span of time, were announced by its end, and were not called off. */
    holding: db.select({ plan: plannedChange }).from(plannedChange).leftJoin(plannedChangeEnd, eq(plannedChangeEnd.plannedChangeId, plannedChange.id))
      .where(and(isNull(plannedChangeEnd.plannedChangeId), lte(plannedChange.fromAt, place('to')), gt(plannedChange.untilAt, place('from')), lte(plannedChange.madeAt, place('to')),
        sql`EXISTS (SELECT 1 FROM json_each(${plannedChange.axisIds}) WHERE value = ${place('axisId')})`)).orderBy(asc(plannedChange.id)).prepare(),
    /** The findings that a plan explained. */
    came: db.select({ findingId: finding.id, at: finding.openedAt, title: finding.title, state: findingState.state }).from(findingAct)
      .innerJoin(finding, eq(finding.id, findingAct.findingId)).innerJoin(findingState, eq(findingState.findingId, finding.id))
      .where(eq(findingAct.plannedChangeId, place('id'))).orderBy(asc(finding.id)).prepare(),
    axes: db.select({ id: axis.id, tag: axis.tag }).from(axis).where(sql`${axis.id} IN (SELECT value FROM json_each(${place('ids')}))`).orderBy(asc(axis.tag)).prepare(),
    insert: inserter(db, plannedChange),
    insertEnd: inserter(db, plannedChangeEnd),
  }
})

export type NamedPlan = NonNullable<ReturnType<ReturnType<typeof plannedChangeQueries>['one']['get']>>
