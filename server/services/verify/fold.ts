import type { Entry } from '#shared/trail/entry'
import { leafAt } from '#server/database/log/queries'
import type { VaultDb } from '#server/database/prepared'
import type { CopyHashes } from '#server/database/verify/copy-hashes'
import type { Newest } from '#server/database/verify/newest'
import { pagesOf, type ReadRow } from '#server/database/verify/rows'
import { subjects, valueBefore, type Row, type SubjectKind, type SubjectTable } from '#server/database/verify/subjects'
import { isSameJson } from '#shared/trail/same-json'
import type { Faults } from './faults'

/**
 * Holds every row against the newest entry about it, and its bytes against their hashes; then names the entries whose rows
 * are gone. Answers how many rows were looked at.
 */
export async function foldRows(db: VaultDb, newest: Newest, copies: CopyHashes, faults: Faults, pause: () => Promise<void>): Promise<number> {
  let rows = 0
  const kinds = Object.entries(subjects).flatMap(([kind, table]) => table === null ? [] : [{ kind: kind as SubjectKind, table }])
  for (const { kind, table } of kinds) {
    for (const page of pagesOf(db, table)) {
      for (const stated of page) {
        const seq = newest.take(kind, stated.id)
        if (stated.row === null) faults.add(`${kind} ${stated.id}`, 'cannot be read: a column of it holds what it cannot hold')
        else lookAt(db, kind, table, stated, seq, copies, faults)
      }
      rows += page.length
      await pause()
    }
  }
  for (const { kind, id, seq } of newest.left(kinds.map(({ kind }) => kind))) faults.add(`${kind} ${id}`, `is gone; entry ${seq} of the log speaks of it`)
  return rows
}

function lookAt(db: VaultDb, kind: SubjectKind, table: SubjectTable, { id, row, state }: ReadRow, seq: number | undefined, copies: CopyHashes, faults: Faults): void {
  const record = `${kind} ${id}`
  const fault = table.check?.(db, row, copies)
  if (fault !== null && fault !== undefined) faults.add(record, fault)
  if (seq === undefined) {
    if (table.unlogged?.(db, row) !== true) faults.add(record, 'is in no entry of the log')
    return
  }
  if (table.unlogged?.(db, row) === true) faults.add(record, 'stands where a record without an entry of its own stood: that one is gone')
  const leaf = leafAt(db, seq)
  // Only entries that the pass over the log could read are among the newest: their form was looked at there.
  const differing = leaf === undefined ? [] : differences(table, (JSON.parse(leaf) as Entry).state, state)
  if (differing.length > 0) faults.add(record, `is not what entry ${seq} says: ${differing.join(', ')}`)
}

/** Names of what a row and the newest entry about it say differently. */
function differences(table: SubjectTable, said: Row, stands: Row): string[] {
  const missing = Object.keys(stands).filter(name => !(name in said))
  const older = missing.filter(name => !isSameJson(stands[name], valueBefore(table, name)))
  return [...Object.keys(said).filter(name => !isSameJson(said[name], stands[name])), ...older]
}
