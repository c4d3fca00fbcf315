import Database from 'better-sqlite3'
import { drizzle } from 'drizzle-orm/better-sqlite3'
import { mkdirSync } from 'node:fs'
import { join } from 'node:path'
import { entryActor, type Actor } from './actor'
import { steadyClock } from './clock'
import type { Instant } from './columns'
import { lockFolder } from './lock'
import { catchUpNodes } from './log/nodes'
import { appendEntry, newestInstant, type NewEntry } from './log/queries'
import { migrate } from './migrate'
import { assertSqliteVersion, setPragmas } from './pragmas'
import type { VaultDb } from './prepared'
import * as schema from './schema'

export interface VaultOptions {
  /** Milliseconds since 1970; tests and the demo bring their own. */
  readonly clock?: () => number
  /** Cost N of scrypt for new passwords; the standard one takes about half a second. */
  readonly scryptCost?: number
}

/** What a write has in hand: one time for all that it stores, and the log. */
export interface Write {
  readonly now: Instant
  readonly actor: Actor
  readonly log: (entry: NewEntry) => number
}

export interface Vault {
  readonly db: VaultDb
  readonly sqlite: Database.Database
  readonly folder: string
  /** Number of the newest migration. */
  readonly schema: number
  readonly scryptCost: number
  /** RFC 3339 UTC; never before one it gave already, over restarts too. */
  readonly now: () => Instant
  /**
   * One IMMEDIATE transaction: all that `work` stores and logs, or nothing. Within another write it joins that one. `work`
   * is synchronous; hashing, parsing and awaiting come before it.
   */
  readonly write: <Answer>(actor: Actor, work: (write: Write) => Answer) => Answer
  readonly close: () => void
}

/** N = 2^17 with r = 8, p = 1: the first choice of the OWASP password storage sheet for scrypt. */
export const standardScryptCost = 131072

/** Opens the vault in `folder`, making it where there is none. Throws StartError where it must not run. */
export function openVault(folder: string, options: VaultOptions = {}): Vault {
  mkdirSync(folder, { recursive: true, mode: 0o700 })
  const lock = lockFolder(folder)
  const sqlite = new Database(join(folder, 'vault.sqlite'))
  try {
    return opened(sqlite, folder, options, lock.release)
  }
  catch (error) {
    sqlite.close()
    lock.release()
    throw error
  }
}

function opened(sqlite: Database.Database, folder: string, options: VaultOptions, release: () => void): Vault {
  assertSqliteVersion(String(sqlite.prepare('SELECT sqlite_version()').pluck().get()))
  setPragmas(sqlite)
  const clock = options.clock ?? Date.now
  const schemaNumber = migrate(sqlite, new Date(clock()).toISOString())
  const db = drizzle(sqlite, { schema })
  sqlite.transaction(() => { catchUpNodes(db) }).immediate()
  const now = steadyClock(clock, newestInstant(db))
  return {
    db, sqlite, folder, now,
    schema: schemaNumber,
    scryptCost: options.scryptCost ?? standardScryptCost,
    write: writer(sqlite, db, now),
    close: () => {
      sqlite.close()
      release()
    },
  }
}

function writer(sqlite: Database.Database, db: VaultDb, now: () => Instant): Vault['write'] {
  let open: Instant | null = null
  return (actor, work) => {
    const inner = (at: Instant) => {
      const answer = work({ now: at, actor, log: entry => appendEntry(db, entryActor(actor), at, entry) })
      if (answer instanceof Promise) throw new TypeError('A write is synchronous: await before it.')
      return answer
    }
    if (open !== null) return inner(open)
    return sqlite.transaction(() => {
      open = now()
      try {
        return inner(open)
      }
      finally {
        open = null
      }
    }).immediate()
  }
}
