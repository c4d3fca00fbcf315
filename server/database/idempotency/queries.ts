import { and, eq, lt, sql } from 'drizzle-orm'
import { prepared } from '../prepared'
import { idempotency } from './table'

const placeholder = sql.placeholder

export const idempotencyQueries = prepared(db => ({
  find: db.select().from(idempotency).where(and(eq(idempotency.actor, placeholder('actor')), eq(idempotency.keyHash, placeholder('keyHash')))).prepare(),
  keep: db.insert(idempotency).values({
    actor: placeholder('actor'), keyHash: placeholder('keyHash'), route: placeholder('route'), bodyHash: placeholder('bodyHash'),
    status: placeholder('status'), answer: placeholder('answer'), at: placeholder('at'),
  }).prepare(),
  forget: db.delete(idempotency).where(lt(idempotency.at, placeholder('before'))).prepare(),
}))
