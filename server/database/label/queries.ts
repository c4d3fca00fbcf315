import { desc, eq, sql } from 'drizzle-orm'
import { inserter } from '../inserter'
import { person } from '../person/table'
import { prepared } from '../prepared'
import { labelPrint } from './table'

export const labelQueries = prepared(db => ({
  newest: db.select({ tag: labelPrint.tag, size: labelPrint.size, at: labelPrint.at, by: person.name }).from(labelPrint).innerJoin(person, eq(person.id, labelPrint.byPerson))
    .where(eq(labelPrint.axisId, sql.placeholder('axisId'))).orderBy(desc(labelPrint.id)).limit(1).prepare(),
  insert: inserter(db, labelPrint),
}))
