import type Database from 'better-sqlite3'

/** Which entry is the newest about each subject. Kept in a temporary table on disk: a log has more subjects than fit into memory. */
export interface Newest {
  readonly note: (kind: string, id: number | string, seq: number) => void
  /** The newest entry about a subject, which is then taken out; undefined where the log never spoke of it. */
  readonly take: (kind: string, id: number | string) => number | undefined
  /** Subjects of these kinds that were not taken out. */
  readonly left: (kinds: readonly string[]) => Iterable<{ kind: string, id: string, seq: number }>
}

/** Works on a read-only connection too: temporary tables lie in a file of their own. */
export function newestEntries(sqlite: Database.Database): Newest {
  sqlite.pragma('temp_store = FILE')
  sqlite.exec('CREATE TEMP TABLE newest (kind TEXT NOT NULL, id TEXT NOT NULL, seq INTEGER NOT NULL, PRIMARY KEY (kind, id)) WITHOUT ROWID')
  const note = sqlite.prepare('INSERT INTO temp.newest VALUES (?, ?, ?) ON CONFLICT DO UPDATE SET seq = excluded.seq')
  const take = sqlite.prepare('DELETE FROM temp.newest WHERE kind = ? AND id = ? RETURNING seq').pluck()
  const left = sqlite.prepare('SELECT kind, id, seq FROM temp.newest WHERE kind IN (SELECT value FROM json_each(?)) ORDER BY seq')
  return {
    note: (kind, id, seq) => { note.run(kind, String(id), seq) },
    take: (kind, id) => take.get(kind, String(id)) as number | undefined,
    left: kinds => left.iterate(JSON.stringify(kinds)) as Iterable<{ kind: string, id: string, seq: number }>,
  }
}
