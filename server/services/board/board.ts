import type { Board, BoardAxis } from '#shared/api/board'
import type { Actor } from '#server/database/actor'
import { readAllAxes, type AxisListRow } from '#server/database/axis-state/list'
import type { Vault } from '#server/database/client'
import { logQueries } from '#server/database/log/queries'
import { overdueSince } from '../axes/overdue'
import { plantOf } from '../people/plant'
import { readinessOf } from '../readiness/readiness'
import { readStock, type Stock } from '../readiness/stock'
import { openSwapOf } from '../swaps/of-axis'
import { standingCounts } from '../waivers/accepted'
import { attention } from './attention'

/** Every axis of the actor's sites with its state, and what needs someone now. */
export function readBoard(vault: Vault, actor: Actor): Board {
  const asOf = vault.now()
  const stock = readStock(vault.db, asOf)
  const rows = readAllAxes(vault.db, actor.sites)
  return {
    asOf, plant: plantOf(vault), axes: rows.map(row => boardAxis(row, stock, asOf)), attention: attention(vault.db, actor.sites, rows, asOf),
    pending: rows.filter(row => !stock.spareFor(row).settled).length,
    log: { entries: (logQueries(vault.db).newest.get()?.seq ?? -1) + 1 },
  }
}

function boardAxis(row: AxisListRow, stock: Stock, now: string): BoardAxis {
  const { axis, state, machine, line, site, current, marked, mark, unit } = row
  const lastUploadAt = state?.lastUploadAt ?? null
  return {
    id: axis.id, tag: axis.tag, role: axis.role, site: site.name, line: line.name, machine: machine.name, machineId: machine.id, timeZone: site.timeZone,
    serial: unit?.serial ?? null, model: unit?.model ?? null, status: state?.status ?? 'never-read',
    off: { harm: state?.offHarm ?? 0, motion: state?.offMotion ?? 0, text: state?.offText ?? 0 }, sense: state?.sense ?? null,
    lastUploadAt, overdueSince: overdueSince(lastUploadAt, axis.uploadEveryHours, now),
    knownGood: marked && mark?.at ? { versionId: marked.id, number: marked.number, at: mark.at } : null,
    current: current && { versionId: current.id, number: current.number },
    checks: standingCounts(state, now), lacks: readinessOf(row, stock, now).lacks, swap: openSwapOf(row, now),
  }
}
