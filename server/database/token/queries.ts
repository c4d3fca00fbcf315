import { and, asc, eq, gt, isNull, sql } from 'drizzle-orm'
import { person } from '../person/table'
import type { Write } from '../client'
import { prepared, type VaultDb } from '../prepared'
import { token, type TokenRow } from './table'

const placeholder = sql.placeholder

export const tokenQueries = prepared(db => ({
  /** A token that holds now, with its owner as they are now. */
  find: db.select({ id: token.id, name: token.name, scopes: token.scopes, siteIds: token.siteIds, lastUsedAt: token.lastUsedAt, ownerId: person.id, ownerSites: person.siteIds })
    .from(token).innerJoin(person, eq(person.id, token.ownerId))
    .where(and(eq(token.secretHash, placeholder('secretHash')), isNull(token.endedAt), gt(token.endsAt, placeholder('now')), isNull(person.endedAt))).prepare(),
  byId: db.select({ token, ownerName: person.name }).from(token).innerJoin(person, eq(person.id, token.ownerId)).where(eq(token.id, placeholder('id'))).prepare(),
  page: db.select({ token, ownerName: person.name }).from(token).innerJoin(person, eq(person.id, token.ownerId))
    .where(gt(token.id, placeholder('after'))).orderBy(asc(token.id)).limit(placeholder('limit')).prepare(),
  ofOwner: db.select().from(token).where(and(eq(token.ownerId, placeholder('ownerId')), isNull(token.endedAt))).prepare(),
  touch: db.update(token).set({ lastUsedAt: sql`${placeholder('now')}` }).where(eq(token.id, placeholder('id'))).prepare(),
}))

/** A token as the log has it: neither its secret's hash nor its last use. */
export function tokenState({ secretHash: _hash, lastUsedAt: _last, ...state }: TokenRow): Omit<TokenRow, 'secretHash' | 'lastUsedAt'> {
  return state
}

export function insertToken(db: VaultDb, values: typeof token.$inferInsert): TokenRow {
  return db.insert(token).values(values).returning().get()
}

/** Ends a token and logs it. */
export function endToken(db: VaultDb, write: Write, row: TokenRow): TokenRow {
  const ended = { ...row, endedAt: write.now }
  db.update(token).set({ endedAt: write.now }).where(eq(token.id, row.id)).run()
  write.log({ act: 'token-ended', id: row.id, state: tokenState(ended) })
  return ended
}

/** Ends every token that a person answers for. */
export function endTokensOf(db: VaultDb, write: Write, ownerId: number): void {
  for (const row of tokenQueries(db).ofOwner.all({ ownerId })) endToken(db, write, row)
}
