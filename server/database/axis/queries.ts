import { eq, sql } from 'drizzle-orm'
import { line } from '../line/table'
import { machine } from '../machine/table'
import { prepared, type VaultDb } from '../prepared'
import { site } from '../site/table'
import { axis, type AxisRow } from './table'

const placeholder = sql.placeholder

export const axisRows = prepared((db) => {
  const placed = () => db.select({ axis, machine, line, site }).from(axis).innerJoin(machine, eq(machine.id, axis.machineId))
    .innerJoin(line, eq(line.id, machine.lineId)).innerJoin(site, eq(site.id, line.siteId))
  return {
    byId: db.select().from(axis).where(eq(axis.id, placeholder('id'))).prepare(),
    /** The axis with everything that it stands in. */
    placed: placed().where(eq(axis.id, placeholder('id'))).prepare(),
    placedByTag: placed().where(eq(axis.tag, placeholder('tag'))).prepare(),
  }
})

export function insertAxis(db: VaultDb, values: typeof axis.$inferInsert): AxisRow {
  return db.insert(axis).values(values).returning().get()
}

export function updateAxis(db: VaultDb, { id, ...values }: AxisRow): void {
  db.update(axis).set(values).where(eq(axis.id, id)).run()
}
