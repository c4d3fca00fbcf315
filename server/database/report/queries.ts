import { and, asc, count, desc, eq, getTableColumns, gt, gte, isNull, lt, lte, max, notInArray, or, sql } from 'drizzle-orm'
import { alias } from 'drizzle-orm/sqlite-core'
import { axis } from '../axis/table'
import { ifGiven, inBounds } from '../bounds'
import { change } from '../change/table'
import { finding, findingAct, findingState, findingVersion } from '../finding/table'
import { fitting } from '../fitting/table'
import { isTerm } from '../history/terms'
import { inserter } from '../inserter'
import { knownGood } from '../known-good/table'
import { line } from '../line/table'
import { log } from '../log/table'
import { machine } from '../machine/table'
import { person } from '../person/table'
import { plannedChange } from '../planned-change/table'
import { prepared } from '../prepared'
import { sighting } from '../sighting/table'
import { site } from '../site/table'
import { swap, swapStep } from '../swap/table'
import { token } from '../token/table'
import { unit } from '../unit/table'
import { version, versionVoid } from '../version/table'
import { waiver } from '../waiver/table'
import { report } from './table'

const place = sql.placeholder
const base = alias(version, 'base')
const voider = alias(person, 'voider')
const { file: _, ...columns } = getTableColumns(version)
/** Within the period: from including, until not including. */
const within = (column: Parameters<typeof gte>[0]) => and(gte(column, place('from')), lt(column, place('until')))
const named = (column: unknown) => sql`${column} IN (SELECT value FROM json_each(${place('axes')}))`
const kindOf = sql.raw(`json_extract(leaf, '$.subject.kind')`)
const idOf = sql.raw(`json_extract(leaf, '$.subject.id')`)
/** Word for word the condition of the index. */
const isTold = sql.raw(`json_extract(leaf, '$.subject.kind') IN ('version', 'version-void', 'finding-act', 'waiver', 'swap-step', 'planned-change')`)
export const reportQueries = prepared(db => ({
  insert: inserter(db, report),
  one: db.select({ report, asker: person.name }).from(report).innerJoin(person, eq(person.id, report.askedBy)).where(eq(report.id, place('id'))).prepare(),
  /** Newest first, from below an id. */
  page: db.select({ report, asker: person.name }).from(report).innerJoin(person, eq(person.id, report.askedBy))
    .where(and(lt(report.id, place('below')), ifGiven(report.scope, 'scope'), ifGiven(report.scopeId, 'scopeId'))).orderBy(desc(report.id)).limit(place('limit')).prepare(),
}))

