import type { SwapSpares } from '#shared/api/swaps'
import { rankSpares, type RankedSpare } from '#shared/swap/spares'
import type { FitAnswer } from '#shared/swap/fit'
import type { Vault } from '#server/database/client'
import type { AxisPlace } from '#server/database/judging/queries'
import type { VaultDb } from '#server/database/prepared'
import type { UnitRow, VersionRow } from '#server/database/schema'
import { swapQueries } from '#server/database/swap/queries'
import { spareUnits } from '#server/database/unit/queries'
import { versionRow } from '../versions/read-version'
import { unitOnWire } from './read-swap'
import { fitCase, judgeKit, kitCase, placeOf, type Goes, type SwapKitCase } from './sides'

/*
 * What "a spare in stock that fits" means, in one place: the finder of a swap ranks by it, readiness asks whether there is one.
 */

/** In stock for an axis: what lies at its site, or at none in particular. */
export const liesFor = (unit: Pick<UnitRow, 'siteId'>, siteId: number): boolean => unit.siteId === null || unit.siteId === siteId

/** Units of one kind fit alike. Another than the one that the values were read from: that one has them as its own. */
export const kindOf = ({ model, firmware, actuatorModel }: Pick<UnitRow, 'model' | 'firmware' | 'actuatorModel'>): string => JSON.stringify([model, firmware, actuatorModel])

export interface Tried { readonly one: SwapKitCase, readonly answer: FitAnswer }

/** Whether a unit fits, by all rules of a swap as of `now`. */
export function tried(db: VaultDb, place: AxisPlace, version: VersionRow, unit: UnitRow, goes: Goes, now: string): Tried {
  const one = kitCase(db, place, version, unit, goes)
  return { one, answer: fitCase(db, one, judgeKit(db, one), now) }
}

interface Spare extends RankedSpare { readonly unit: UnitRow, readonly hard: boolean }

/** Spares in stock for what an axis would be restored to, best first. */
export function sparesFor(db: VaultDb, axisId: number, version: VersionRow, goes: Goes, now: string): Spare[] {
  const place = placeOf(db, axisId)
  const known = new Map<string, Tried>()
  const of = (unit: UnitRow): Tried => {
    const kind = unit.id === version.unitId ? 'own' : kindOf(unit)
    const found = known.get(kind) ?? tried(db, place, version, unit, goes, now)
    known.set(kind, found)
    return found
  }
  return rankSpares(spareUnits(db).filter(unit => liesFor(unit, place.site.id)).map((unit): Spare => {
    const { one: { kit, carry: { out, into } }, answer: { fit, reasons } } = of(unit)
    return {
      unit, fit, reasons, adjusted: kit.adjustments.length, sameModel: out.model === into.model, sameFirmware: out.firmware !== undefined && out.firmware === into.firmware,
      near: unit.siteId === place.site.id && unit.location !== '', serial: unit.serial, hard: reasons.some(reason => reason.hard),
    }
  }))
}

/** How many the finder tells of: beyond, the shelf is to be looked at by its list. */
const most = 500

/** Spares for an open swap; none where only the actuator is changed, since actuators are not kept on their own. */
export function listSpares(vault: Vault, id: number): SwapSpares {
  const { db } = vault
  const row = swapQueries(db).byId.get({ id })
  if (!row || row.sourceVersionId === null || row.replaced === 'actuator') return { items: [] }
  const found = sparesFor(db, row.axisId, versionRow(db, row.sourceVersionId), { ...row, putBack: false }, vault.now()).slice(0, most)
  return {
    items: found.flatMap(({ unit, reasons, fit, hard, adjusted, sameModel, sameFirmware }) => {
      const shown = unitOnWire(db, unit.id)
      return shown ? [{ unit: shown, fit, hard, reasons: reasons.map(reason => ({ ...reason, at: [...reason.at] })), adjusted, sameModel, sameFirmware }] : []
    }),
  }
}
