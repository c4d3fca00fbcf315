import Database from 'better-sqlite3'
import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { openVault, standardScryptCost } from '../../../server/database/client'
import { migrate } from '../../../server/database/migrate'
import { migrations } from '../../../server/database/migrations'
import { assertSqliteVersion, setPragmas } from '../../../server/database/pragmas'
import { listLog } from '../../../server/services/log/log'
import { codeOf } from '../../support/codes'
import { personActor, smallPlant } from '../../support/plant'

let folder: string
beforeEach(() => { folder = mkdtempSync(join(tmpdir(), 'witnessmark-')) })
afterEach(() => { rmSync(folder, { recursive: true, force: true }) })

describe('opening', () => {
  it('holds the settings that the promises rest on, on a file opened again too', () => {
    openVault(folder).close()
    const vault = openVault(folder)
    const read = (name: string) => vault.sqlite.pragma(name, { simple: true })
    expect([read('journal_mode'), read('synchronous'), read('foreign_keys'), read('recursive_triggers'), read('busy_timeout')]).toEqual(['wal', 2, 1, 1, 5000])
    vault.close()
  })

  it('throws where a setting does not hold: a database in memory has no WAL', () => {
    const memory = new Database(':memory:')
    expect(codeOf(() => setPragmas(memory))).toBe('pragma')
  })

  it('refuses a second opener while the first lives, and not after', () => {
    const first = openVault(folder)
    expect(codeOf(() => openVault(folder))).toBe('in-use')
    first.close()
    openVault(folder).close()
  })

  it.each(['3.51.2', '3.50.9', '2.99.99', '3.51'])('refuses SQLite %s', version => expect(codeOf(() => assertSqliteVersion(version))).toBe('sqlite-too-old'))
  it.each(['3.51.3', '3.51.10', '3.53.0', '4.0.0'])('takes SQLite %s', version => expect(() => assertSqliteVersion(version)).not.toThrow())

  it('makes passwords at the standard cost unless told otherwise', () => {
    const vault = openVault(folder)
    expect(vault.scryptCost).toBe(standardScryptCost)
    expect(standardScryptCost).toBe(2 ** 17)
    vault.close()
  })
})

describe('migrating', () => {
  const now = '2026-12-01T08:00:00.000Z'
  const later = [...migrations, { number: migrations.length + 1, name: 'later', sql: 'CREATE TABLE later (id INTEGER PRIMARY KEY) STRICT' }]

  it('refuses a vault that a newer version wrote', () => {
    const vault = openVault(folder)
    migrate(vault.sqlite, now, later)
    vault.close()
    expect(codeOf(() => openVault(folder))).toBe('schema-newer')
  })

  it('keeps a copy from before, which opens with the old schema', () => {
    const vault = openVault(folder)
    const { axisId } = smallPlant(vault)
    expect(migrate(vault.sqlite, now, later)).toBe(later.length)
    vault.close()
    const copy = new Database(join(folder, `vault.sqlite.schema-${migrations.length}.copy`), { readonly: true })
    expect(copy.prepare('SELECT tag FROM axis WHERE id = ?').pluck().get(axisId)).toBe('LID-02.Z')
    expect(copy.prepare(`SELECT count(*) FROM sqlite_schema WHERE name = 'later'`).pluck().get()).toBe(0)
    copy.close()
  })

  it('does all or nothing', () => {
    const vault = openVault(folder)
    const broken = [...later, { number: later.length + 1, name: 'broken', sql: 'CREATE TABLE axis (id INTEGER)' }]
    expect(() => migrate(vault.sqlite, now, broken)).toThrow(/already exists/)
    expect(vault.sqlite.prepare('SELECT count(*) FROM migration').pluck().get()).toBe(migrations.length)
    vault.close()
    openVault(folder).close()
  })

  it('refuses a migration that was edited', () => {
    const vault = openVault(folder)
    const [first, ...rest] = migrations
    if (first === undefined) throw new Error('no migrations')
    expect(codeOf(() => migrate(vault.sqlite, now, [{ ...first, sql: `${first.sql}\n` }, ...rest]))).toBe('schema-edited')
    vault.close()
  })

  it.each(['DROP TRIGGER version_no_update', 'CREATE TABLE extra (id INTEGER)', 'DROP INDEX change_field'])('refuses a file edited by hand: %s', (sql) => {
    openVault(folder).close()
    const file = new Database(join(folder, 'vault.sqlite'))
    file.exec(sql)
    file.close()
    expect(codeOf(() => openVault(folder))).toBe('schema-edited')
  })

  it('takes a file that was analysed', () => {
    const vault = openVault(folder)
    smallPlant(vault)
    vault.sqlite.exec('ANALYZE')
    vault.close()
    openVault(folder).close()
  })

  it('leaves nothing locked behind when it refuses', () => {
    openVault(folder).close()
    const file = new Database(join(folder, 'vault.sqlite'))
    file.exec('DROP INDEX change_field')
    file.close()
    expect(codeOf(() => openVault(folder))).toBe('schema-edited')
    expect(codeOf(() => openVault(folder))).toBe('schema-edited')
  })
})