/** What a report tells of: everything within a period, and what stood in it. */
export const toldQueries = prepared(db => ({
  axes: db.select({ id: axis.id, tag: axis.tag, axisKind: axis.axisKind, role: axis.role, flags: axis.flags, machine: machine.name, line: line.name, site: site.name, timeZone: site.timeZone }).from(axis)
    .innerJoin(machine, eq(machine.id, axis.machineId)).innerJoin(line, eq(line.id, machine.lineId)).innerJoin(site, eq(site.id, line.siteId))
    .where(and(inBounds(site.id), ifGiven(axis.id, 'axis'), ifGiven(machine.id, 'machine'), ifGiven(line.id, 'line'), ifGiven(site.id, 'site')))
    .orderBy(asc(site.name), asc(line.name), asc(machine.name), asc(axis.tag)).prepare(),
  /** Versions of a place within a stretch of the vault's own order. */
  countVersions: db.select({ count: count() }).from(axis).innerJoin(machine, eq(machine.id, axis.machineId)).innerJoin(line, eq(line.id, machine.lineId)).innerJoin(site, eq(site.id, line.siteId))
    .innerJoin(version, and(eq(version.axisId, axis.id), gte(version.id, place('first')), lte(version.id, place('last'))))
    .where(and(inBounds(site.id), ifGiven(axis.id, 'axis'), ifGiven(machine.id, 'machine'), ifGiven(line.id, 'line'), ifGiven(site.id, 'site'))).prepare(),
  /** By the vault's own order, a page at a time. */
  versions: db.select({
    version: columns, serial: unit.serial, storer: person.name, token: token.name, base: { number: base.number, model: base.model, orderAt: base.orderAt },
    void: { at: versionVoid.at, by: voider.name, reason: versionVoid.reason },
  }).from(version).innerJoin(unit, eq(unit.id, version.unitId)).innerJoin(person, eq(person.id, version.storedBy)).leftJoin(token, eq(token.id, version.storedByToken))
    .leftJoin(base, eq(base.id, version.baseId)).leftJoin(versionVoid, and(eq(versionVoid.versionId, version.id), lt(versionVoid.at, place('told')))).leftJoin(voider, eq(voider.id, versionVoid.byPerson))
    .where(and(eq(version.axisId, place('axisId')), gt(version.id, place('after')), lte(version.id, place('last')))).orderBy(asc(version.id)).limit(place('limit')).prepare(),
  changes: db.select().from(change).where(eq(change.versionId, place('versionId'))).orderBy(asc(change.seq)).prepare(),
  findingOf: db.select({ id: findingVersion.findingId }).from(findingVersion).innerJoin(finding, eq(finding.id, findingVersion.findingId))
    .where(and(eq(findingVersion.versionId, place('versionId')), eq(finding.cause, sql`'watched-change'`))).limit(1).prepare(),
  seen: db.select({ count: count(), lastAt: max(sighting.receivedAt) }).from(sighting).where(and(eq(sighting.axisId, place('axisId')), within(sighting.receivedAt))).prepare(),
  marks: db.select({ mark: knownGood, by: person.name, number: version.number }).from(knownGood).innerJoin(person, eq(person.id, knownGood.byPerson)).leftJoin(version, eq(version.id, knownGood.versionId))
    .where(and(eq(knownGood.axisId, place('axisId')), within(knownGood.at))).orderBy(asc(knownGood.id)).prepare(),
  markBefore: db.select({ mark: knownGood, by: person.name, number: version.number }).from(knownGood).innerJoin(person, eq(person.id, knownGood.byPerson)).leftJoin(version, eq(version.id, knownGood.versionId))
    .where(and(eq(knownGood.axisId, place('axisId')), lt(knownGood.at, place('at')))).orderBy(desc(knownGood.id)).limit(1).prepare(),
  /** Units that sat there at some time of the period. */
  fittings: db.select({ fitting, serial: unit.serial, model: unit.model }).from(fitting).innerJoin(unit, eq(unit.id, fitting.unitId))
    .where(and(eq(fitting.axisId, place('axisId')), lt(fitting.fromAt, place('until')), or(isNull(fitting.toAt), gt(fitting.toAt, place('from'))))).orderBy(asc(fitting.fromAt)).prepare(),
  /** Wrong uploads that were set aside in the period, and those of the period that were set aside until the report was asked for. */
  voids: db.select({ versionId: version.id, axisId: version.axisId, number: version.number, at: versionVoid.at, by: person.name, reason: versionVoid.reason }).from(versionVoid)
    .innerJoin(version, eq(version.id, versionVoid.versionId)).innerJoin(person, eq(person.id, versionVoid.byPerson)).where(and(lt(versionVoid.at, place('told')), or(within(versionVoid.at), within(version.receivedAt)), named(version.axisId))).orderBy(asc(versionVoid.at)).prepare(),
  /** Those that were opened before the end, and were open or acted on at some time since the beginning; the vault's own too. */
  findings: db.select({ finding, state: findingState.state }).from(finding).innerJoin(findingState, eq(findingState.findingId, finding.id)).where(and(
    gt(finding.id, place('after')), lt(finding.openedAt, place('until')),
    or(
      and(isNull(finding.siteId), sql`${place('vault')} = 1`),
      sql`EXISTS (SELECT 1 FROM ${findingVersion} WHERE ${findingVersion.findingId} = ${finding.id} AND ${named(findingVersion.axisId)})`,
    ),
    or(gte(finding.openedAt, place('from')), sql`${findingState.state} <> 'closed'`, sql`EXISTS (SELECT 1 FROM ${findingAct} WHERE ${findingAct.findingId} = ${finding.id} AND ${findingAct.at} >= ${place('from')})`),
  )).orderBy(asc(finding.id)).limit(place('limit')).prepare(),
  plans: db.select({ id: plannedChange.id }).from(plannedChange).where(and(
    gt(plannedChange.id, place('after')), lt(plannedChange.madeAt, place('until')), gt(plannedChange.untilAt, place('from')),
    sql`EXISTS (SELECT 1 FROM json_each(${plannedChange.axisIds}) WHERE ${named(sql.raw('json_each.value'))})`,
  )).orderBy(asc(plannedChange.id)).limit(place('limit')).prepare(),
  waivers: db.select({ id: waiver.id }).from(waiver).where(and(gt(waiver.id, place('after')), lt(waiver.givenAt, place('until')), gt(waiver.untilAt, place('from')), named(waiver.axisId)))
    .orderBy(asc(waiver.id)).limit(place('limit')).prepare(),
  swaps: db.select({ swap, tag: axis.tag, serial: unit.serial, by: person.name }).from(swap).innerJoin(axis, eq(axis.id, swap.axisId)).innerJoin(person, eq(person.id, swap.openedBy)).leftJoin(unit, eq(unit.id, swap.unitOutId))
    .where(and(gt(swap.id, place('after')), lt(swap.openedAt, place('until')), or(gte(swap.changedAt, place('from')), notInArray(swap.step, ['released', 'abandoned'])), named(swap.axisId))).orderBy(asc(swap.id)).limit(place('limit')).prepare(),
  steps: db.select({ step: swapStep, by: person.name }).from(swapStep).innerJoin(person, eq(person.id, swapStep.byPerson))
    .where(and(eq(swapStep.swapId, place('swapId')), lt(swapStep.at, place('told')))).orderBy(asc(swapStep.rev)).prepare(),
  /** The entries of the log about a subject, oldest first: one each, but for waivers and plans that were ended. */
  entriesOf: db.select({ seq: log.seq }).from(log).where(and(isTold, sql`${kindOf} = ${place('kind')}`, sql`${idOf} = ${place('id')}`)).orderBy(asc(log.seq)).prepare(),
  entriesOfMark: db.select({ seq: log.seq }).from(log).where(and(isTerm, sql`${kindOf} = 'known-good'`, sql`${idOf} = ${place('id')}`)).orderBy(asc(log.seq)).prepare(),
}))
