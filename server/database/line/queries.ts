import { and, asc, eq, gt, sql } from 'drizzle-orm'
import { ifGiven, inBounds } from '../bounds'
import { prepared, type VaultDb } from '../prepared'
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