describe('a write', () => {
  it('stores all of it or nothing, log included', () => {
    const vault = openVault(folder)
    const { planner } = smallPlant(vault)
    const entries = () => listLog(vault, planner, { limit: 200 }).items.length
    const before = entries()
    expect(() => vault.write(planner, (write) => {
      write.log({ act: 'setting-changed', id: 'plant', state: { value: 'x' } })
      vault.sqlite.prepare(`UPDATE axis SET role = 'lid press'`).run()
      throw new Error('midway')
    })).toThrow('midway')
    expect(entries()).toBe(before)
    expect(vault.sqlite.prepare('SELECT role FROM axis').pluck().get()).toBe('')
    vault.close()
  })

  it('joins the write that it stands in: one time, one fate', () => {
    let milliseconds = Date.parse('2026-03-03T06:10:00Z')
    const vault = openVault(folder, { clock: () => (milliseconds += 1000) })
    const actor = personActor(vault, 'Runa Haldersen', ['planner'])
    const times = vault.write(actor, outer => [outer.now, vault.write(actor, inner => inner.now), outer.now])
    expect(new Set(times).size).toBe(1)
    expect(() => vault.write(actor, () => {
      vault.write(actor, ({ log }) => log({ act: 'setting-changed', id: 'plant', state: {} }))
      throw new Error('outer')
    })).toThrow('outer')
    expect(listLog(vault, actor, {}).items).toEqual([])
    expect(vault.write(actor, ({ log }) => log({ act: 'setting-changed', id: 'plant', state: {} }))).toBe(0)
    vault.close()
  })

  it('refuses work that awaits, and stores none of it', () => {
    const vault = openVault(folder)
    const actor = personActor(vault, 'Runa Haldersen', ['planner'])
    expect(() => vault.write(actor, async ({ log }) => log({ act: 'setting-changed', id: 'plant', state: {} }))).toThrow(/synchronous/)
    expect(listLog(vault, actor, {}).items).toEqual([])
    vault.close()
  })

  it('numbers the log from 0 without gaps and keeps secrets out of it', () => {
    const vault = openVault(folder)
    const { planner } = smallPlant(vault)
    const { items } = listLog(vault, planner, {})
    expect(items.map(({ seq }) => seq)).toEqual(items.map((_, index) => index))
    expect(items.map(({ leaf }) => leaf).join('')).not.toMatch(/password_?hash|secret/i)
    vault.close()
  })
})

describe('the clock', () => {
  it('stands still when it is set back, over a restart too', () => {
    let now = '2026-03-09T14:32:00.000Z'
    const clock = () => Date.parse(now)
    const first = openVault(folder, { clock })
    expect(first.now()).toBe(now)
    smallPlant(first)
    now = '2026-03-01T00:00:00.000Z'
    expect(first.now()).toBe('2026-03-09T14:32:00.000Z')
    first.close()
    const second = openVault(folder, { clock })
    expect(second.now()).toBe('2026-03-09T14:32:00.000Z')
    now = '2026-03-10T00:00:00.000Z'
    expect(second.now()).toBe(now)
    second.close()
  })
})
