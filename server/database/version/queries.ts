import { and, desc, eq, getTableColumns, isNull, lt, lte, max, ne, sql } from 'drizzle-orm'
import { alias } from 'drizzle-orm/sqlite-core'
import { axis } from '../axis/table'
import { axisState } from '../axis-state/table'
import { checkSet } from '../check/table'
import { content } from '../content/table'
import { inserter } from '../inserter'
import { knownGood } from '../known-good/table'
import { person } from '../person/table'
import { prepared, type VaultDb } from '../prepared'
import { token } from '../token/table'
import { unit } from '../unit/table'
import { version, versionVoid } from './table'

const base = alias(version, 'base')
const storer = alias(person, 'storer')
const voider = alias(person, 'voider')
const marker = alias(person, 'marker')

const { file: _, ...columns } = getTableColumns(version)

/** A version with all that its line in a list says; what may be many (content, changes, checks) stays out. */
const summarySelect = (db: VaultDb) => db.select({
  version: columns,
  axisTag: axis.tag,
  serial: unit.serial,
  contentHash: content.hash,
  baseNumber: base.number,
  storedByName: storer.name,
  tokenName: token.name,
  void: { at: versionVoid.at, by: voider.name, reason: versionVoid.reason },
  currentVersionId: axisState.currentVersionId,
  knownGoodVersionId: axisState.knownGoodVersionId,
  checks: { stop: checkSet.stop, warn: checkSet.warn, note: checkSet.note, unknown: checkSet.unknown },
  mark: { by: marker.name, at: knownGood.at, meaning: knownGood.meaning, note: knownGood.note },
  sightings: sql<number>`(SELECT count(*) FROM sighting WHERE sighting.version_id = ${version.id})`,
  lastSeenAt: sql<string | null>`(SELECT max(received_at) FROM sighting WHERE sighting.version_id = ${version.id})`,
}).from(version)
  .innerJoin(axis, eq(axis.id, version.axisId))
  .innerJoin(unit, eq(unit.id, version.unitId))
  .innerJoin(content, eq(content.id, version.contentId))
  .innerJoin(storer, eq(storer.id, version.storedBy))
  .innerJoin(checkSet, eq(checkSet.id, sql`(SELECT max(id) FROM check_set WHERE version_id = ${version.id})`))
  .leftJoin(base, eq(base.id, version.baseId))
  .leftJoin(token, eq(token.id, version.storedByToken))
  .leftJoin(versionVoid, eq(versionVoid.versionId, version.id))
  .leftJoin(voider, eq(voider.id, versionVoid.byPerson))
  .leftJoin(axisState, eq(axisState.axisId, version.axisId))
  .leftJoin(knownGood, eq(knownGood.id, sql`(SELECT max(id) FROM known_good WHERE version_id = ${version.id})`))
  .leftJoin(marker, eq(marker.id, knownGood.byPerson))

const place = sql.placeholder
const notVoid = isNull(versionVoid.versionId)

export const versionQueries = prepared((db) => {
  const standing = () => db.select(getTableColumns(version)).from(version).leftJoin(versionVoid, eq(versionVoid.versionId, version.id))
  const newestFirst = [desc(version.orderAt), desc(version.number)] as const
  return {
    modelOf: db.select({ model: version.model }).from(version).where(eq(version.id, place('id'))).prepare(),
    byId: db.select().from(version).where(eq(version.id, place('id'))).prepare(),
    byNumber: db.select({ id: version.id }).from(version).where(and(eq(version.axisId, place('axisId')), eq(version.number, place('number')))).prepare(),
    summary: summarySelect(db).where(eq(version.id, place('id'))).prepare(),
    /** Newest number first, from below a number. */
    page: summarySelect(db).where(and(eq(version.axisId, place('axisId')), lt(version.number, place('below')))).orderBy(desc(version.number)).limit(place('limit')).prepare(),
    /** Greatest time in order, then number, among those not void. */
    current: standing().where(and(eq(version.axisId, place('axisId')), notVoid)).orderBy(...newestFirst).limit(1).prepare(),
    /** The one whose time in order is the greatest up to an instant. */
    base: standing().where(and(eq(version.axisId, place('axisId')), notVoid, lte(version.orderAt, place('at')))).orderBy(...newestFirst).limit(1).prepare(),
    /** The one before a given one in order; called again with its own key it walks back to the first. */
    before: standing().where(and(eq(version.axisId, place('axisId')), notVoid, sql`(${version.orderAt}, ${version.number}) < (${place('at')}, ${place('number')})`))
      .orderBy(...newestFirst).limit(1).prepare(),
    /** The last one up to a given one in order that was read from another unit than this. */
    ofAnotherUnit: standing().where(and(eq(version.axisId, place('axisId')), notVoid, ne(version.unitId, place('unitId')), sql`(${version.orderAt}, ${version.number}) <= (${place('at')}, ${place('number')})`))
      .orderBy(...newestFirst).limit(1).prepare(),
    /** What was current at an instant by what had been received by then; what was voided later was not void yet. */
    asOf: db.select({ id: version.id }).from(version).leftJoin(versionVoid, and(eq(versionVoid.versionId, version.id), lte(versionVoid.at, place('at'))))
      .where(and(eq(version.axisId, place('axisId')), notVoid, lte(version.receivedAt, place('at')))).orderBy(...newestFirst).limit(1).prepare(),
    highestNumber: db.select({ number: max(version.number) }).from(version).where(eq(version.axisId, place('axisId'))).prepare(),
    voidOf: db.select().from(versionVoid).where(eq(versionVoid.versionId, place('versionId'))).prepare(),
    insert: inserter(db, version),
    insertVoid: inserter(db, versionVoid),
  }
})

export type VersionSummaryRow = NonNullable<ReturnType<ReturnType<typeof versionQueries>['summary']['get']>>
