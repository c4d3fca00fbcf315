import { and, asc, eq, getTableColumns, lt, max, or, sql } from 'drizzle-orm'
import { change } from '../change/table'
import { knownGood } from '../known-good/table'
import { person } from '../person/table'
import { prepared } from '../prepared'
import { rule, ruleEnd } from '../rule/table'
import { sighting } from '../sighting/table'
import { token } from '../token/table'
import { unit } from '../unit/table'
import { version, versionVoid } from '../version/table'

const place = sql.placeholder
const { file: _, ...columns } = getTableColumns(version)

/** What one value of an axis over time is told from. */
export const valueQueries = prepared(db => ({
  /** In order; void ones too, so that they can be counted. */
  versions: db.select({ ...columns, serial: unit.serial, storer: person.name, token: token.name, voidAt: versionVoid.at })
    .from(version).innerJoin(unit, eq(unit.id, version.unitId)).innerJoin(person, eq(person.id, version.storedBy))
    .leftJoin(token, eq(token.id, version.storedByToken)).leftJoin(versionVoid, eq(versionVoid.versionId, version.id))
    .where(eq(version.axisId, place('axisId'))).orderBy(asc(version.orderAt), asc(version.number)).prepare(),
  /** Versions that differ in this value from their base. */
  changed: db.select({ versionId: version.id }).from(version).innerJoin(change, eq(change.versionId, version.id))
    .where(and(eq(version.axisId, place('axisId')), eq(change.section, place('section')), eq(change.field, place('field')), sql`${change.row} IS ${place('row')}`)).prepare(),
  /** When a version was seen the same last, before an instant. */
  seen: db.select({ at: max(sighting.capturedAt) }).from(sighting).where(and(eq(sighting.versionId, place('versionId')), lt(sighting.capturedAt, place('before')))).prepare(),
  /** Oldest first; a mark of none ends what was known-good. */
  marks: db.select({ at: knownGood.at, versionId: knownGood.versionId, number: version.number, contentId: version.contentId }).from(knownGood)
    .leftJoin(version, eq(version.id, knownGood.versionId)).where(eq(knownGood.axisId, place('axisId'))).orderBy(asc(knownGood.id)).prepare(),
  /** Rules about a field that hold or held there. */
  rules: db.select({ ...getTableColumns(rule), endedAt: ruleEnd.at }).from(rule).leftJoin(ruleEnd, eq(ruleEnd.ruleId, rule.id)).where(and(eq(rule.field, place('field')), or(
    and(eq(rule.scope, 'axis'), eq(rule.scopeId, place('axisId'))),
    and(eq(rule.scope, 'machine'), eq(rule.scopeId, place('machineId'))),
    and(eq(rule.scope, 'site'), eq(rule.scopeId, place('siteId'))),
  ))).orderBy(asc(rule.id)).prepare(),
}))
