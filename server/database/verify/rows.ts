import { asc, getTableColumns, gt, inArray, sql, type AnyColumn } from 'drizzle-orm'
import type { SQLiteTable } from 'drizzle-orm/sqlite-core'
import type { VaultDb } from '../prepared'
import { stateOf, type Row, type SubjectTable } from './subjects'

/** Rows a page: few, for some carry a whole file of up to 2 MiB. */
const pageLength = 64

const columnOf = (table: SQLiteTable, name: string): AnyColumn => {
  const column = getTableColumns(table)[name]
  if (column === undefined) throw new RangeError(`There is no column ${name}.`)
  return column
}

/** A row with what the log would say of it. */
export interface ReadRow { readonly id: number | string, readonly row: Row, readonly state: Row }
/** A row that holds what no column of it can hold. */
export interface UnreadableRow { readonly id: number | string, readonly row: null }

/** All rows of a kind in pages, by key; never more than a page in memory. */
export function* pagesOf(db: VaultDb, subject: SubjectTable): Generator<(ReadRow | UnreadableRow)[]> {
  const key = columnOf(subject.table, subject.key)
  let after: number | string | null = null
  for (;;) {
    const keys = db.select({ id: sql<number | string>`${key}` }).from(subject.table)
    const ids: (number | string)[] = (after === null ? keys : keys.where(gt(key, after))).orderBy(asc(key)).limit(pageLength).all().map(({ id }) => id)
    const last: number | string | undefined = ids.at(-1)
    if (last === undefined) return
    yield readOf(db, subject, ids)
    after = last
  }
}

function readOf(db: VaultDb, subject: SubjectTable, ids: readonly (number | string)[]): (ReadRow | UnreadableRow)[] {
  const key = columnOf(subject.table, subject.key)
  try {
    const rows: Row[] = db.select().from(subject.table).where(inArray(key, [...ids])).orderBy(asc(key)).all()
    const ends = endsOf(db, subject, rows)
    return rows.map((row) => {
      const id = row[subject.key] as number | string
      return { id, row, state: stateOf(subject, row, ends.get(id)) }
    })
  }
  catch (error) {
    if (!(error instanceof SyntaxError)) throw error
    // One of them holds damaged JSON or a flag that is neither: they are read one by one, so that it alone is named.
    return ids.length === 1 ? ids.map(id => ({ id, row: null })) : ids.flatMap(id => readOf(db, subject, [id]))
  }
}

function endsOf(db: VaultDb, { end, key }: SubjectTable, rows: readonly Row[]): Map<number | string, Row> {
  if (end === undefined) return new Map()
  const found: Row[] = db.select().from(end.table).where(inArray(columnOf(end.table, end.key), rows.map(row => row[key]))).all()
  return new Map(found.map(row => [row[end.key] as number | string, row]))
}
