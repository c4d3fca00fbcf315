import { eq, isNull, max, sql } from 'drizzle-orm'
import { nameplateRevision } from '../nameplate/table'
import { prepared, type VaultDb } from '../prepared'
import { rule, ruleEnd } from '../rule/table'
import { waiver, waiverEnd } from '../waiver/table'

const queries = prepared(db => ({
  plates: db.select({ model: nameplateRevision.model, id: max(nameplateRevision.id) }).from(nameplateRevision).groupBy(nameplateRevision.model).prepare(),
  rules: db.select({ place: sql<string>`${rule.scope} || ' ' || ${rule.scopeId}`, ids: sql<string>`group_concat(${rule.id}, ' ')` }).from(rule)
    .leftJoin(ruleEnd, eq(ruleEnd.ruleId, rule.id)).where(isNull(ruleEnd.ruleId)).groupBy(rule.scope, rule.scopeId).prepare(),
  waivers: db.select({ axisId: waiver.axisId, id: waiver.id, untilAt: waiver.untilAt }).from(waiver)
    .leftJoin(waiverEnd, eq(waiverEnd.waiverId, waiver.id)).where(isNull(waiverEnd.waiverId)).prepare(),
}))

/** What an axis is judged by beside its values and its unit, each as a text that is another as soon as it is another. */
export interface JudgingTerms {
  readonly plateOf: (model: string) => string
  readonly rulesOf: (axisId: number, machineId: number, siteId: number) => string
  readonly waiversOf: (axisId: number) => string
  /** When the first of the waivers that hold ends; null where none does. */
  readonly until: string | null
}

/** The terms of every axis at an instant, in three questions. */
export function readTerms(db: VaultDb, now: string): JudgingTerms {
  const { plates, rules, waivers } = queries(db)
  const plate = new Map(plates.all().map(({ model, id }) => [model, String(id)]))
  const ofPlace = new Map(rules.all().map(({ place, ids }) => [place, ids]))
  const holding = waivers.all().filter(({ untilAt }) => untilAt > now)
  const ofAxis = new Map<number, string>()
  for (const { axisId, id } of holding) ofAxis.set(axisId, `${ofAxis.get(axisId) ?? ''} ${id}`)
  return {
    plateOf: model => plate.get(model) ?? '',
    rulesOf: (axisId, machineId, siteId) => [`axis ${axisId}`, `machine ${machineId}`, `site ${siteId}`].map(place => ofPlace.get(place) ?? '').join('/'),
    waiversOf: axisId => ofAxis.get(axisId) ?? '',
    until: holding.map(({ untilAt }) => untilAt).sort()[0] ?? null,
  }
}
