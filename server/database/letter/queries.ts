import { and, asc, desc, eq, isNull, lt, lte, or, sql } from 'drizzle-orm'
import type { LetterState } from '#shared/api/letters'
import { ifGiven } from '../bounds'
import { inserter } from '../inserter'
import { person } from '../person/table'
import { prepared, type VaultDb } from '../prepared'
import { letter, letterChoice, type LetterChoiceRow, type LetterRow } from './table'

const place = sql.placeholder

export const letterQueries = prepared((db) => {
  const addressed = () => db.select({ letter, name: person.name, email: person.email }).from(letter).innerJoin(person, eq(person.id, letter.personId))
  return {
    one: addressed().where(eq(letter.id, place('id'))).prepare(),
    /** Newest first, from below an id. */
    page: addressed().where(and(lt(letter.id, place('below')), ifGiven(letter.state, 'state'))).orderBy(desc(letter.id)).limit(place('limit')).prepare(),
    /** What is to be sent now and by nobody else, longest due first. */
    due: db.select({ id: letter.id }).from(letter)
      .where(and(eq(letter.state, sql`'queued'`), lte(letter.nextTryAt, place('now')), or(isNull(letter.leasedUntil), lte(letter.leasedUntil, place('now')))))
      .orderBy(asc(letter.nextTryAt), asc(letter.id)).limit(1).prepare(),
    byCause: db.select({ id: letter.id }).from(letter).where(and(eq(letter.personId, place('personId')), eq(letter.kind, place('kind')), eq(letter.cause, place('cause')))).prepare(),
    waiting: db.select({ count: sql<number>`count(*)`, since: sql<string | null>`min(${letter.madeAt})` }).from(letter).where(eq(letter.state, sql`'queued'`)).prepare(),
    choices: db.select({ kind: letterChoice.kind, wanted: letterChoice.wanted }).from(letterChoice).where(eq(letterChoice.personId, place('personId'))).prepare(),
    choice: db.select({ wanted: letterChoice.wanted }).from(letterChoice).where(and(eq(letterChoice.personId, place('personId')), eq(letterChoice.kind, place('kind')))).prepare(),
    insert: inserter(db, letter),
  }
})

export type AddressedLetter = NonNullable<ReturnType<ReturnType<typeof letterQueries>['one']['get']>>

/** What becomes of a letter; what it says stays. */
export type LetterMove = { readonly state: LetterState } & Partial<Pick<LetterRow, 'attempts' | 'nextTryAt' | 'leasedUntil' | 'settledAt' | 'problem'>>

export function moveLetter(db: VaultDb, id: number, move: LetterMove): void {
  db.update(letter).set(move).where(eq(letter.id, id)).run()
}

/** Puts what a person says of a kind over what they said before; answers the row as it stands. */
export function putChoice(db: VaultDb, row: Omit<LetterChoiceRow, 'id'>): LetterChoiceRow {
  return db.insert(letterChoice).values(row).onConflictDoUpdate({ target: [letterChoice.personId, letterChoice.kind], set: row }).returning().get()
}
