import { and, asc, count, desc, eq, gt, lt, lte, ne, sql, type SQL } from 'drizzle-orm'
import { alias } from 'drizzle-orm/sqlite-core'
import { axis } from '../axis/table'
import { ifGiven, inBounds } from '../bounds'
import { inserter } from '../inserter'
import { person } from '../person/table'
import { prepared, type VaultDb } from '../prepared'
import { site } from '../site/table'
import { version } from '../version/table'
import { finding, findingAct, findingState, findingVersion } from './table'

const place = sql.placeholder
const base = alias(version, 'base')
const notClosed = ne(findingState.state, sql`'closed'`)

export const findingQueries = prepared((db) => {
  /** The plus keeps the join from being walked the other way round: by state, and then sorted. */
  const standing = (joined: SQL = eq(findingState.findingId, finding.id)) => db.select({ finding, state: findingState.state, dueAt: findingState.dueAt, timeZone: site.timeZone }).from(finding)
    .innerJoin(findingState, joined).leftJoin(site, eq(site.id, finding.siteId))
  const page = (id: typeof finding.id | typeof findingState.findingId, from: ReturnType<typeof standing>, ...where: SQL[]) => from
    .where(and(lt(id, place('below')), ...where, inBounds(finding.siteId), ifGiven(finding.siteId, 'siteId'), ifGiven(finding.weight, 'weight'))).orderBy(desc(id)).limit(place('limit')).prepare()
  return {
    byId: db.select().from(finding).where(eq(finding.id, place('id'))).prepare(),
    one: standing().where(eq(finding.id, place('id'))).prepare(),
    /** Newest first, from below an id; by the index of what was asked for, since one finding in a thousand may be open, or of one axis. */
    page: page(finding.id, standing(sql`${findingState.findingId} = +${finding.id}`)),
    pageOfState: page(findingState.findingId, standing(), eq(findingState.state, place('state'))),
    pageOfAxis: page(finding.id, standing(), sql`${finding.id} IN (SELECT ${findingVersion.findingId} FROM ${findingVersion} WHERE ${findingVersion.axisId} = ${place('axisId')})`, ifGiven(findingState.state, 'state')),
    /** The one of a cause that is not closed. */
    openByCause: db.select({ id: findingState.findingId, state: findingState.state }).from(findingState).where(and(eq(findingState.causeKey, place('causeKey')), notClosed)).prepare(),
    newestByCause: db.select({ id: finding.id, openedAt: finding.openedAt }).from(finding).where(eq(finding.causeKey, place('causeKey'))).orderBy(desc(finding.id)).limit(1).prepare(),
    /** Past their day since the first instant, and not closed. */
    overdue: standing().where(and(notClosed, gt(findingState.dueAt, place('since')), lte(findingState.dueAt, place('now')))).orderBy(asc(findingState.dueAt)).prepare(),
    /** To be explained first, then to be closed; what can hurt first, then the longest waiting. */
    waiting: standing().where(and(notClosed, inBounds(finding.siteId))).orderBy(sql`${findingState.state} = 'explained'`, sql`${finding.weight} <> 'harm'`, asc(findingState.dueAt), asc(finding.id)).limit(place('limit')).prepare(),
    countWaiting: db.select({ count: count(), since: sql<string | null>`min(${finding.openedAt})` }).from(findingState).innerJoin(finding, eq(finding.id, findingState.findingId)).where(and(notClosed, inBounds(finding.siteId))).prepare(),
    versions: db.select({ row: findingVersion, tag: axis.tag, number: version.number, capturedAt: version.capturedAt, baseNumber: base.number }).from(findingVersion)
      .innerJoin(axis, eq(axis.id, findingVersion.axisId)).leftJoin(version, eq(version.id, findingVersion.versionId)).leftJoin(base, eq(base.id, findingVersion.baseId))
      .where(eq(findingVersion.findingId, place('findingId'))).orderBy(asc(findingVersion.id)).limit(place('limit')).prepare(),
    countVersions: db.select({ count: count() }).from(findingVersion).where(eq(findingVersion.findingId, place('findingId'))).prepare(),
    hasVersion: db.select({ id: findingVersion.id }).from(findingVersion)
      .where(and(eq(findingVersion.findingId, place('findingId')), eq(findingVersion.axisId, place('axisId')), sql`${findingVersion.versionId} IS ${place('versionId')}`)).limit(1).prepare(),
    /** Findings that a version shows, and that stand in a state. */
    ofVersionIn: db.select({ id: findingState.findingId, causeKey: findingState.causeKey }).from(findingVersion).innerJoin(findingState, eq(findingState.findingId, findingVersion.findingId))
      .where(and(eq(findingVersion.versionId, place('versionId')), eq(findingState.state, place('state')))).orderBy(asc(findingState.findingId)).prepare(),
    axesOf: db.selectDistinct({ axisId: findingVersion.axisId }).from(findingVersion).where(eq(findingVersion.findingId, place('findingId'))).orderBy(asc(findingVersion.axisId)).prepare(),
    acts: db.select({ act: findingAct, by: person.name, tag: axis.tag, number: version.number }).from(findingAct).innerJoin(person, eq(person.id, findingAct.byPerson))
      .leftJoin(version, eq(version.id, findingAct.versionId)).leftJoin(axis, eq(axis.id, version.axisId)).where(eq(findingAct.findingId, place('findingId'))).orderBy(asc(findingAct.id)).prepare(),
    insert: inserter(db, finding),
    insertVersion: inserter(db, findingVersion),
    insertAct: inserter(db, findingAct),
  }
})

export type StandingFinding = NonNullable<ReturnType<ReturnType<typeof findingQueries>['one']['get']>>

const putQueries = prepared((db) => {
  const { findingId, causeKey, state, dueAt } = { findingId: place('findingId'), causeKey: place('causeKey'), state: place('state'), dueAt: place('dueAt') }
  return { put: db.insert(findingState).values({ findingId, causeKey, state, dueAt }).onConflictDoUpdate({ target: findingState.findingId, set: { causeKey: sql`excluded.cause_key`, state: sql`excluded.state`, dueAt: sql`excluded.due_at` } }).prepare() }
})

/** Puts where a finding stands over where it stood. */
export function putFindingState(db: VaultDb, row: typeof findingState.$inferInsert): void {
  putQueries(db).put.run(row)
}
