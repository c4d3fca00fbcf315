import { and, asc, eq, gt, sql } from 'drizzle-orm'
import type { SiteBounds } from '../actor'
import { boundsText, inBounds } from '../bounds'
import { prepared, type VaultDb } from '../prepared'
import { site, type SiteRow } from './table'

const placeholder = sql.placeholder

export const siteRows = prepared(db => ({
  byId: db.select().from(site).where(eq(site.id, placeholder('id'))).prepare(),
  page: db.select().from(site).where(and(gt(site.id, placeholder('after')), inBounds(site.id))).orderBy(asc(site.id)).limit(placeholder('limit')).prepare(),
  all: db.select().from(site).where(inBounds(site.id)).orderBy(asc(site.name)).prepare(),
}))

/** All sites within bounds, by name. */
export const listSites = (db: VaultDb, bounds: SiteBounds): SiteRow[] => siteRows(db).all.all({ sites: boundsText(bounds) })

export function insertSite(db: VaultDb, values: typeof site.$inferInsert): SiteRow {
  return db.insert(site).values(values).returning().get()
}

export function updateSite(db: VaultDb, { id, ...values }: SiteRow): void {
  db.update(site).set(values).where(eq(site.id, id)).run()
}
