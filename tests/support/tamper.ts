import Database from 'better-sqlite3'
import { join } from 'node:path'
import { deflateSync, inflateSync } from 'node:zlib'
import { formatCheckpoint, parseCheckpoint } from '../../shared/trail/checkpoint'
import { growingTree, leafHash } from '../../shared/trail/tree'
import type { TrailKey } from '../../server/services/trail/key'
import { sha256 } from './merkle'

/*
 * What somebody could do to a stopped vault with plain SQL: triggers taken off, something changed, triggers put back, so
 * that the schema looks as it was.
 */

/** Columns whose change is no change of evidence: secrets, times of last use, caches. */
const noEvidence: Readonly<Record<string, readonly string[]>> = {
  person: ['password_hash', 'last_sign_in_at'], token: ['secret_hash', 'last_used_at'],
}
/** Tables that are no evidence: sessions, throttling, replays, the state that is derived at every act, the bookkeeping of the schema. */
const noEvidenceTables = new Set(['session', 'throttle', 'idempotency', 'axis_state', 'spare_fit', 'migration', 'letter', 'finding_state'])

export type Random = (below: number) => number
/** xorshift32: the same seed gives the same changes, so that a failure can be looked at. */
export function seededRandom(seed: number): Random {
  let state = seed
  return (below) => {
    state ^= state << 13
    state ^= state >>> 17
    state ^= state << 5
    return (state >>> 0) % below
  }
}

/** Runs `work` on the file with all triggers and checks off, and puts the triggers back. Answers what `work` says it did. */
export function tamper(folder: string, work: (sqlite: Database.Database) => string): string {
  const sqlite = new Database(join(folder, 'vault.sqlite'))
  try {
    sqlite.pragma('foreign_keys = OFF')
    sqlite.pragma('ignore_check_constraints = ON')
    const triggers = sqlite.prepare(`SELECT name, sql FROM sqlite_schema WHERE type = 'trigger'`).all() as { name: string, sql: string }[]
    for (const { name } of triggers) sqlite.exec(`DROP TRIGGER ${name}`)
    const done = work(sqlite)
    for (const { sql } of triggers) sqlite.exec(sql)
    return done
  }
  finally {
    sqlite.close()
  }
}

export function evidenceTables(sqlite: Database.Database): string[] {
  const names = sqlite.prepare(`SELECT name FROM sqlite_schema WHERE type = 'table' AND name NOT LIKE 'sqlite_%' ORDER BY name`).pluck().all() as string[]
  return names.filter(name => !noEvidenceTables.has(name) && (sqlite.prepare(`SELECT count(*) FROM "${name}"`).pluck().get() as number) > 0)
}

interface Cell { readonly table: string, readonly where: string, readonly column: string, readonly value: unknown }

const keysOf = (sqlite: Database.Database, table: string) => sqlite.prepare('SELECT name FROM pragma_table_info(?) WHERE pk > 0 ORDER BY pk').pluck().all(table) as string[]
const columnsOf = (sqlite: Database.Database, table: string) => sqlite.prepare('SELECT name FROM pragma_table_info(?)').pluck().all(table) as string[]

function pickRow(sqlite: Database.Database, random: Random, table: string): { where: string, row: Record<string, unknown> } {
  const rows = sqlite.prepare(`SELECT * FROM "${table}"`).all() as Record<string, unknown>[]
  const row = rows[random(rows.length)] ?? {}
  return { row, where: keysOf(sqlite, table).map(key => `"${key}" = ${typeof row[key] === 'number' ? row[key] : `'${String(row[key])}'`}`).join(' AND ') }
}

function pickCell(sqlite: Database.Database, random: Random): Cell {
  const tables = evidenceTables(sqlite)
  const table = tables[random(tables.length)] ?? 'log'
  const { where, row } = pickRow(sqlite, random, table)
  const columns = columnsOf(sqlite, table).filter(name => !(noEvidence[table] ?? []).includes(name))
  const column = columns[random(columns.length)] ?? 'id'
  return { table, where, column, value: row[column] }
}

/** Another value of the same kind; a compressed one is changed inside, so that it can still be unpacked. */
function otherValue(value: unknown, random: Random): unknown {
  if (typeof value === 'number') return value + 1 + random(3)
  if (value === null) return random(2) === 0 ? 'x' : 1
  if (Buffer.isBuffer(value) && value.length === 32) return Buffer.from(value.map((byte, i) => i === 0 ? byte ^ 1 : byte))
  if (Buffer.isBuffer(value)) {
    const inside = inflateSync(value)
    const at = random(inside.length)
    inside[at] = (inside[at] ?? 0) ^ 1
    return deflateSync(inside)
  }
  const text = String(value)
  if (text === '') return 'x'
  const at = random(text.length)
  return `${text.slice(0, at)}${text[at] === '7' ? '8' : '7'}${text.slice(at + 1)}`
}

export function changeValue(random: Random): (sqlite: Database.Database) => string {
  return (sqlite) => {
    for (;;) {
      const { table, where, column, value } = pickCell(sqlite, random)
      try {
        sqlite.prepare(`UPDATE "${table}" SET "${column}" = ? WHERE ${where}`).run(otherValue(value, random))
        return `${table}.${column} where ${where}`
      }
      catch (error) {
        // A key that another row has, a type that the column or an index refuses: SQLite itself says no, so something else is changed.
        if (!(error instanceof Database.SqliteError)) throw error
      }
    }
  }
}

