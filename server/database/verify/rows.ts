import { asc, eq, getTableColumns, gt, sql, type AnyColumn, type SQL } from 'drizzle-orm'
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

type Key = number | string
/** A row with what the log would say of it. */
export interface ReadRow { readonly id: Key, readonly row: Row, readonly state: Row }
/** A row that holds what no column of it can hold. */
export interface UnreadableRow { readonly id: Key, readonly row: null }

/** All rows of a kind in pages, by key; never more than a page in memory. */
export function* pagesOf(db: VaultDb, subject: SubjectTable): Generator<(ReadRow | UnreadableRow)[]> {
  const read = readerOf(db, subject)
  for (let after: Key | null = null; ;) {
    const page = pageAfter(read, after)
    const last: Key | undefined = page.at(-1)?.id
    if (last === undefined) return
    yield page
    after = last
  }
}

interface Reader { readonly page: (after: Key | null) => ReadRow[], readonly keys: (after: Key | null) => Key[], readonly one: (id: Key) => ReadRow[] }

function pageAfter(read: Reader, after: Key | null): (ReadRow | UnreadableRow)[] {
  const page = unlessDamaged(() => read.page(after))
  // One of them holds damaged JSON or a flag that is neither: they are read one by one, so that it alone is named.
  return page ?? read.keys(after).flatMap((id): (ReadRow | UnreadableRow)[] => unlessDamaged(() => read.one(id)) ?? [{ id, row: null }])
}

function unlessDamaged<Answer>(read: () => Answer): Answer | null {
  try {
    return read()
  }
  catch (error) {
    if (!(error instanceof SyntaxError)) throw error
    return null
  }
}

/** The statements of a kind, built once: building them for each page costs more than the page. */
function readerOf(db: VaultDb, subject: SubjectTable): Reader {
  const { table, end } = subject
  const key = columnOf(table, subject.key)
  const placed = { after: sql.placeholder('after'), id: sql.placeholder('id') }
  const rows = (where?: SQL) => db.select().from(table).where(where).orderBy(asc(key)).limit(pageLength).prepare()
  const keys = (where?: SQL) => db.select({ id: sql<Key>`${key}` }).from(table).where(where).orderBy(asc(key)).limit(pageLength).prepare()
  const [first, next, one] = [rows(), rows(gt(key, placed.after)), rows(eq(key, placed.id))]
  const [firstKeys, nextKeys] = [keys(), keys(gt(key, placed.after))]
  const ended = end && db.select().from(end.table).where(eq(columnOf(end.table, end.key), placed.id)).prepare()
  const stated = (found: readonly Row[]) => found.map((row): ReadRow => {
    const id = row[subject.key] as Key
    return { id, row, state: stateOf(subject, row, ended?.get({ id })) }
  })
  return {
    page: after => stated(after === null ? first.all() : next.all({ after })),
    keys: after => (after === null ? firstKeys.all() : nextKeys.all({ after })).map(({ id }) => id),
    one: id => stated(one.all({ id })),
  }
}
