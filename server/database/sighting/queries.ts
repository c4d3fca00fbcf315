import { count, desc, eq, sql } from 'drizzle-orm'
import { inserter } from '../inserter'
import { prepared } from '../prepared'
import { sighting } from './table'

export const sightingQueries = prepared(db => ({
  ofVersion: db.select({ count: count() }).from(sighting).where(eq(sighting.versionId, sql.placeholder('versionId'))).prepare(),
  lastOfVersion: db.select({ capturedAt: sighting.capturedAt }).from(sighting).where(eq(sighting.versionId, sql.placeholder('versionId'))).orderBy(desc(sighting.receivedAt)).limit(1).prepare(),
  insert: inserter(db, sighting),
}))
