import { count, eq, max, sql } from 'drizzle-orm'
import { inserter } from '../inserter'
import { prepared, type VaultDb } from '../prepared'
import { sighting } from '../sighting/table'
import { version } from '../version/table'
import { axisState, type AxisStateRow } from './table'

const ofAxis = sql.placeholder('axisId')

const axisStateQueries = prepared(db => ({
  byAxis: db.select().from(axisState).where(eq(axisState.axisId, ofAxis)).prepare(),
  remove: db.delete(axisState).where(eq(axisState.axisId, ofAxis)).prepare(),
  insert: inserter(db, axisState),
  versions: db.select({ count: count(), lastAt: max(version.receivedAt) }).from(version).where(eq(version.axisId, ofAxis)).prepare(),
  sightings: db.select({ count: count(), lastAt: max(sighting.receivedAt) }).from(sighting).where(eq(sighting.axisId, ofAxis)).prepare(),
}))

/** The derived row of an axis; undefined until something happened to it. */
export const readAxisState = (db: VaultDb, axisId: number): AxisStateRow | undefined => axisStateQueries(db).byAxis.get({ axisId })

/** Puts the row in the place of the one before it. */
export function replaceAxisState(db: VaultDb, row: AxisStateRow): void {
  axisStateQueries(db).remove.run({ axisId: row.axisId })
  axisStateQueries(db).insert(row)
}

/** How many versions and sightings an axis has, and when the last file of either came. */
export function countReceived(db: VaultDb, axisId: number): { versions: number, sightings: number, lastUploadAt: string | null } {
  const versions = axisStateQueries(db).versions.get({ axisId })
  const sightings = axisStateQueries(db).sightings.get({ axisId })
  const last = [versions?.lastAt, sightings?.lastAt].filter(at => typeof at === 'string').sort().at(-1)
  return { versions: versions?.count ?? 0, sightings: sightings?.count ?? 0, lastUploadAt: last ?? null }
}
