import Database from 'better-sqlite3'
import { join } from 'node:path'
import { StartError } from './start-error'

/** How long to wait for the one before to let go, ms: a service that is restarted overlaps with itself. */
const patience = 2000

/**
 * Holds the folder for this process until `release` or the end of the process, however it ends: the lock is the operating
 * system's own on a file beside the vault, so that kill -9 leaves nothing behind to clear away.
 */
export function lockFolder(folder: string): { release: () => void } {
  const path = join(folder, 'vault.lock')
  const lock = new Database(path, { timeout: patience })
  try {
    lock.pragma('locking_mode = EXCLUSIVE')
    lock.exec('BEGIN EXCLUSIVE')
  }
  catch (error) {
    lock.close()
    if (error instanceof Database.SqliteError && error.code.startsWith('SQLITE_BUSY')) {
      throw new StartError('in-use', `Another process has this vault open (${path} is locked). Stop it first: two at once would number the log twice.`)
    }
    throw error
  }
  return { release: () => { lock.close() } }
}
