import type { BetterSQLite3Database } from 'drizzle-orm/better-sqlite3'
import type * as schema from './schema'

export type VaultDb = BetterSQLite3Database<typeof schema>

/**
 * Statements prepared once a database: built for each call they cost two to nine times as much. `make` gets the database
 * and answers an object of prepared statements; the function that comes back answers that object.
 */
export function prepared<Queries extends object>(make: (db: VaultDb) => Queries): (db: VaultDb) => Queries {
  const made = new WeakMap<VaultDb, Queries>()
  return (db) => {
    const known = made.get(db)
    if (known !== undefined) return known
    const queries = make(db)
    made.set(db, queries)
    return queries
  }
}
