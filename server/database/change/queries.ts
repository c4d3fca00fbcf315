import type { FieldChange } from '#shared/diff/types'
import { inserter } from '../inserter'
import { prepared, type VaultDb } from '../prepared'
import { change } from './table'

const changeQueries = prepared(db => ({ insert: inserter(db, change) }))

/** Stores what a version differs in from its base. */
export function insertChanges(db: VaultDb, versionId: number, changes: readonly FieldChange[]): void {
  const { insert } = changeQueries(db)
  for (const [seq, { affects, ...fields }] of changes.entries()) insert({ versionId, seq, ...fields, affects: affects ? [...affects] : null })
}
