import Database from 'better-sqlite3'
import { Refusal } from '#shared/errors/refusal'

/** Runs an insert or update; what a unique key or the fitting trigger refuses becomes a refusal with `message`, at the place named. */
export function orRefuse<Answer>(message: string, at: string, store: () => Answer): Answer {
  try {
    return store()
  }
  catch (error) {
    if (!(error instanceof Database.SqliteError)) throw error
    const code = error.code === 'SQLITE_CONSTRAINT_UNIQUE' ? 'taken' : error.message.startsWith('overlaps:') ? 'overlaps' : null
    if (code === null) throw error
    throw new Refusal(code, message, { errors: [{ at, code, message }] })
  }
}
