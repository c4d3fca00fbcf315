import { and, desc, eq, inArray, sql } from 'drizzle-orm'
import { finding, findingAct, findingVersion } from '../finding/table'
import { fitting } from '../fitting/table'
import { knownGood } from '../known-good/table'
import { person } from '../person/table'
import { prepared } from '../prepared'
import { swap, swapStep } from '../swap/table'
import { token } from '../token/table'
import { unit } from '../unit/table'
import { version, versionVoid } from '../version/table'

const place = sql.placeholder
const before = (at: unknown, id: unknown) => sql`(${at}, ${id}) < (${place('at')}, ${place('id')})`

const ofAxis = sql`${finding.id} IN (SELECT finding_id FROM ${findingVersion} WHERE axis_id = ${place('axisId')})`

/**
 * What happened to an axis, one statement a kind, newest first and each from before (at, id): keys by index first, a page at
 * a time, then put together.
 */
export const lifeQueries = prepared(db => ({
  versions: db.select({
    id: version.id, at: version.orderAt, number: version.number, occasion: version.occasion, reason: version.reason, harm: version.harm, motion: version.motion, text: version.text,
    serial: unit.serial, storedBy: person.name, token: token.name,
    sightings: sql<number>`(SELECT count(*) FROM sighting WHERE sighting.version_id = ${version.id})`,
  }).from(version).innerJoin(unit, eq(unit.id, version.unitId)).innerJoin(person, eq(person.id, version.storedBy)).leftJoin(token, eq(token.id, version.storedByToken))
    .where(and(eq(version.axisId, place('axisId')), before(version.orderAt, version.number))).orderBy(desc(version.orderAt), desc(version.number)).limit(place('limit')).prepare(),
  marks: db.select({ id: knownGood.id, at: knownGood.at, versionId: knownGood.versionId, number: version.number, note: knownGood.note, by: person.name })
    .from(knownGood).innerJoin(person, eq(person.id, knownGood.byPerson)).leftJoin(version, eq(version.id, knownGood.versionId))
    .where(and(eq(knownGood.axisId, place('axisId')), before(knownGood.at, knownGood.id))).orderBy(desc(knownGood.id)).limit(place('limit')).prepare(),
  voids: db.select({ id: version.id, at: versionVoid.at, number: version.number, reason: versionVoid.reason, by: person.name })
    .from(version).innerJoin(versionVoid, eq(versionVoid.versionId, version.id)).innerJoin(person, eq(person.id, versionVoid.byPerson))
    .where(and(eq(version.axisId, place('axisId')), before(versionVoid.at, version.id))).orderBy(desc(versionVoid.at), desc(version.id)).limit(place('limit')).prepare(),
  fitted: db.select({ id: fitting.id, at: fitting.fromAt, serial: unit.serial }).from(fitting).innerJoin(unit, eq(unit.id, fitting.unitId))
    .where(and(eq(fitting.axisId, place('axisId')), before(fitting.fromAt, fitting.id))).orderBy(desc(fitting.fromAt), desc(fitting.id)).limit(place('limit')).prepare(),
  takenOut: db.select({ id: fitting.id, at: sql<string>`${fitting.toAt}`, serial: unit.serial }).from(fitting).innerJoin(unit, eq(unit.id, fitting.unitId))
    .where(and(eq(fitting.axisId, place('axisId')), before(fitting.toAt, fitting.id))).orderBy(desc(fitting.toAt), desc(fitting.id)).limit(place('limit')).prepare(),
  /** What a swap means for the axis: begun, running, ended; its other steps stand on its own page. */
  swaps: db.select({ id: swapStep.id, at: swapStep.at, text: swapStep.text, by: person.name }).from(swapStep).innerJoin(swap, eq(swap.id, swapStep.swapId)).innerJoin(person, eq(person.id, swapStep.byPerson))
    .where(and(eq(swap.axisId, place('axisId')), inArray(swapStep.act, ['opened', 'put-back', 'running', 'released', 'abandoned']), before(swapStep.at, swapStep.id))).orderBy(desc(swapStep.at), desc(swapStep.id)).limit(place('limit')).prepare(),
  findings: db.select({ id: finding.id, at: finding.openedAt, title: finding.title }).from(finding)
    .where(and(ofAxis, before(finding.openedAt, finding.id))).orderBy(desc(finding.openedAt), desc(finding.id)).limit(place('limit')).prepare(),
  findingsClosed: db.select({ id: findingAct.id, findingId: finding.id, at: findingAct.at, title: finding.title, by: person.name }).from(findingAct)
    .innerJoin(finding, eq(finding.id, findingAct.findingId)).innerJoin(person, eq(person.id, findingAct.byPerson))
    .where(and(ofAxis, eq(findingAct.kind, sql`'closed'`), before(findingAct.at, findingAct.id))).orderBy(desc(findingAct.at), desc(findingAct.id)).limit(place('limit')).prepare(),
}))
