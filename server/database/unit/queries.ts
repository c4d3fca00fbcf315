import { and, asc, eq, gt, isNull, sql } from 'drizzle-orm'
import { axis } from '../axis/table'
import { ifGiven, inBounds } from '../bounds'
import { fitting } from '../fitting/table'
import { line } from '../line/table'
import { machine } from '../machine/table'
import { nameplateRevision } from '../nameplate/table'
import { prepared, type VaultDb } from '../prepared'
import { unit, type UnitRow } from './table'

const placeholder = sql.placeholder

export const unitRows = prepared((db) => {
  const modelKnown = sql<number>`EXISTS (SELECT 1 FROM ${nameplateRevision} WHERE ${nameplateRevision.model} = ${unit.model})`
  const placed = () => db.select({ unit, axisId: axis.id, axisTag: axis.tag, modelKnown }).from(unit)
    .leftJoin(fitting, and(eq(fitting.unitId, unit.id), isNull(fitting.toAt))).leftJoin(axis, eq(axis.id, fitting.axisId))
    .leftJoin(machine, eq(machine.id, axis.machineId)).leftJoin(line, eq(line.id, machine.lineId))
  const contains = (column: typeof unit.serial | typeof unit.model | typeof unit.location | typeof unit.actuatorSerial) => sql`instr(lower(${column}), ${placeholder('search')}) > 0`
  return {
    byId: db.select().from(unit).where(eq(unit.id, placeholder('id'))).prepare(),
    /** By serial without case, and channel (0 = none). */
    bySerial: db.select().from(unit).where(and(eq(unit.serial, placeholder('serial')), sql`ifnull(${unit.channel}, 0) = ${placeholder('channel')}`)).prepare(),
    placed: placed().where(eq(unit.id, placeholder('id'))).prepare(),
    /** `search` in lower case; null = all. */
    page: placed().where(and(
      gt(unit.id, placeholder('after')), inBounds(sql`coalesce(${line.siteId}, ${unit.siteId})`), ifGiven(unit.state, 'state'), ifGiven(unit.model, 'model'),
      sql`(${placeholder('search')} IS NULL OR ${contains(unit.serial)} OR ${contains(unit.model)} OR ${contains(unit.location)} OR ${contains(unit.actuatorSerial)})`,
    )).orderBy(asc(unit.id)).limit(placeholder('limit')).prepare(),
  }
})

export const stockQueries = prepared(db => ({
  spares: db.select({ unit }).from(unit).leftJoin(fitting, and(eq(fitting.unitId, unit.id), isNull(fitting.toAt)))
    .where(and(eq(unit.state, 'spare'), isNull(fitting.id))).orderBy(asc(unit.id)).prepare(),
}))

/** The units in stock: on a shelf and fitted nowhere. */
export const spareUnits = (db: VaultDb): UnitRow[] => stockQueries(db).spares.all().map(row => row.unit)

export function insertUnit(db: VaultDb, values: typeof unit.$inferInsert): UnitRow {
  return db.insert(unit).values(values).returning().get()
}

export function updateUnit(db: VaultDb, { id, ...values }: UnitRow): void {
  db.update(unit).set(values).where(eq(unit.id, id)).run()
}
