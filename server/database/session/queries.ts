import { and, eq, isNull, ne, sql } from 'drizzle-orm'
import { person } from '../person/table'
import { prepared } from '../prepared'
import { session } from './table'

const placeholder = sql.placeholder

export const sessionQueries = prepared(db => ({
  /** The session with its person as both are now: asked on every request. */
  find: db.select({
    idHash: session.idHash, panel: session.panel, madeAt: session.madeAt, seenAt: session.seenAt,
    personId: person.id, name: person.name, roles: person.roles, siteIds: person.siteIds, shared: person.shared,
  }).from(session).innerJoin(person, eq(person.id, session.personId))
    .where(and(eq(session.idHash, placeholder('idHash')), isNull(session.endedAt), isNull(person.endedAt))).prepare(),
  begin: db.insert(session).values({
    idHash: placeholder('idHash'), personId: placeholder('personId'), panel: placeholder('panel'), peer: placeholder('peer'), madeAt: placeholder('now'), seenAt: placeholder('now'),
  }).prepare(),
  touch: db.update(session).set({ seenAt: sql`${placeholder('now')}` }).where(eq(session.idHash, placeholder('idHash'))).prepare(),
  end: db.update(session).set({ endedAt: sql`${placeholder('now')}` }).where(and(eq(session.idHash, placeholder('idHash')), isNull(session.endedAt))).prepare(),
  /** All of a person's but one; an empty idHash spares none. */
  endOthers: db.update(session).set({ endedAt: sql`${placeholder('now')}` })
    .where(and(eq(session.personId, placeholder('personId')), ne(session.idHash, placeholder('idHash')), isNull(session.endedAt))).prepare(),
}))
