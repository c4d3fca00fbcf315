import type { Fitting } from '#shared/api/places'
import type { Axis, VersionSummary } from '#shared/api/versions'
import { Refusal } from '#shared/errors/refusal'
import { readAxisPage, readAxisRow, type AxisFilter, type AxisListRow } from '#server/database/axis-state/list'
import type { Actor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { fittingRows } from '#server/database/fitting/queries'
import { versionQueries } from '#server/database/version/queries'
import { parseTimestamp } from '#shared/settings/time'
import { afterOf, limitOf, pageOf, type PageQuery } from '../page'
import { readinessOf } from '../readiness/readiness'
import { readStock, type Stock } from '../readiness/stock'
import { openSwapOf } from '../swaps/of-axis'
import { versionSummary } from '../versions/summary'
import { standingCounts } from '../waivers/accepted'
import { overdueSince } from './overdue'

export function axisOnWire(row: AxisListRow, stock: Stock, now: string): Axis {
  const { axis, state, machine, line, site, current, marked, mark, unit } = row
  const lastUploadAt = state?.lastUploadAt ?? null
  return {
    id: axis.id, rev: axis.rev, tag: axis.tag, axisKind: axis.axisKind, role: axis.role, flags: axis.flags, bus: axis.bus,
    uploadEveryHours: axis.uploadEveryHours, duty: axis.duty, machine, line, site: { id: site.id, name: site.name, timeZone: site.timeZone },
    status: state?.status ?? 'never-read', off: { harm: state?.offHarm ?? 0, motion: state?.offMotion ?? 0, text: state?.offText ?? 0 }, sense: state?.sense ?? null,
    knownGood: marked && mark?.at && mark.by ? { versionId: marked.id, number: marked.number, by: mark.by, at: mark.at, scribeCode: marked.scribeCode } : null,
    unit: unit?.id && unit.since ? { id: unit.id, serial: unit.serial ?? '', channel: unit.channel, model: unit.model ?? '', firmware: unit.firmware, since: unit.since } : null,
    current: current && { versionId: current.id, number: current.number, capturedAt: current.capturedAt, scribeCode: current.scribeCode, firmware: current.firmware },
    lastUploadAt, overdueSince: overdueSince(lastUploadAt, axis.uploadEveryHours, now),
    checks: standingCounts(state, now), readiness: readinessOf(row, stock, now), swap: openSwapOf(row, now),
    versions: state?.versions ?? 0, sightings: state?.sightings ?? 0,
  }
}

export function readAxis(vault: Vault, id: number): Axis {
  const row = readAxisRow(vault.db, id)
  if (!row) throw new Refusal('not-found', 'There is no such axis.')
  return axisOnWire(row, readStock(vault.db, vault.now()), vault.now())
}

/** Axes of the actor's sites, by id; of one site, line or machine where that is asked. */
export function listAxes(vault: Vault, actor: Actor, query: PageQuery & AxisFilter): { items: Axis[], next: string | null } {
  const now = vault.now()
  const stock = readStock(vault.db, now)
  const rows = readAxisPage(vault.db, actor.sites, query, afterOf(query), limitOf(query) + 1)
  return pageOf(rows, query, row => row.axis.id, row => axisOnWire(row, stock, now))
}

/** What was current at an instant, by what had been received by then. */
export function axisAsOf({ db }: Vault, axisId: number, instant: string): { version: VersionSummary | null } {
  const at = new Date(parseTimestamp(instant) ?? Date.parse(instant)).toISOString()
  const found = versionQueries(db).asOf.get({ axisId, at })
  return { version: found ? versionSummary(db, found.id) : null }
}

/** Which units sat at an axis, newest first. */
export function listFittings({ db }: Vault, axisId: number): { items: Fitting[] } {
  return { items: fittingRows(db).ofAxis.all({ axisId }).map(({ id, axisTag, unitId, serial, fromAt, toAt }) => ({ id, axisId, axisTag, unitId, serial, from: fromAt, to: toAt })) }
}
