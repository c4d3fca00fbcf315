import { and, asc, count, eq, gt, sql } from 'drizzle-orm'
import { axis } from '../axis/table'
import { ifGiven, inBounds } from '../bounds'
import { machine } from '../machine/table'
import { prepared, type VaultDb } from '../prepared'
import { site } from '../site/table'
import { line, type LineRow } from './table'

const placeholder = sql.placeholder

export const lineRows = prepared(db => ({
  byId: db.select().from(line).where(eq(line.id, placeholder('id'))).prepare(),
  page: db.select().from(line).where(and(gt(line.id, placeholder('after')), inBounds(line.siteId), ifGiven(line.siteId, 'siteId'), ifGiven(line.id, 'lineId')))
    .orderBy(asc(line.id)).limit(placeholder('limit')).prepare(),
}))

export function insertLine(db: VaultDb, values: typeof line.$inferInsert): LineRow {
  return db.insert(line).values(values).returning().get()
}

export function updateLine(db: VaultDb, { id, ...values }: LineRow): void {
  db.update(line).set(values).where(eq(line.id, id)).run()
}

/** Lines with their site and how many axes they have, for their folders. */
export const lineFolderRows = prepared(db => ({
  all: db.select({ id: line.id, name: line.name, site: site.name, timeZone: site.timeZone, axes: count(axis.id) }).from(line).innerJoin(site, eq(site.id, line.siteId))
    .leftJoin(machine, eq(machine.lineId, line.id)).leftJoin(axis, eq(axis.machineId, machine.id)).where(inBounds(line.siteId)).groupBy(line.id).orderBy(asc(site.name), asc(line.name)).prepare(),
}))
