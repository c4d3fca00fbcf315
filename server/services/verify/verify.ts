import type { Fault } from '#shared/api/trail'
import { openReadOnly } from '#server/database/read-only'
import { trailQueries } from '#server/database/trail/queries'
import { copyHashes } from '#server/database/verify/copy-hashes'
import { newestEntries } from '#server/database/verify/newest'
import { deriveAgain, type Derived } from './derive'
import { collectFaults } from './faults'
import { foldRows } from './fold'
import { passOverLog, type GivenCheckpoint } from './log-pass'
import { rereadFiles, type Reread } from './reread'

export interface Verified {
  readonly entries: number
  /** Rows beside the log that were held against it. */
  readonly rows: number
  readonly faults: number
  /** The first hundred. */
  readonly found: readonly Fault[]
  /** Where changes and judgements were computed again. */
  readonly derived?: Derived
  /** Where old bytes were read by today's reader. */
  readonly reread?: Reread
}

export interface VerifyOptions {
  /** Checkpoints that were kept elsewhere. */
  readonly checkpoints?: readonly GivenCheckpoint[]
  /** Also computes changes and judgements again. */
  readonly derived?: boolean
  /** Also reads every kept file with today's reader. */
  readonly reread?: boolean
  /** Called after each page: lets a server answer others meanwhile. */
  readonly pause?: () => Promise<void>
}

/**
 * Recomputes the vault in `folder` from the bytes up, on a read-only connection of its own and one moment of the file: the
 * log's tree and signatures, then every row against the log. Throws OpenError where there is no vault or it is locked.
 */
export async function verifyVault(folder: string, { checkpoints = [], derived = false, reread = false, pause = async () => {} }: VerifyOptions = {}): Promise<Verified> {
  const { sqlite, db } = openReadOnly(folder)
  try {
    sqlite.exec('BEGIN')
    const faults = collectFaults()
    const newest = newestEntries(sqlite)
    const kept = trailQueries(db).checkpoints.all().map(({ id, note }) => ({ from: `checkpoint ${id}`, note }))
    const again = derived ? deriveAgain(db, faults) : null
    const files = reread ? rereadFiles(db) : null
    const { entries } = await passOverLog(db, [...kept, ...checkpoints], faults, (entry) => {
      newest.note(entry.subject.kind, entry.subject.id, entry.seq)
      again?.read(entry)
      files?.read(entry)
    }, pause)
    const rows = await foldRows(db, newest, copyHashes(sqlite), faults, pause)
    return { entries, rows, faults: faults.count(), found: faults.found, ...(again ? { derived: again.derived } : {}), ...(files ? { reread: files.reread } : {}) }
  }
  finally {
    sqlite.close()
  }
}
