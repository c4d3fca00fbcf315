import { and, asc, eq, gt, isNull, sql } from 'drizzle-orm'
import { prepared, type VaultDb } from '../prepared'
import { person, type PersonRow } from './table'

const placeholder = sql.placeholder

export const personQueries = prepared(db => ({
  byId: db.select().from(person).where(eq(person.id, placeholder('id'))).prepare(),
  byEmail: db.select().from(person).where(eq(person.email, placeholder('email'))).prepare(),
  page: db.select().from(person).where(gt(person.id, placeholder('after'))).orderBy(asc(person.id)).limit(placeholder('limit')).prepare(),
  names: db.select({ id: person.id, name: person.name }).from(person).where(isNull(person.endedAt)).orderBy(asc(person.name)).prepare(),
  /** Everyone who has not left. */
  present: db.select().from(person).where(isNull(person.endedAt)).orderBy(asc(person.id)).prepare(),
  any: db.select({ id: person.id }).from(person).limit(1).prepare(),
  /** Administrators who can sign in, but for one person. */
  otherAdmins: db.select({ id: person.id }).from(person).where(and(
    isNull(person.endedAt), sql`${person.id} <> ${placeholder('but')}`, sql`EXISTS (SELECT 1 FROM json_each(${person.roles}) WHERE value = 'admin')`, sql`${person.passwordHash} IS NOT NULL`,
  )).limit(1).prepare(),
  signedIn: db.update(person).set({ lastSignInAt: sql`${placeholder('now')}` }).where(eq(person.id, placeholder('id'))).prepare(),
}))

/** A person as the log has them: all but the hash of the password and when they last signed in. */
export function personState({ passwordHash: _hash, lastSignInAt: _last, ...state }: PersonRow): Omit<PersonRow, 'passwordHash' | 'lastSignInAt'> {
  return state
}

export function insertPerson(db: VaultDb, values: typeof person.$inferInsert): PersonRow {
  return db.insert(person).values(values).returning().get()
}

export function updatePerson(db: VaultDb, { id, ...values }: PersonRow): void {
  db.update(person).set(values).where(eq(person.id, id)).run()
}
