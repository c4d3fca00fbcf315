import { asc, eq, sql } from 'drizzle-orm'
import type { FieldChange } from '#shared/diff/types'
import { inserter } from '../inserter'
import { prepared, type VaultDb } from '../prepared'
import { change } from './table'

const changeQueries = prepared(db => ({
  ofVersion: db.select().from(change).where(eq(change.versionId, sql.placeholder('versionId'))).orderBy(asc(change.seq)).prepare(),
  insert: inserter(db, change),
}))

/** Stores what a version differs in from its base. */
export function insertChanges(db: VaultDb, versionId: number, changes: readonly FieldChange[]): void {
  const { insert } = changeQueries(db)
  for (const [seq, { affects, ...fields }] of changes.entries()) insert({ versionId, seq, ...fields, affects: affects ? [...affects] : null })
}

/** What a version differs in from its base, in the order it was stored: by weight, section, row, field. */
export function readChanges(db: VaultDb, versionId: number): FieldChange[] {
  return changeQueries(db).ofVersion.all({ versionId }).map(({ at, section, field, weight, watched, ...rest }) => {
    const { row, before, after, unit, delta, percent, points, affects } = rest
    const given = Object.fromEntries(Object.entries({ row, before, after, unit, delta, percent, points, affects }).filter(([, value]) => value !== null))
    return { at, section, field, weight, watched, ...given }
  })
}
