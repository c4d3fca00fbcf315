import { canonicalJson } from '#shared/settings/canonical'
import { parseLeaf } from '#shared/trail/entry'
import { leafAt } from '#server/database/log/queries'
import type { VaultDb } from '#server/database/prepared'
import type { Newest } from '#server/database/verify/newest'
import { pagesOf, type ReadRow } from '#server/database/verify/rows'
import { subjects, valueBefore, type Row, type SubjectKind, type SubjectTable } from '#server/database/verify/subjects'
import type { Faults } from './faults'

/**
 * Holds every row against the newest entry about it, and its bytes against their hashes; then names the entries whose rows
 * are gone. Answers how many rows were looked at.
 */
export async function foldRows(db: VaultDb, newest: Newest, faults: Faults, pause: () => Promise<void>): Promise<number> {
  let rows = 0
  const kinds = Object.entries(subjects).flatMap(([kind, table]) => table === null ? [] : [{ kind: kind as SubjectKind, table }])
  for (const { kind, table } of kinds) {
    for (const page of pagesOf(db, table)) {
      for (const stated of page) {
        const seq = newest.take(kind, stated.id)
        if (stated.row === null) faults.add(`${kind} ${stated.id}`, 'cannot be read: a column of it holds what it cannot hold')
        else lookAt(db, kind, table, stated, seq, faults)
      }
      rows += page.length
      await pause()
    }
  }
  for (const { kind, id, seq } of newest.left(kinds.map(({ kind }) => kind))) faults.add(`${kind} ${id}`, `is gone; entry ${seq} of the log speaks of it`)
  return rows
}

function lookAt(db: VaultDb, kind: SubjectKind, table: SubjectTable, { id, row, state }: ReadRow, seq: number | undefined, faults: Faults): void {
  const record = `${kind} ${id}`
  const fault = table.check?.(db, row)
  if (fault !== null && fault !== undefined) faults.add(record, fault)
  if (seq === undefined) {
    if (table.unlogged?.(db, row) !== true) faults.add(record, 'is in no entry of the log')
    return
  }
  if (table.unlogged?.(db, row) === true) faults.add(record, 'stands where a record without an entry of its own stood: that one is gone')
  const leaf = leafAt(db, seq)
  const differing = leaf === undefined ? [] : differences(table, parseLeaf(leaf).state as Row, state)
  if (differing.length > 0) faults.add(record, `is not what entry ${seq} says: ${differing.join(', ')}`)
}

/** Names of what a row and the newest entry about it say differently. */
function differences(table: SubjectTable, said: Row, stands: Row): string[] {
  const missing = Object.keys(stands).filter(name => !(name in said))
  const older = missing.filter(name => textOf(stands[name]) !== textOf(valueBefore(table, name)))
  return [...Object.keys(said).filter(name => textOf(said[name]) !== textOf(stands[name])), ...older]
}

const textOf = (value: unknown) => value === undefined ? '' : canonicalJson(value as Parameters<typeof canonicalJson>[0])
