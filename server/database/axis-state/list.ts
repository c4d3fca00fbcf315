import { and, asc, eq, gt, sql, type SQL } from 'drizzle-orm'
import { alias } from 'drizzle-orm/sqlite-core'
import type { SiteBounds } from '../actor'
import { axis } from '../axis/table'
import { boundsText, ifGiven, inBounds } from '../bounds'
import { fitting } from '../fitting/table'
import { knownGood } from '../known-good/table'
import { line } from '../line/table'
import { logQueries } from '../log/queries'
import { machine } from '../machine/table'
import { person } from '../person/table'
import { prepared, type VaultDb } from '../prepared'
import { site } from '../site/table'
import { standsOpen } from '../swap/queries'
import { swap } from '../swap/table'
import { unit } from '../unit/table'
import { version } from '../version/table'
import { axisState } from './table'
import { touchedSince } from './touched'

const current = alias(version, 'current_version')
const marked = alias(version, 'marked_version')
const swapOpener = alias(person, 'swap_opener')
const readFrom = alias(unit, 'read_from')
const place = sql.placeholder

/** Axes with their place, state, marked and current version, fitted unit and open swap: one row each, every join by a key. */
const axisRowsOf = (db: VaultDb, ...where: (SQL | undefined)[]) => db.select({
  axis, state: axisState,
  machine: { id: machine.id, name: machine.name, rev: machine.rev }, line: { id: line.id, name: line.name },
  site: { id: site.id, name: site.name, timeZone: site.timeZone, knownGoodMonths: site.knownGoodMonths, attachmentWanted: site.attachmentWanted, labelWanted: site.labelWanted, releaseHours: site.releaseHours },
  current: { id: current.id, unitId: current.unitId, contentId: current.contentId, number: current.number, capturedAt: current.capturedAt, receivedAt: current.receivedAt, scribeCode: current.scribeCode, model: current.model, firmware: current.firmware },
  marked: { id: marked.id, number: marked.number, scribeCode: marked.scribeCode },
  mark: { at: knownGood.at, by: person.name },
  /** The unit that the values were read from which the axis would be restored to. */
  readFrom: { id: readFrom.id, model: readFrom.model, rev: readFrom.rev },
  unit: { id: unit.id, serial: unit.serial, channel: unit.channel, model: unit.model, firmware: unit.firmware, since: fitting.fromAt },
  swap: { id: swap.id, step: swap.step, openedAt: swap.openedAt, openedBy: swapOpener.name, runningAt: swap.runningAt },
}).from(axis)
  .innerJoin(machine, eq(machine.id, axis.machineId)).innerJoin(line, eq(line.id, machine.lineId)).innerJoin(site, eq(site.id, line.siteId))
  .leftJoin(axisState, eq(axisState.axisId, axis.id))
  .leftJoin(current, eq(current.id, axisState.currentVersionId))
  .leftJoin(marked, eq(marked.id, axisState.knownGoodVersionId))
  .leftJoin(knownGood, eq(knownGood.id, axisState.knownGoodId))
  .leftJoin(person, eq(person.id, knownGood.byPerson))
  .leftJoin(fitting, eq(fitting.id, axisState.fittingId))
  .leftJoin(unit, eq(unit.id, fitting.unitId))
  .leftJoin(readFrom, eq(readFrom.id, sql`coalesce(${marked.unitId}, ${current.unitId})`))
  .leftJoin(swap, and(eq(swap.axisId, axis.id), standsOpen)).leftJoin(swapOpener, eq(swapOpener.id, swap.openedBy))
  .where(and(...where)).orderBy(asc(axis.id))

export const axisLists = prepared(db => ({
  one: axisRowsOf(db, eq(axis.id, place('id'))).prepare(),
  all: axisRowsOf(db).prepare(),
  page: axisRowsOf(db, gt(axis.id, place('after')), inBounds(site.id), ifGiven(site.id, 'siteId'), ifGiven(line.id, 'lineId'), ifGiven(machine.id, 'machineId')).limit(place('limit')).prepare(),
}))

export type AxisListRow = NonNullable<ReturnType<ReturnType<typeof axisLists>['one']['get']>>

export const readAxisRow = (db: VaultDb, id: number): AxisListRow | undefined => axisLists(db).one.get({ id })

const kept = new WeakMap<VaultDb, { readonly logSeq: number, readonly rows: readonly AxisListRow[] }>()

/**
 * Every axis of the sites, by id. Nothing about an axis changes without a log entry, so that the rows of the newest entry stand
 * for all who look until the next one; then those are read again that entries since speak of. At 10,000 axes reading all of them
 * takes a quarter of a second, and in the night a file comes in every few seconds.
 */
export function readAllAxes(db: VaultDb, sites: SiteBounds): readonly AxisListRow[] {
  const logSeq = logQueries(db).newest.get()?.seq ?? -1
  const rows = rowsAt(db, logSeq)
  kept.set(db, { logSeq, rows })
  return sites === null ? rows : rows.filter(row => sites.includes(row.site.id))
}

function rowsAt(db: VaultDb, logSeq: number): readonly AxisListRow[] {
  const known = kept.get(db)
  if (known?.logSeq === logSeq) return known.rows
  const touched = known && touchedSince(db, known.logSeq, logSeq)
  if (!touched) return axisLists(db).all.all()
  const again = new Map([...touched].map(id => [id, readAxisRow(db, id)]))
  const last = known.rows.at(-1)?.axis.id ?? 0
  const added = [...again].flatMap(([id, row]) => row !== undefined && id > last ? [row] : []).sort((a, b) => a.axis.id - b.axis.id)
  return [...known.rows.map(row => again.get(row.axis.id) ?? row), ...added]
}

export interface AxisFilter { readonly siteId?: number | undefined, readonly lineId?: number | undefined, readonly machineId?: number | undefined }

export function readAxisPage(db: VaultDb, sites: SiteBounds, { siteId = 0, lineId = 0, machineId = 0 }: AxisFilter, after: number, limit: number): AxisListRow[] {
  return axisLists(db).page.all({ sites: boundsText(sites), siteId: siteId || null, lineId: lineId || null, machineId: machineId || null, after, limit })
}
