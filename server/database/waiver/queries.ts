import { and, desc, eq, getTableColumns, isNull, lt, sql } from 'drizzle-orm'
import { alias } from 'drizzle-orm/sqlite-core'
import { inserter } from '../inserter'
import { person } from '../person/table'
import { prepared } from '../prepared'
import { waiver, waiverEnd } from './table'

const place = sql.placeholder

export const waiverQueries = prepared((db) => {
  const ender = alias(person, 'ender')
  const named = () => db.select({
    ...getTableColumns(waiver), giver: person.name, endedAt: waiverEnd.at, endedBy: ender.name, endReason: waiverEnd.reason,
  }).from(waiver).innerJoin(person, eq(person.id, waiver.givenBy)).leftJoin(waiverEnd, eq(waiverEnd.waiverId, waiver.id)).leftJoin(ender, eq(ender.id, waiverEnd.byPerson))
  return {
    named: named().where(eq(waiver.id, place('id'))).prepare(),
    page: named().where(and(eq(waiver.axisId, place('axisId')), lt(waiver.id, place('below')))).orderBy(desc(waiver.id)).limit(place('limit')).prepare(),
    /** Those that nobody took back, that which holds longest first. */
    notEnded: named().where(and(eq(waiver.axisId, place('axisId')), isNull(waiverEnd.waiverId))).orderBy(desc(waiver.untilAt), desc(waiver.id)).prepare(),
    insert: inserter(db, waiver),
    insertEnd: inserter(db, waiverEnd),
  }
})

export type NamedWaiver = NonNullable<ReturnType<ReturnType<typeof waiverQueries>['named']['get']>>
