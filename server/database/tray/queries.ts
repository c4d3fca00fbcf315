import { and, asc, count, eq, getTableColumns, gt, inArray, isNull, or, sql, sum, type SQL } from 'drizzle-orm'
import { inserter } from '../inserter'
import { person } from '../person/table'
import { prepared, type VaultDb } from '../prepared'
import { token } from '../token/table'
import { upload } from '../upload/table'
import type { SiteBounds } from '../actor'
import { axis } from '../axis/table'
import { tray, traySettled } from './table'

const place = sql.placeholder
const waiting = isNull(traySettled.trayId)
const { bytes: _, ...uploadColumns } = getTableColumns(upload)

export const trayQueries = prepared(db => ({
  byId: db.select({ tray, upload: uploadColumns, settled: traySettled.outcome }).from(tray).innerJoin(upload, eq(upload.id, tray.uploadId))
    .leftJoin(traySettled, eq(traySettled.trayId, tray.id)).where(eq(tray.id, place('id'))).prepare(),
  /** How much waits at a site, or (site 0) at none. */
  load: db.select({ files: count(), bytes: sum(upload.size).mapWith(Number) }).from(tray).innerJoin(upload, eq(upload.id, tray.uploadId))
    .leftJoin(traySettled, eq(traySettled.trayId, tray.id)).where(and(eq(sql`ifnull(${tray.siteId}, 0)`, place('siteId')), waiting)).prepare(),
  insert: inserter(db, tray),
  settle: inserter(db, traySettled),
}))

export type TrayItemRow = NonNullable<ReturnType<ReturnType<typeof trayQueries>['byId']['get']>>

/** Unreadable files group by their bytes, readable ones by serial, channel and content. */
const group = sql<string>`coalesce(${tray.serial} || char(0) || ifnull(${tray.channel}, 0) || char(0) || ${tray.contentId}, ${upload.sha256})`

function mayBeSeen(sites: SiteBounds): SQL | undefined {
  return sites === null ? undefined : or(isNull(tray.siteId), inArray(tray.siteId, [...sites]))
}

/** Groups of equal files that wait, oldest first; each stands for its oldest file. At most 2,000 a site ever wait. */
export function waitingGroups(db: VaultDb, sites: SiteBounds, after: number, limit: number) {
  const groups = db.select({ id: sql<number>`min(${tray.id})`.as('first'), copies: count().as('copies') }).from(tray).innerJoin(upload, eq(upload.id, tray.uploadId))
    .leftJoin(traySettled, eq(traySettled.trayId, tray.id)).where(and(waiting, mayBeSeen(sites))).groupBy(group).as('groups')
  return db.select({ tray, upload: uploadColumns, copies: groups.copies, sentBy: person.name, token: token.name, guessTag: axis.tag }).from(groups)
    .innerJoin(tray, eq(tray.id, groups.id)).innerJoin(upload, eq(upload.id, tray.uploadId)).innerJoin(person, eq(person.id, upload.personId))
    .leftJoin(token, eq(token.id, upload.tokenId)).leftJoin(axis, eq(axis.id, tray.guessAxisId))
    .where(gt(groups.id, after)).orderBy(asc(groups.id)).limit(limit).all()
}

/** All that wait in the group of a file, oldest first. */
export function waitingLike(db: VaultDb, sites: SiteBounds, id: number): TrayItemRow['tray'][] {
  const key = db.select({ key: group }).from(tray).innerJoin(upload, eq(upload.id, tray.uploadId)).where(eq(tray.id, id))
  return db.select({ tray }).from(tray).innerJoin(upload, eq(upload.id, tray.uploadId)).leftJoin(traySettled, eq(traySettled.trayId, tray.id))
    .where(and(waiting, mayBeSeen(sites), eq(group, key))).orderBy(asc(tray.id)).all().map(row => row.tray)
}

export function countWaiting(db: VaultDb, sites: SiteBounds): { count: number, since: string | null } {
  const row = db.select({ count: count(), since: sql<string | null>`min(${upload.receivedAt})` }).from(tray).innerJoin(upload, eq(upload.id, tray.uploadId))
    .leftJoin(traySettled, eq(traySettled.trayId, tray.id)).where(and(waiting, mayBeSeen(sites))).get()
  return { count: row?.count ?? 0, since: row?.since ?? null }
}
