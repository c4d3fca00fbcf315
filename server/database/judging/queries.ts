import { and, asc, desc, eq, isNull, or, sql } from 'drizzle-orm'
import type { AxisKind } from '#shared/settings/types'
import { axis } from '../axis/table'
import { axisState } from '../axis-state/table'
import { fitting } from '../fitting/table'
import { line } from '../line/table'
import { machine } from '../machine/table'
import { nameplateRevision } from '../nameplate/table'
import { prepared, type VaultDb } from '../prepared'
import { rule, ruleEnd } from '../rule/table'
import { site } from '../site/table'
import { unit } from '../unit/table'
import { version } from '../version/table'

const place = sql.placeholder

/** What a file is placed and read against. */
export const judgingQueries = prepared((db) => {
  const axisPlace = () => db.select({ axis, machine, line, site }).from(axis)
    .innerJoin(machine, eq(machine.id, axis.machineId)).innerJoin(line, eq(line.id, machine.lineId)).innerJoin(site, eq(site.id, line.siteId))
  return {
    channels: db.select({ channel: unit.channel }).from(unit).where(eq(unit.serial, place('serial'))).orderBy(asc(unit.channel)).prepare(),
    fittings: db.select().from(fitting).where(eq(fitting.unitId, place('unitId'))).orderBy(asc(fitting.fromAt), asc(fitting.id)).prepare(),
    openAtAxis: db.select({ fitting, unit }).from(fitting).innerJoin(unit, eq(unit.id, fitting.unitId))
      .where(and(eq(fitting.axisId, place('axisId')), isNull(fitting.toAt))).prepare(),
    axis: axisPlace().where(eq(axis.id, place('id'))).prepare(),
    axisByTag: axisPlace().where(eq(axis.tag, place('tag'))).prepare(),
    nameplate: db.select().from(nameplateRevision).where(eq(nameplateRevision.model, place('model'))).orderBy(desc(nameplateRevision.revision)).limit(1).prepare(),
    rules: db.select().from(rule).leftJoin(ruleEnd, eq(ruleEnd.ruleId, rule.id)).where(and(isNull(ruleEnd.ruleId), or(
      and(eq(rule.scope, 'axis'), eq(rule.scopeId, place('axisId'))),
      and(eq(rule.scope, 'machine'), eq(rule.scopeId, place('machineId'))),
      and(eq(rule.scope, 'site'), eq(rule.scopeId, place('siteId'))),
    ))).orderBy(asc(rule.id)).prepare(),
  }
})

export type AxisPlace = NonNullable<ReturnType<ReturnType<typeof judgingQueries>['axis']['get']>>

export interface GuessCandidate { readonly axisId: number, readonly tag: string, readonly siteId: number, readonly contentId: number }

/** At how many axes a guess looks, those read last first: enough for a plant's axes of one model, and soon done. */
const mostCandidates = 400

const guessQueries = prepared(db => ({
  ofModel: db.select({ axisId: axis.id, tag: axis.tag, siteId: line.siteId, contentId: version.contentId }).from(axisState)
    .innerJoin(version, eq(version.id, axisState.currentVersionId)).innerJoin(axis, eq(axis.id, axisState.axisId))
    .innerJoin(machine, eq(machine.id, axis.machineId)).innerJoin(line, eq(line.id, machine.lineId))
    .where(and(eq(version.model, place('model')), eq(axis.axisKind, place('axisKind')))).orderBy(desc(version.id)).limit(mostCandidates).prepare(),
}))

/** Axes whose current version was read from a unit of this model. */
export const axesOfModel = (db: VaultDb, model: string, axisKind: AxisKind): GuessCandidate[] => guessQueries(db).ofModel.all({ model, axisKind })
