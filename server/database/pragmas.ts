import type Database from 'better-sqlite3'
import { StartError } from './start-error'

/** 64 MiB of pages are kept: the walks of a large vault come back to the same inner pages of its indexes, and 2 MiB lose them. */
const pages = -65_536

/** FULL, not NORMAL: what was answered with 2xx must outlive a power cut. A re-opened WAL file falls back, hence every time. */
const wanted = [
  ['journal_mode', 'WAL', 'wal'],
  ['synchronous', 'FULL', 2],
  ['foreign_keys', 'ON', 1],
  ['recursive_triggers', 'ON', 1],
  ['busy_timeout', '5000', 5000],
  ['cache_size', String(pages), pages],
] as const

/** Sets what the promises rest on and asserts that it holds; on a read-only handle the journal is left as it is. */
export function setPragmas(sqlite: Database.Database): void {
  for (const [name, value, reads] of wanted) {
    if (name === 'journal_mode' && sqlite.readonly) continue
    sqlite.pragma(`${name} = ${value}`)
    const found: unknown = sqlite.pragma(name, { simple: true })
    if (found !== reads) throw new StartError('pragma', `SQLite holds ${name} = ${String(found)}, not ${value}. The vault does not run without it.`)
  }
}

const oldest = [3, 51, 3] as const

/** 3.51.3 is the first with the fix of the WAL reset fault; an older library could lose what was answered with 2xx. */
export function assertSqliteVersion(version: string): void {
  const parts = version.split('.').map(Number)
  const at = oldest.findIndex((part, index) => part !== parts[index])
  if (at >= 0 && !((parts[at] ?? 0) > (oldest[at] ?? 0))) {
    throw new StartError('sqlite-too-old', `SQLite ${version} is older than ${oldest.join('.')}. Install the packages that package-lock.json names.`)
  }
}
