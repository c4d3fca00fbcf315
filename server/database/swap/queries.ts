import { and, asc, desc, eq, getTableColumns, gte, isNull, lt, sql } from 'drizzle-orm'
import { alias } from 'drizzle-orm/sqlite-core'
import { axis } from '../axis/table'
import { ifGiven, inBounds } from '../bounds'
import { inserter } from '../inserter'
import { line } from '../line/table'
import { machine } from '../machine/table'
import { person } from '../person/table'
import { prepared, type VaultDb } from '../prepared'
import { site } from '../site/table'
import { unit } from '../unit/table'
import { upload } from '../upload/table'
import { version, versionVoid } from '../version/table'
import { firmwareGap, readBack, swap, swapStep, type SwapRow } from './table'

const place = sql.placeholder
const unitOut = alias(unit, 'unit_out')
const unitIn = alias(unit, 'unit_in')
/** In the very words of the index swap_open, which nothing else makes use of. */
export const standsOpen = sql`${swap.step} NOT IN ('released', 'abandoned')`

export const swapQueries = prepared((db) => {
  const listed = () => db.select({
    swap, tag: axis.tag, machine: machine.name, site: { id: site.id, timeZone: site.timeZone, releaseHours: site.releaseHours },
    serialOut: unitOut.serial, serialIn: unitIn.serial, openedByName: person.name,
  }).from(swap).innerJoin(axis, eq(axis.id, swap.axisId)).innerJoin(machine, eq(machine.id, axis.machineId)).innerJoin(line, eq(line.id, machine.lineId)).innerJoin(site, eq(site.id, line.siteId))
    .innerJoin(person, eq(person.id, swap.openedBy)).leftJoin(unitOut, eq(unitOut.id, swap.unitOutId)).leftJoin(unitIn, eq(unitIn.id, swap.unitInId))
  return {
    byId: db.select().from(swap).where(eq(swap.id, place('id'))).prepare(),
    openAtAxis: db.select().from(swap).where(and(eq(swap.axisId, place('axisId')), standsOpen)).prepare(),
    /** Swaps that brought a unit to an axis, ended ones too. */
    broughtTo: db.select({ facts: swap.facts }).from(swap).where(and(eq(swap.axisId, place('axisId')), eq(swap.unitInId, place('unitId')))).prepare(),
    open: listed().where(standsOpen).orderBy(asc(swap.id)).prepare(),
    /** Newest first, from below an id; open: 1, 0 or null for all. */
    page: listed().where(and(
      lt(swap.id, place('below')), inBounds(site.id), ifGiven(swap.axisId, 'axisId'),
      sql`(${place('open')} IS NULL OR ${place('open')} = (${swap.step} NOT IN ('released', 'abandoned')))`,
    )).orderBy(desc(swap.id)).limit(place('limit')).prepare(),
    steps: db.select({ ...getTableColumns(swapStep), by: person.name }).from(swapStep).innerJoin(person, eq(person.id, swapStep.byPerson))
      .where(eq(swapStep.swapId, place('swapId'))).orderBy(asc(swapStep.rev)).prepare(),
    readBacks: db.select({ readBack, by: person.name, file: upload.name, number: version.number }).from(readBack).innerJoin(person, eq(person.id, readBack.byPerson))
      .innerJoin(upload, eq(upload.id, readBack.uploadId)).leftJoin(version, eq(version.id, readBack.versionId))
      .where(eq(readBack.swapId, place('swapId'))).orderBy(asc(readBack.attempt)).prepare(),
    gaps: db.select().from(firmwareGap).where(and(eq(firmwareGap.model, place('model')), eq(firmwareGap.firmware, place('firmware')))).prepare(),
    /** The newest as-found version of an axis received since an instant. */
    asFound: db.select({ id: version.id }).from(version).leftJoin(versionVoid, eq(versionVoid.versionId, version.id))
      .where(and(eq(version.axisId, place('axisId')), eq(version.occasion, 'as-found'), gte(version.receivedAt, place('since')), isNull(versionVoid.versionId)))
      .orderBy(desc(version.id)).limit(1).prepare(),
    insert: inserter(db, swap),
    insertStep: inserter(db, swapStep),
    insertReadBack: inserter(db, readBack),
    insertGap: inserter(db, firmwareGap),
  }
})

export type SwapListRow = NonNullable<ReturnType<ReturnType<typeof swapQueries>['open']['get']>>
export type NamedReadBack = NonNullable<ReturnType<ReturnType<typeof swapQueries>['readBacks']['get']>>

export function updateSwap(db: VaultDb, { id, ...values }: SwapRow): void {
  db.update(swap).set(values).where(eq(swap.id, id)).run()
}
