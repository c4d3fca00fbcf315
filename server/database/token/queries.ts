import { and, eq, gt, isNull, sql } from 'drizzle-orm'
import { person } from '../person/table'
import { prepared } from '../prepared'
import { token } from './table'

const placeholder = sql.placeholder

export const tokenQueries = prepared(db => ({
  /** A token that holds now, with its owner as they are now. */
  find: db.select({ id: token.id, name: token.name, scopes: token.scopes, siteIds: token.siteIds, lastUsedAt: token.lastUsedAt, ownerId: person.id, ownerSites: person.siteIds })
    .from(token).innerJoin(person, eq(person.id, token.ownerId))
    .where(and(eq(token.secretHash, placeholder('secretHash')), isNull(token.endedAt), gt(token.endsAt, placeholder('now')), isNull(person.endedAt))).prepare(),
  touch: db.update(token).set({ lastUsedAt: sql`${placeholder('now')}` }).where(eq(token.id, placeholder('id'))).prepare(),
}))
