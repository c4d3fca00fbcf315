import { getTableColumns, getTableName, is } from 'drizzle-orm'
import { SQLiteTable } from 'drizzle-orm/sqlite-core'
import { afterAll, describe, expect, it } from 'vitest'
import * as schema from '../../../server/database/schema'
import { freshVault } from '../../support/vault'

const { vault, remove } = freshVault()
afterAll(remove)

const tables = Object.values(schema).filter(value => is(value, SQLiteTable)) as SQLiteTable[]

describe('the tables as the code sees them', () => {
  it.each(tables.map(table => [getTableName(table), table] as const))('%s has the columns of the file', (name, table) => {
    const inFile = vault.sqlite.prepare('SELECT name, "notnull" AS needed, pk FROM pragma_table_xinfo(?)').all(name) as { name: string, needed: number, pk: number }[]
    const inCode = Object.values(getTableColumns(table)).map(column => ({ name: column.name, needed: column.notNull }))
    expect(inCode.map(({ name }) => name)).toEqual(inFile.map(({ name }) => name))
    const different = inFile.filter(({ name, needed, pk }) => pk === 0 && Boolean(needed) !== inCode.find(column => column.name === name)?.needed)
    expect(different).toEqual([])
  })

  it('leaves no table of the file unknown', () => {
    const inFile = vault.sqlite.prepare(`SELECT name FROM sqlite_schema WHERE type = 'table' AND name <> 'migration' ORDER BY name`).pluck().all()
    expect(tables.map(getTableName).sort()).toEqual(inFile)
  })

  it('is STRICT throughout', () => {
    expect(vault.sqlite.prepare(`SELECT name FROM pragma_table_list WHERE schema = 'main' AND type = 'table' AND name NOT LIKE 'sqlite_%' AND strict = 0`).all()).toEqual([])
  })
})