export function removeRow(random: Random): (sqlite: Database.Database) => string {
  return (sqlite) => {
    const tables = evidenceTables(sqlite)
    const table = tables[random(tables.length)] ?? 'log'
    const { where } = pickRow(sqlite, random, table)
    sqlite.exec(`DELETE FROM "${table}" WHERE ${where}`)
    return `${table} without ${where}`
  }
}

/** Exchanges what two rows of a table say; their keys stay. */
export function swapRows(random: Random): (sqlite: Database.Database) => string {
  return (sqlite) => {
    const tables = evidenceTables(sqlite).filter(table => (sqlite.prepare(`SELECT count(*) FROM "${table}"`).pluck().get() as number) > 1)
    for (;;) {
      const table = tables[random(tables.length)] ?? 'log'
      const [one, other] = [pickRow(sqlite, random, table), pickRow(sqlite, random, table)]
      const columns = columnsOf(sqlite, table).filter(name => !keysOf(sqlite, table).includes(name) && !(noEvidence[table] ?? []).includes(name))
      if (columns.length === 0 || JSON.stringify(columns.map(name => one.row[name])) === JSON.stringify(columns.map(name => other.row[name]))) continue
      const drop = sqlite.prepare(`DELETE FROM "${table}" WHERE ${one.where} OR ${other.where}`)
      drop.run()
      const names = columnsOf(sqlite, table)
      const insert = sqlite.prepare(`INSERT INTO "${table}" (${names.map(name => `"${name}"`).join(', ')}) VALUES (${names.map(() => '?').join(', ')})`)
      const mixed = (keys: Record<string, unknown>, rest: Record<string, unknown>) => names.map(name => columns.includes(name) ? rest[name] : keys[name])
      insert.run(mixed(one.row, other.row))
      insert.run(mixed(other.row, one.row))
      return `${table}: ${one.where} and ${other.where} exchanged`
    }
  }
}

export function cutTail(random: Random): (sqlite: Database.Database) => string {
  return (sqlite) => {
    const entries = 1 + random(8)
    sqlite.exec(`DELETE FROM log WHERE seq > (SELECT max(seq) FROM log) - ${entries}`)
    return `the last ${entries} entries of the log`
  }
}

/** Rewrites a version's reason in its row and in its entry, and everything that follows from it; checkpoints are signed anew where a key is given. */
export function recomputeAll(random: Random, key: TrailKey | null): (sqlite: Database.Database) => string {
  return (sqlite) => {
    const { id } = (sqlite.prepare('SELECT id FROM version').all() as { id: number }[])[random(3)] ?? { id: 1 }
    sqlite.prepare('UPDATE version SET reason = ? WHERE id = ?').run('as ordered', id)
    rewrite(sqlite, leaf => leaf.subject.kind === 'version' && leaf.subject.id === id, state => ({ ...state, reason: 'as ordered' }))
    const kept = sqlite.prepare('SELECT id, size, note FROM checkpoint').all() as { id: number, size: number, note: string }[]
    if (key !== null) {
      for (const { id: checkpointId, size, note } of kept) {
        const signed = formatCheckpoint({ ...parseCheckpoint(note), root: rootOver(sqlite, size) }, key.verifier, key.sign)
        sqlite.prepare('UPDATE checkpoint SET note = ? WHERE id = ?').run(signed, checkpointId)
        rewrite(sqlite, leaf => leaf.subject.kind === 'checkpoint' && leaf.subject.id === checkpointId, state => ({ ...state, note: signed }))
      }
    }
    return `the reason of version ${id}, everything recomputed ${key === null ? 'without' : 'with'} the key`
  }
}

/** Takes the last acts away with their rows: what is left is a vault that ended earlier. */
export function forgetTheEnd(): (sqlite: Database.Database) => string {
  return (sqlite) => {
    const { seq } = sqlite.prepare(`SELECT seq FROM log WHERE json_extract(leaf, '$.act') = 'checkpoint-taken' ORDER BY seq LIMIT 1`).get() as { seq: number }
    sqlite.exec(`DELETE FROM log WHERE seq >= ${seq}; DELETE FROM checkpoint; DELETE FROM verification`)
    return `everything from entry ${seq} on, with its rows`
  }
}

interface Leaf { readonly subject: { readonly kind: string, readonly id: number | string }, state: Record<string, unknown> }

function rewrite(sqlite: Database.Database, wanted: (leaf: Leaf) => boolean, change: (state: Record<string, unknown>) => Record<string, unknown>): void {
  for (const { seq, leaf } of sqlite.prepare('SELECT seq, leaf FROM log').all() as { seq: number, leaf: string }[]) {
    const entry = JSON.parse(leaf) as Leaf
    if (wanted(entry)) sqlite.prepare('UPDATE log SET leaf = ? WHERE seq = ?').run(canonical({ ...entry, state: change(entry.state) }), seq)
  }
}

/** Keys in their order, as RFC 8785 has them; the states of these tests hold neither exotic numbers nor texts. */
function canonical(value: unknown): string {
  if (Array.isArray(value)) return `[${value.map(canonical).join(',')}]`
  if (typeof value !== 'object' || value === null) return JSON.stringify(value)
  return `{${Object.entries(value).sort(([a], [b]) => a < b ? -1 : 1).map(([key, each]) => `${JSON.stringify(key)}:${canonical(each)}`).join(',')}}`
}

function rootOver(sqlite: Database.Database, size: number): Uint8Array {
  const tree = growingTree(sha256)
  for (const leaf of sqlite.prepare('SELECT leaf FROM log WHERE seq < ? ORDER BY seq').pluck().all(size) as string[]) tree.append(leafHash(leaf, sha256))
  return tree.root()
}
