import { getTableColumns, sql } from 'drizzle-orm'
import type { SQLiteTable } from 'drizzle-orm/sqlite-core'
import type { VaultDb } from './prepared'

/**
 * A prepared INSERT of every column that is not generated; what the row leaves out goes in as NULL. Answers the new id. Built
 * once a database: statements built for each call cost many times as much on the way an upload takes.
 */
export function inserter<Table extends SQLiteTable>(db: VaultDb, table: Table): (row: Table['$inferInsert']) => number {
  const names = Object.entries(getTableColumns(table)).filter(([, column]) => column.generated === undefined).map(([name]) => name)
  const values = Object.fromEntries(names.map(name => [name, sql.placeholder(name)]))
  const statement = db.insert(table).values(values as Table['$inferInsert']).prepare()
  const empty = Object.fromEntries(names.map(name => [name, null]))
  return row => Number(statement.run({ ...empty, ...row }).lastInsertRowid)
}
