import type Database from 'better-sqlite3'
import { createHash } from 'node:crypto'
import { existsSync } from 'node:fs'
import { migrations as ours, type Migration } from './migrations'
import { StartError } from './start-error'

interface Applied { number: number, name: string, sha256: string, schema_sha256: string }

const sha256 = (text: string) => createHash('sha256').update(text).digest('hex')

/** What the file's tables, indexes and triggers are, as one hash: a trigger dropped by hand shows. */
function schemaHash(sqlite: Database.Database): string {
  const parts = sqlite.prepare(`SELECT type, name, sql FROM sqlite_schema WHERE name NOT LIKE 'sqlite_%' AND name <> 'migration' ORDER BY type, name`).all()
  return sha256(JSON.stringify(parts))
}

function applied(sqlite: Database.Database): Applied[] {
  const known = sqlite.prepare(`SELECT 1 FROM sqlite_schema WHERE name = 'migration'`).get()
  return known === undefined ? [] : sqlite.prepare('SELECT number, name, sha256, schema_sha256 FROM migration ORDER BY number').all() as Applied[]
}

function assertKnown(sqlite: Database.Database, done: readonly Applied[], migrations: readonly Migration[]): void {
  for (const { number, name, sha256: hash } of done) {
    const mine = migrations[number - 1]
    if (mine === undefined) throw new StartError('schema-newer', `The vault was written by a newer version (schema ${number}, ${name}). Start that version, or restore a copy from before it.`)
    if (sha256(mine.sql) !== hash) throw new StartError('schema-edited', `Migration ${number} (${name}) is not the one that made this vault. Install the version as it was published.`)
  }
  const newest = done.at(-1)
  if (newest !== undefined && newest.schema_sha256 !== schemaHash(sqlite)) {
    throw new StartError('schema-edited', 'Tables, indexes or triggers of this vault were changed by hand. Restore a copy from before that.')
  }
}

/**
 * Brings the file to the newest schema in one transaction, after a copy beside it where there is something to lose.
 * Answers the schema's number; throws StartError on a newer or an edited one.
 */
export function migrate(sqlite: Database.Database, now: string, migrations: readonly Migration[] = ours): number {
  const done = applied(sqlite)
  assertKnown(sqlite, done, migrations)
  const missing = migrations.slice(done.length)
  if (missing.length === 0) return migrations.length
  if (done.length > 0 && !sqlite.memory) copyAside(sqlite, done.length)
  sqlite.transaction(() => {
    if (done.length === 0) sqlite.exec('CREATE TABLE migration (number INTEGER PRIMARY KEY, name TEXT NOT NULL, sha256 TEXT NOT NULL, schema_sha256 TEXT NOT NULL, applied_at TEXT NOT NULL) STRICT')
    for (const { number, name, sql } of missing) {
      sqlite.exec(sql)
      sqlite.prepare('INSERT INTO migration VALUES (?, ?, ?, ?, ?)').run(number, name, sha256(sql), schemaHash(sqlite), now)
    }
  }).immediate()
  return migrations.length
}

function copyAside(sqlite: Database.Database, from: number): void {
  const path = `${sqlite.name}.schema-${from}.copy`
  if (!existsSync(path)) sqlite.prepare('VACUUM INTO ?').run(path)
}
