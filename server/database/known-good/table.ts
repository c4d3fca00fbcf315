import { integer, sqliteTable, text } from 'drizzle-orm/sqlite-core'
import type { meanings } from '#shared/api/versions'
import { id, instant } from '../columns'

export type Meaning = (typeof meanings)[number]

/** What an axis is restored to. Append-only: the newest row of the axis holds; versionId null says that none is known-good. */
export const knownGood = sqliteTable('known_good', {
  id: id(),
  axisId: integer('axis_id').notNull(),
  versionId: integer('version_id'),
  at: instant('at').notNull(),
  byPerson: integer('by_person').notNull(),
  meaning: text('meaning').$type<Meaning>().notNull(),
  note: text('note'),
  /** The version whose mark a swap carried over to this one. */
  carriedFrom: integer('carried_from'),
})
export type KnownGoodRow = typeof knownGood.$inferSelect
