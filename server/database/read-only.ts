import Database from 'better-sqlite3'
import { drizzle } from 'drizzle-orm/better-sqlite3'
import { existsSync } from 'node:fs'
import { join } from 'node:path'
import { CodedError } from '#shared/errors/coded'
import { migrations } from './migrations'
import type { VaultDb } from './prepared'
import * as schema from './schema'

export class OpenError extends CodedError<'no-vault' | 'locked'> {}

/** A second look at a vault, beside the process that serves it; nothing can be written through it. */
export function openReadOnly(folder: string): { sqlite: Database.Database, db: VaultDb } {
  const path = join(folder, 'vault.sqlite')
  if (!existsSync(path)) throw new OpenError('no-vault', `There is no vault in ${folder}.`)
  const sqlite = new Database(path, { readonly: true, fileMustExist: true, timeout: 5000 })
  try {
    const number = sqlite.prepare('SELECT max(number) FROM migration').pluck().get()
    if (number !== migrations.length) throw new OpenError('no-vault', `The vault in ${folder} has schema ${String(number)}; this version reads schema ${migrations.length}. Start this version on it once, or use the version that wrote it.`)
    return { sqlite, db: drizzle(sqlite, { schema }) }
  }
  catch (error) {
    sqlite.close()
    throw openFault(error, folder)
  }
}

function openFault(error: unknown, folder: string): unknown {
  if (!(error instanceof Database.SqliteError)) return error
  if (error.code.startsWith('SQLITE_BUSY') || error.code.startsWith('SQLITE_LOCKED')) return new OpenError('locked', `The vault in ${folder} is locked by another process. Try again when that has ended.`)
  return error.code === 'SQLITE_ERROR' || error.code === 'SQLITE_NOTADB' ? new OpenError('no-vault', `The file in ${folder} is no vault: ${error.message}.`) : error
}
