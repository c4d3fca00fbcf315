import { Refusal } from '#shared/errors/refusal'
import type { SettingsFile } from '#shared/settings/types'
import { seesSite, type Actor } from '#server/database/actor'
import { judgingQueries, type AxisPlace } from '#server/database/judging/queries'
import { knownGoodQueries } from '#server/database/known-good/queries'
import type { VaultDb } from '#server/database/prepared'
import type { NameplateRow, UnitRow, VersionRow } from '#server/database/schema'
import { unitRows } from '#server/database/unit/queries'
import { versionQueries } from '#server/database/version/queries'
import { fileOf, versionRow } from '../versions/read-version'
import { asItStands, fitToUnit, type Fitted } from './fit'
import { kitFile, kitNote, type KitSource } from './kit-file'

/** All that a kit is made from, in whatever form it is then handed out. */
export interface KitParts {
  readonly place: AxisPlace
  readonly version: VersionRow
  /** null: no version is known-good, the newest one is given out. */
  readonly mark: { readonly by: string, readonly at: string } | null
  readonly source: KitSource
  /** The registered unit that it is fitted to. */
  readonly unit: UnitRow | null
  readonly serial: string | null
  readonly fitted: Fitted
  readonly file: SettingsFile
  readonly now: string
}

/** The known-good of an axis, fitted to the registered unit of a serial, or as it stands. Reads only. */
export function kitParts(db: VaultDb, actor: Actor, axisId: number, serial: string | undefined, now: string): KitParts {
  const place = judgingQueries(db).axis.get({ id: axisId })
  if (!place) throw new Refusal('not-found', 'There is no such axis.')
  const { version, mark } = toRestore(db, axisId)
  const source = kitSource(db, version)
  const unit = registeredUnit(db, actor, serial, version.file.unit.channel)
  const fitted = unit ? fitToUnit(db, place, source, unit, now) : asItStands(source, version.file.unit, serial)
  const note = kitNote({ tag: place.axis.tag, number: version.number, mark, left: fitted.left, warnings: fitted.warnings })
  return { place, version, mark, source, unit: unit ?? null, serial: serial ?? null, fitted, now, file: kitFile(fitted.content, fitted.identity, note, now, actor.name) }
}

/** The known-good in force, else the newest version that is not void. */
function toRestore(db: VaultDb, axisId: number): { version: VersionRow, mark: { by: string, at: string } | null } {
  const inForce = knownGoodQueries(db).inForce.get({ axisId })
  if (inForce?.mark.versionId) return { version: versionRow(db, inForce.mark.versionId), mark: { by: inForce.by, at: inForce.mark.at } }
  const newest = versionQueries(db).current.get({ axisId })
  if (!newest) throw new Refusal('no-known-good', 'This axis was never read: there is nothing to restore. Upload a file of its unit first.')
  return { version: newest, mark: null }
}

function kitSource(db: VaultDb, version: VersionRow): KitSource {
  const nameplate = newestNameplate(db, unitRows(db).byId.get({ id: version.unitId })?.model ?? version.model)
  const { axisKind, setup, zones, moves, extra } = fileOf(db, version)
  return {
    content: { axisKind, setup, zones, moves, extra }, model: version.model,
    ...(version.firmware === null ? {} : { firmware: version.firmware }), ...(nameplate ? { nameplate: nameplate.nameplate } : {}),
  }
}

const newestNameplate = (db: VaultDb, model: string): NameplateRow | undefined => judgingQueries(db).nameplate.get({ model })

/** The unit of this serial, on the channel that the axis had; units of other sites are as unknown as those not registered. */
function registeredUnit(db: VaultDb, actor: Actor, serial: string | undefined, channel: number | undefined): UnitRow | undefined {
  const unit = serial === undefined ? undefined : unitRows(db).bySerial.get({ serial, channel: channel ?? 0 })
  return unit && (unit.siteId === null || seesSite(actor, unit.siteId)) ? unit : undefined
}
