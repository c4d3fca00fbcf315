import { and, desc, eq, lt, sql } from 'drizzle-orm'
import { knownGood } from '../known-good/table'
import { log } from '../log/table'
import { nameplateRevision } from '../nameplate/table'
import { prepared } from '../prepared'
import { version } from '../version/table'

const place = sql.placeholder

/** Kinds of subjects that are few, and have an index of the log to themselves. */
export const termKinds = ['vault', 'setting', 'person', 'token', 'site', 'line', 'machine', 'axis', 'nameplate', 'rule', 'known-good'] as const
export type TermKind = (typeof termKinds)[number]

const kindOf = sql.raw(`json_extract(leaf, '$.subject.kind')`)
const idOf = sql.raw(`json_extract(leaf, '$.subject.id')`)
/** Word for word the condition of the index: without it a bound value would not be known to meet it. */
export const isTerm = sql`${kindOf} IN (${sql.raw(termKinds.map(kind => `'${kind}'`).join(', '))})`

/** Entries of the log about terms, newest first, and what stood before each. */
export const termQueries = prepared(db => ({
  ofKind: db.select().from(log).where(and(isTerm, sql`${kindOf} = ${place('kind')}`, lt(log.seq, place('below')))).orderBy(desc(log.seq)).limit(place('limit')).prepare(),
  before: db.select().from(log).where(and(isTerm, sql`${kindOf} = ${place('kind')}`, sql`${idOf} = ${place('id')}`, lt(log.seq, place('below')))).orderBy(desc(log.seq)).limit(1).prepare(),
  at: db.select({ at: sql<string>`json_extract(${log.leaf}, '$.at')` }).from(log).where(eq(log.seq, place('seq'))).prepare(),
  revision: db.select().from(nameplateRevision).where(and(eq(nameplateRevision.model, place('model')), eq(nameplateRevision.revision, place('revision')))).prepare(),
  markBefore: db.select().from(knownGood).where(and(eq(knownGood.axisId, place('axisId')), lt(knownGood.id, place('below')))).orderBy(desc(knownGood.id)).limit(1).prepare(),
  versionNumber: db.select({ number: version.number }).from(version).where(eq(version.id, place('id'))).prepare(),
}))
