import { asc, desc, sql } from 'drizzle-orm'
import { inserter } from '../inserter'
import { prepared } from '../prepared'
import { checkpoint, verification } from './table'

export const trailQueries = prepared(db => ({
  checkpoints: db.select().from(checkpoint).orderBy(asc(checkpoint.size), asc(checkpoint.id)).prepare(),
  newestCheckpoint: db.select().from(checkpoint).orderBy(desc(checkpoint.id)).limit(1).prepare(),
  insertCheckpoint: inserter(db, checkpoint),
  verifications: db.select().from(verification).orderBy(desc(verification.id)).limit(sql.placeholder('limit')).prepare(),
  insertVerification: inserter(db, verification),
}))
