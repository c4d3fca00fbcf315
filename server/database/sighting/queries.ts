import { count, eq, sql } from 'drizzle-orm'
import { inserter } from '../inserter'
import { prepared } from '../prepared'
import { sighting } from './table'

export const sightingQueries = prepared(db => ({
  ofVersion: db.select({ count: count() }).from(sighting).where(eq(sighting.versionId, sql.placeholder('versionId'))).prepare(),
  insert: inserter(db, sighting),
}))
