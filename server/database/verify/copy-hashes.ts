import type Database from 'better-sqlite3'

/** Copy hashes of the contents that were looked at, for their versions. In a temporary table on disk: there may be a million. */
export interface CopyHashes {
  readonly note: (contentId: number, copyHash: string) => void
  /** undefined where the content is gone, or has no copy hash. */
  readonly of: (contentId: number) => string | undefined
}

/** Works on a read-only connection too: temporary tables lie in a file of their own. */
export function copyHashes(sqlite: Database.Database): CopyHashes {
  sqlite.pragma('temp_store = FILE')
  sqlite.exec('CREATE TEMP TABLE copy_hash (content_id INTEGER PRIMARY KEY, hash TEXT NOT NULL)')
  const note = sqlite.prepare('INSERT INTO temp.copy_hash VALUES (?, ?)')
  const of = sqlite.prepare('SELECT hash FROM temp.copy_hash WHERE content_id = ?').pluck()
  return { note: (contentId, hash) => { note.run(contentId, hash) }, of: contentId => of.get(contentId) as string | undefined }
}
