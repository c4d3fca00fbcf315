import { parseTimestamp } from '#shared/settings/time'
import type { SettingsFile, UnitIdentity } from '#shared/settings/types'
import { seesSite, type Actor } from '#server/database/actor'
import { judgingQueries, type AxisPlace } from '#server/database/judging/queries'
import type { VaultDb } from '#server/database/prepared'
import type { FittingRow, TrayProblem, UnitRow } from '#server/database/schema'
import { unitRows } from '#server/database/unit/queries'
import { fittingFor, knownLifeFrom, timesOf, type Times } from './clock'

export interface PlacedFile {
  readonly ok: true
  readonly unit: UnitRow
  readonly place: AxisPlace
  readonly times: Times
}
export interface UnplacedFile {
  readonly ok: false
  readonly problem: Exclude<TrayProblem, 'unreadable'>
  readonly detail: string
  /** The site that the unit itself names; null: none. */
  readonly siteId: number | null
}

/** Year 0 to 9999: what a stored time can hold. */
const earliest = Date.parse('0000-01-01T00:00:00.000Z')
const latest = Date.parse('9999-12-31T23:59:59.999Z')

/** Epoch milliseconds of a time with offset; one beyond what can be stored is drawn in to the nearest that can. */
export function millisecondsOf(timestamp: string): number {
  return Math.min(Math.max(parseTimestamp(timestamp) ?? earliest, earliest), latest)
}

/** Where a unit sat when a file of it was captured, and the times of the file; place undefined: nowhere. */
export function placeUnit(db: VaultDb, unit: UnitRow, capturedAt: string, receivedAt: number): { place: AxisPlace | undefined, times: Times } {
  const fittings = judgingQueries(db).fittings.all({ unitId: unit.id }).map(spanOf)
  const times = timesOf(millisecondsOf(capturedAt), receivedAt, knownLifeFrom(Date.parse(unit.madeAt), fittings))
  const fitting = fittingFor(fittings, times)
  return { times, place: fitting && judgingQueries(db).axis.get({ id: fitting.row.axisId }) }
}

/**
 * Serial and channel name the unit, the unit's fitting at captured-at names the axis. Units that sit outside the actor's sites
 * are unknown to them.
 */
export function placeFile(db: VaultDb, actor: Actor, file: SettingsFile, receivedAt: number, sentCapturedAt?: string): PlacedFile | UnplacedFile {
  const queries = judgingQueries(db)
  const unit = unitRows(db).bySerial.get({ serial: file.unit.serial, channel: file.unit.channel ?? 0 })
  if (!unit) return unknownSerial(file.unit, queries.channels.all({ serial: file.unit.serial }).map(row => row.channel))
  const { place, times } = placeUnit(db, unit, sentCapturedAt ?? file.exportedAt, receivedAt)
  const siteId = place?.site.id ?? unit.siteId
  if (siteId !== null && !seesSite(actor, siteId)) return unknownSerial(file.unit, [])
  if (!place) return notFitted(unit, times)
  if (place.axis.axisKind !== file.axisKind) {
    return { ok: false, problem: 'axis-kind', siteId: place.site.id, detail: `The file says ${file.axisKind}, ${place.axis.tag} is a ${place.axis.axisKind} axis. Correct the file or the register.` }
  }
  return { ok: true, unit, place, times }
}

const spanOf = (row: FittingRow) => ({ row, from: Date.parse(row.fromAt), to: row.toAt === null ? null : Date.parse(row.toAt) })

function unknownSerial({ serial, channel }: UnitIdentity, registered: readonly (number | null)[]): UnplacedFile {
  const named = channel === undefined ? '' : `, channel ${channel},`
  const others = registered.length === 0 ? '' : ` Channels registered under it: ${registered.map(each => each ?? 'none').join(', ')}.`
  return { ok: false, problem: 'serial-unknown', siteId: null, detail: `No unit ${serial}${named} is registered.${others} Say at which axis it sits.` }
}

function notFitted(unit: UnitRow, times: Times): UnplacedFile {
  const at = new Date(times.orderAt).toISOString()
  return { ok: false, problem: 'not-fitted', siteId: unit.siteId, detail: `Unit ${unit.serial} sat at no axis on ${at.slice(0, 10)} ${at.slice(11, 16)} UTC. Say where it sits.` }
}
