import { asc, desc, eq, sql } from 'drizzle-orm'
import type { CheckResult, Judgement, Level } from '#shared/checks/types'
import { inserter } from '../inserter'
import { nameplateRevision } from '../nameplate/table'
import { prepared, type VaultDb } from '../prepared'
import { checkResult, checkSet } from './table'

const checkQueries = prepared(db => ({
  newestSet: db.select({ set: checkSet, revision: nameplateRevision.revision }).from(checkSet)
    .leftJoin(nameplateRevision, eq(nameplateRevision.id, checkSet.nameplateRevisionId))
    .where(eq(checkSet.versionId, sql.placeholder('versionId'))).orderBy(desc(checkSet.id)).limit(1).prepare(),
  counts: db.select({ stop: checkSet.stop, warn: checkSet.warn, note: checkSet.note, unknown: checkSet.unknown }).from(checkSet)
    .where(eq(checkSet.versionId, sql.placeholder('versionId'))).orderBy(desc(checkSet.id)).limit(1).prepare(),
  results: db.select().from(checkResult).where(eq(checkResult.checkSetId, sql.placeholder('setId'))).orderBy(asc(checkResult.seq)).prepare(),
  insertSet: inserter(db, checkSet),
  insertResult: inserter(db, checkResult),
}))

/** How many results of each level the newest judgement of a version has; undefined where it has none. */
export const readLevelCounts = (db: VaultDb, versionId: number): Record<Level, number> | undefined => checkQueries(db).counts.get({ versionId })

export interface StoredJudgement {
  readonly ruleSet: string
  readonly nameplateRevision: number | null
  readonly judgedAt: string
  readonly judged: string[]
  readonly notApplicable: string[]
  readonly counts: Record<Level, number>
  readonly results: CheckResult[]
}

export function countByLevel(results: readonly Pick<CheckResult, 'level'>[]): Record<Level, number> {
  const counts: Record<Level, number> = { stop: 0, warn: 0, note: 0, unknown: 0 }
  for (const { level } of results) counts[level] += 1
  return counts
}

/** Keeps a judgement of a version beside those it has already; the newest is shown. */
export function insertJudgement(db: VaultDb, versionId: number, judgement: Judgement, nameplateRevisionId: number | null, judgedAt: string): number {
  const { insertSet, insertResult } = checkQueries(db)
  const setId = insertSet({
    versionId, nameplateRevisionId, judgedAt, ruleSet: judgement.ruleSet, judged: [...judgement.judged],
    notApplicable: [...judgement.notApplicable], ...countByLevel(judgement.results),
  })
  for (const [seq, result] of judgement.results.entries()) {
    insertResult({
      checkSetId: setId, seq, rule: result.rule, level: result.level, at: [...result.at], message: result.message,
      values: result.values, missing: result.missing ? [...result.missing] : null,
    })
  }
  return setId
}

/** The newest judgement of a version; every version has one from the moment it is stored. */
export function readJudgement(db: VaultDb, versionId: number): StoredJudgement {
  const newest = checkQueries(db).newestSet.get({ versionId })
  if (!newest) throw new RangeError(`Version ${versionId} has no judgement.`)
  const { id, ruleSet, judgedAt, judged, notApplicable, stop, warn, note, unknown } = newest.set
  const results = checkQueries(db).results.all({ setId: id }).map(({ rule, level, at, message, values, missing }): CheckResult =>
    ({ rule, level, at, message, values, ...(missing ? { missing } : {}) }))
  return { ruleSet, nameplateRevision: newest.revision, judgedAt, judged, notApplicable, counts: { stop, warn, note, unknown }, results }
}
