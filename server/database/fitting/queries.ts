import { and, desc, eq, getTableColumns, isNull, sql } from 'drizzle-orm'
import { axis } from '../axis/table'
import { prepared, type VaultDb } from '../prepared'
import { unit } from '../unit/table'
import { fitting, type FittingRow } from './table'

const placeholder = sql.placeholder
const named = { ...getTableColumns(fitting), axisTag: axis.tag, serial: unit.serial }

export const fittingRows = prepared((db) => {
  const withNames = () => db.select(named).from(fitting).innerJoin(axis, eq(axis.id, fitting.axisId)).innerJoin(unit, eq(unit.id, fitting.unitId))
  return {
    byId: db.select().from(fitting).where(eq(fitting.id, placeholder('id'))).prepare(),
    named: withNames().where(eq(fitting.id, placeholder('id'))).prepare(),
    ofAxis: withNames().where(eq(fitting.axisId, placeholder('axisId'))).orderBy(desc(fitting.fromAt), desc(fitting.id)).prepare(),
    openOfUnit: db.select().from(fitting).where(and(eq(fitting.unitId, placeholder('unitId')), isNull(fitting.toAt))).prepare(),
  }
})

/** Throws the trigger's `overlaps` where the axis or the unit is taken. */
export function insertFitting(db: VaultDb, values: typeof fitting.$inferInsert): FittingRow {
  return db.insert(fitting).values(values).returning().get()
}

export function closeFitting(db: VaultDb, id: number, toAt: string): void {
  db.update(fitting).set({ toAt }).where(eq(fitting.id, id)).run()
}
