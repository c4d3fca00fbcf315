import { desc, eq, sql } from 'drizzle-orm'
import { inserter } from '../inserter'
import { person } from '../person/table'
import { prepared } from '../prepared'
import { knownGood } from './table'

export const knownGoodQueries = prepared(db => ({
  /** The newest mark of an axis holds, and a mark of none is one too. */
  inForce: db.select({ mark: knownGood, by: person.name }).from(knownGood).innerJoin(person, eq(person.id, knownGood.byPerson))
    .where(eq(knownGood.axisId, sql.placeholder('axisId'))).orderBy(desc(knownGood.id)).limit(1).prepare(),
  insert: inserter(db, knownGood),
}))
