import { afterAll, describe, expect, it } from 'vitest'
import { oneOfEach } from '../../support/evidence'
import { freshVault } from '../../support/vault'

const { vault, remove } = freshVault()
afterAll(remove)
const rows = oneOfEach(vault)
const tables = Object.entries(rows).map(([table, { where, column }]) => ({ table, where, column }))
const run = (sql: string) => () => vault.sqlite.prepare(sql).run()
const columnsOf = (table: string) => vault.sqlite.prepare('SELECT name FROM pragma_table_info(?)').pluck().all(table).map(name => `"${String(name)}"`).join(', ')
const rowOf = (table: string, where: string) => vault.sqlite.prepare(`SELECT * FROM ${table} WHERE ${where}`).get()

describe('tables that never change', () => {
  it('are all those that have a trigger for it', () => {
    const guarded = vault.sqlite.prepare(`SELECT tbl_name FROM sqlite_schema WHERE type = 'trigger' AND name LIKE '%\\_no\\_update' ESCAPE '\\' ORDER BY 1`).pluck().all()
    expect(guarded).toEqual(Object.keys(rows).sort())
  })

  it.each(tables)('$table refuses an update', ({ table, where, column }) => {
    const before = rowOf(table, where)
    expect(before).toBeDefined()
    expect(run(`UPDATE ${table} SET ${column} = 7 WHERE ${where}`)).toThrow(/immutable: rows of/)
    expect(rowOf(table, where)).toEqual(before)
  })

  it.each(tables)('$table refuses a delete', ({ table, where }) => {
    expect(run(`DELETE FROM ${table} WHERE ${where}`)).toThrow(/never deleted/)
    expect(rowOf(table, where)).toBeDefined()
  })

  it.each(tables)('$table refuses an insert over a row', ({ table, where }) => {
    for (const verb of ['INSERT', 'INSERT OR REPLACE', 'INSERT OR IGNORE', 'REPLACE']) {
      expect(run(`${verb} INTO ${table} (${columnsOf(table)}) SELECT ${columnsOf(table)} FROM ${table} WHERE ${where}`), verb).toThrow(/immutable: (this row|rows)/)
    }
  })

  it.each([
    ['version', `(id, axis_id, number, unit_id, upload_id, content_id, occasion, captured_at, received_at, stored_by, engine, copy_hash, scribe_code, model, harm, motion, text, file)
      SELECT 99, axis_id, number, unit_id, upload_id, content_id, occasion, captured_at, received_at, stored_by, engine, copy_hash, scribe_code, model, harm, motion, text, file FROM version`],
    ['attachment', 'SELECT 99, version_id, kind, name, media_type, note, size, sha256, received_at, person_id, token_id, peer FROM attachment'],
    ['attachment_chunk', 'SELECT 99, attachment_id, seq, bytes FROM attachment_chunk'],
    ['content', 'SELECT 99, hash, size, text FROM content'],
    ['nameplate_revision', 'SELECT 99, model, revision, nameplate, made_at, made_by FROM nameplate_revision'],
  ])('%s refuses an insert under a new id over its other key', (table, rest) => {
    expect(run(`INSERT OR REPLACE INTO ${table} ${rest}`)).toThrow(/already there/)
    expect(vault.sqlite.prepare(`SELECT count(*) FROM ${table}`).pluck().get()).toBe(1)
  })

  it('and a log entry takes no number but the next', () => {
    const next = Number(vault.sqlite.prepare('SELECT max(seq) + 1 FROM log').pluck().get())
    expect(run(`INSERT INTO log VALUES (${next + 1}, '{}')`)).toThrow(/gap/)
    expect(run(`INSERT INTO log VALUES (-1, '{}')`)).toThrow(/gap/)
  })
})

describe('what is edited and never goes', () => {
  it.each(['person', 'site', 'line', 'machine', 'axis', 'unit', 'swap'])('%s refuses a delete and a replacement', (table) => {
    expect(run(`DELETE FROM ${table}`)).toThrow(/never deleted/)
    expect(run(`INSERT OR REPLACE INTO ${table} SELECT * FROM ${table} LIMIT 1`)).toThrow(/never deleted/)
  })

  it('are replaced after all where recursive triggers are off: hence the setting is asserted on every open', () => {
    vault.sqlite.pragma('recursive_triggers = OFF')
    try {
      expect(() => vault.sqlite.transaction(() => {
        vault.sqlite.exec('PRAGMA defer_foreign_keys = ON; INSERT OR REPLACE INTO person SELECT * FROM person LIMIT 1')
        throw new Error('walked through')
      })()).toThrow('walked through')
    }
    finally {
      vault.sqlite.pragma('recursive_triggers = ON')
    }
  })
})
