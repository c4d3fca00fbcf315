import { Refusal } from '#shared/errors/refusal'
import type { Content, SettingsFile } from '#shared/settings/types'
import type { SwapSide } from '#shared/swap/types'
import { seesSite, type Actor } from '#server/database/actor'
import { readContent } from '#server/database/content/queries'
import { judgingQueries, type AxisPlace } from '#server/database/judging/queries'
import { knownGoodQueries } from '#server/database/known-good/queries'
import type { VaultDb } from '#server/database/prepared'
import type { SwapRow, UnitRow, VersionRow } from '#server/database/schema'
import { swapQueries } from '#server/database/swap/queries'
import { unitRows } from '#server/database/unit/queries'
import { versionQueries } from '#server/database/version/queries'
import { assertMayGoIn } from '../swaps/make-safe'
import { kitCaseOf, sideOfVersion } from '../swaps/sides'
import { versionRow } from '../versions/read-version'
import { asItStands, fittedTo, fitToUnit, type Fitted } from './fit'
import { kitFile, kitNote } from './kit-file'

/** What a kit brings over, and the unit that it was read from. */
export interface KitSource extends SwapSide { readonly content: Content }

/** All that a kit is made from, in whatever form it is then handed out. */
export interface KitParts {
  readonly place: AxisPlace
  readonly version: VersionRow
  /** The open swap that it is made for. */
  readonly swap: SwapRow | null
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

/**
 * The known-good of an axis, fitted to the registered unit of a serial, or as it stands; while a swap is open what that brings
 * over, for its unit in. Reads only.
 */
export function kitParts(db: VaultDb, actor: Actor, axisId: number, serial: string | undefined, now: string): KitParts {
  return partsOf(db, actor, axisId, serial, now, swapQueries(db).openAtAxis.get({ axisId }))
}

/** As kitParts, for some night to come and a unit that nobody knows yet: whatever swap is open now. */
export function partsToKeep(db: VaultDb, actor: Actor, axisId: number, now: string): KitParts {
  return partsOf(db, actor, axisId, undefined, now, undefined)
}

function partsOf(db: VaultDb, actor: Actor, axisId: number, serial: string | undefined, now: string, swap: SwapRow | undefined): KitParts {
  const place = judgingQueries(db).axis.get({ id: axisId })
  if (!place) throw new Refusal('not-found', 'There is no such axis.')
  const { version, mark } = swap?.sourceVersionId ? ofSwap(db, swap, swap.sourceVersionId) : toRestore(db, axisId)
  const source = { content: readContent(db, version.contentId), ...sideOfVersion(db, version) }
  const { unit, fitted } = swap?.unitInId ? inSwap(db, swap, serial, now) : alone(db, actor, place, version, source, serial, now)
  const note = kitNote({ tag: place.axis.tag, number: version.number, mark, left: fitted.left, warnings: fitted.warnings })
  return { place, version, swap: swap ?? null, mark, source, unit, serial: unit?.serial ?? serial ?? null, fitted, now, file: kitFile(fitted.content, fitted.identity, note, now, actor.name) }
}

type For = Pick<KitParts, 'unit' | 'fitted'>

/** Nothing leaves for another unit than the one that goes in, nor before it fits and its forces are confirmed. */
function inSwap(db: VaultDb, swap: SwapRow, serial: string | undefined, now: string): For {
  const goes = kitCaseOf(db, swap)
  if (!goes) throw new Refusal('no-known-good', 'There is nothing to restore.')
  if (serial !== undefined && serial.toLowerCase() !== goes.unit.serial.toLowerCase()) throw new Refusal('other-unit', `A swap is open here, and ${goes.unit.serial} goes in: the kit is made for that one.`)
  assertMayGoIn(db, swap, goes, now)
  return { unit: goes.unit, fitted: fittedTo(db, goes, now) }
}

function alone(db: VaultDb, actor: Actor, place: AxisPlace, version: VersionRow, { content }: KitSource, serial: string | undefined, now: string): For {
  const unit = registeredUnit(db, actor, serial, version.file.unit.channel)
  return { unit: unit ?? null, fitted: unit ? fitToUnit(db, place, version, unit, now) : asItStands(content, { ...version.file.unit, model: version.model }, serial) }
}

/** What the swap brings over, and the mark that it was chosen by, if that still holds. */
function ofSwap(db: VaultDb, { axisId, sourceMarkId }: SwapRow, versionId: number): ReturnType<typeof toRestore> {
  const inForce = knownGoodQueries(db).inForce.get({ axisId })
  return { version: versionRow(db, versionId), mark: sourceMarkId !== null && inForce?.mark.id === sourceMarkId ? { by: inForce.by, at: inForce.mark.at } : null }
}

/** The known-good in force, else the newest version that is not void. */
function toRestore(db: VaultDb, axisId: number): { version: VersionRow, mark: { by: string, at: string } | null } {
  const inForce = knownGoodQueries(db).inForce.get({ axisId })
  if (inForce?.mark.versionId) return { version: versionRow(db, inForce.mark.versionId), mark: { by: inForce.by, at: inForce.mark.at } }
  const newest = versionQueries(db).current.get({ axisId })
  if (!newest) throw new Refusal('no-known-good', 'This axis was never read: there is nothing to restore. Upload a file of its unit first.')
  return { version: newest, mark: null }
}

/** The unit of this serial, on the channel that the axis had; units of other sites are as unknown as those not registered. */
function registeredUnit(db: VaultDb, actor: Actor, serial: string | undefined, channel: number | undefined): UnitRow | undefined {
  const unit = serial === undefined ? undefined : unitRows(db).bySerial.get({ serial, channel: channel ?? 0 })
  return unit && (unit.siteId === null || seesSite(actor, unit.siteId)) ? unit : undefined
}
