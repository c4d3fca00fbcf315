import { and, asc, desc, eq, gt, gte, lt, lte, notExists, sql, type SQL } from 'drizzle-orm'
import { axis } from '../axis/table'
import { axisState } from '../axis-state/table'
import { ifGiven, inBounds } from '../bounds'
import { line } from '../line/table'
import { machine } from '../machine/table'
import { person } from '../person/table'
import { prepared, type VaultDb } from '../prepared'
import { sighting } from '../sighting/table'
import { site } from '../site/table'
import { version } from '../version/table'

const place = sql.placeholder

/** The axes of a place that lie within the others that were named and within the sites that the actor sees. Each is found by another index. */
const axesWhere = (db: VaultDb, found: SQL) => db.select({ id: axis.id }).from(axis).innerJoin(machine, eq(machine.id, axis.machineId)).innerJoin(line, eq(line.id, machine.lineId))
  .where(and(found, ifGiven(machine.id, 'machineId'), ifGiven(line.id, 'lineId'), ifGiven(line.siteId, 'siteId'), inBounds(line.siteId))).limit(place('limit')).prepare()

export const historyQueries = prepared(db => ({
  /** The versions of a stretch of time are a stretch of ids, since received-at never goes back. */
  firstFrom: db.select({ id: version.id }).from(version).where(gte(version.receivedAt, place('from'))).orderBy(asc(version.receivedAt), asc(version.id)).limit(1).prepare(),
  lastBefore: db.select({ id: version.id }).from(version).where(lt(version.receivedAt, place('to'))).orderBy(desc(version.receivedAt), desc(version.id)).limit(1).prepare(),
  newest: db.select({ id: version.id }).from(version).orderBy(desc(version.id)).limit(1).prepare(),
  axesOf: { axis: axesWhere(db, eq(axis.id, place('axisId'))), machine: axesWhere(db, eq(axis.machineId, place('machineId'))), line: axesWhere(db, eq(machine.lineId, place('lineId'))), sites: axesWhere(db, sql`${line.siteId} IN (SELECT value FROM json_each(${place('siteIds')}))`) },
  peopleNamed: db.select({ id: person.id }).from(person).where(sql`${person.name} = ${place('name')} COLLATE NOCASE`).prepare(),
  /** Axes of which no file came between two instants, by id from after one. */
  notRead: db.select({ axis, machine: machine.name, line: line.name, site: site.name, timeZone: site.timeZone, status: axisState.status, lastUploadAt: axisState.lastUploadAt })
    .from(axis).innerJoin(machine, eq(machine.id, axis.machineId)).innerJoin(line, eq(line.id, machine.lineId)).innerJoin(site, eq(site.id, line.siteId))
    .leftJoin(axisState, eq(axisState.axisId, axis.id))
    .where(and(
      gt(axis.id, place('after')), inBounds(site.id), ifGiven(axis.id, 'axisId'), ifGiven(machine.id, 'machineId'), ifGiven(line.id, 'lineId'), ifGiven(site.id, 'siteId'),
      notExists(db.select({ id: version.id }).from(version).where(and(eq(version.axisId, axis.id), gte(version.id, place('first')), lte(version.id, place('last'))))),
      notExists(db.select({ id: sighting.id }).from(sighting).where(and(eq(sighting.axisId, axis.id), gte(sighting.receivedAt, place('from')), lt(sighting.receivedAt, place('to'))))),
    )).orderBy(asc(axis.id)).limit(place('limit')).prepare(),
}))
