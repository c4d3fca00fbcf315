import { and, asc, eq, getTableColumns, gt, sql } from 'drizzle-orm'
import { ifGiven, inBounds } from '../bounds'
import { line } from '../line/table'
import { prepared, type VaultDb } from '../prepared'
import { machine, type MachineRow } from './table'

const placeholder = sql.placeholder

export const machineRows = prepared(db => ({
  byId: db.select().from(machine).where(eq(machine.id, placeholder('id'))).prepare(),
  page: db.select(getTableColumns(machine)).from(machine).innerJoin(line, eq(line.id, machine.lineId))
    .where(and(gt(machine.id, placeholder('after')), inBounds(line.siteId), ifGiven(line.siteId, 'siteId'), ifGiven(machine.lineId, 'lineId'), ifGiven(machine.id, 'machineId')))
    .orderBy(asc(machine.id)).limit(placeholder('limit')).prepare(),
}))

export function insertMachine(db: VaultDb, values: typeof machine.$inferInsert): MachineRow {
  return db.insert(machine).values(values).returning().get()
}

export function updateMachine(db: VaultDb, { id, ...values }: MachineRow): void {
  db.update(machine).set(values).where(eq(machine.id, id)).run()
}
