import { asc, eq, sql } from 'drizzle-orm'
import { change } from '../change/table'
import { checkResult, checkSet } from '../check/table'
import { prepared, type VaultDb } from '../prepared'

const queries = prepared(db => ({
  changes: db.select().from(change).where(eq(change.versionId, sql.placeholder('versionId'))).orderBy(asc(change.seq)).prepare(),
  firstSet: db.select().from(checkSet).where(eq(checkSet.versionId, sql.placeholder('versionId'))).orderBy(asc(checkSet.id)).limit(1).prepare(),
  set: db.select().from(checkSet).where(eq(checkSet.id, sql.placeholder('id'))).prepare(),
  results: db.select().from(checkResult).where(eq(checkResult.checkSetId, sql.placeholder('setId'))).orderBy(asc(checkResult.seq)).prepare(),
}))

/** The changes that are kept of a version, in their order. */
export const keptChanges = (db: VaultDb, versionId: number) => queries(db).changes.all({ versionId })

/** The judgement that a version came with, its results included; undefined where it is gone. */
export function firstJudgement(db: VaultDb, versionId: number) {
  const set = queries(db).firstSet.get({ versionId })
  return set && { set, results: queries(db).results.all({ setId: set.id }) }
}

/** A later judgement by its id. */
export function judgementOf(db: VaultDb, id: number) {
  const set = queries(db).set.get({ id })
  return set && { set, results: queries(db).results.all({ setId: set.id }) }
}

export type KeptJudgement = NonNullable<ReturnType<typeof firstJudgement>>
