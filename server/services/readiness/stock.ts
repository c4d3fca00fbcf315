import { fitsTonight } from '#shared/swap/spares'
import type { VaultDb } from '#server/database/prepared'
import type { UnitRow } from '#server/database/schema'
import { termsStamp } from '#server/database/judging/terms'
import { spareUnits } from '#server/database/unit/queries'
import { fitCase, judgeKit, kitCase, placeOf } from '../swaps/sides'
import { versionRow } from '../versions/read-version'

/** An axis as far as a spare for it is concerned. */
export interface Wanting {
  readonly axisId: number
  readonly axisRev: number
  readonly siteId: number
  /** Of the unit that is fitted, else of the one that the current version was read from; null = nobody knows. */
  readonly model: string | null
  /** What it would be restored to; null = nothing. */
  readonly versionId: number | null
}

/** Whether a spare in stock fits, among those that lie at the axis' site or at none in particular. */
export interface Stock { readonly fits: (axis: Wanting) => boolean }

/** Reckoned once for a version and a unit, as long as nothing that the rules go by changes. */
const reckoned = new WeakMap<VaultDb, Map<string, boolean>>()
/** How many are kept in mind; beyond, it begins anew. */
const most = 100_000
/** How many are reckoned for one answer: two milliseconds each, and others wait. Those left over count as lacking until the next one. */
const atOnce = 150

/**
 * Spares are read once for all axes that are looked at. One of the axis' own model fits: the values were judged for it. Any other
 * must be a fit of the swap's own rules, rescaled or not, that nobody has to give leave for.
 */
export function readStock(db: VaultDb, now: string): Stock {
  const spares = spareUnits(db)
  const known = reckoned.get(db) ?? new Map<string, boolean>()
  if (known.size > most) known.clear()
  reckoned.set(db, known)
  const stamp = `${termsStamp(db)} ${now.slice(0, 10)}`
  let left = atOnce
  const other = (axis: Wanting, unit: UnitRow): boolean => {
    if (axis.versionId === null) return false
    const key = `${axis.versionId} ${axis.axisRev} ${unit.id} ${unit.rev} ${stamp}`
    const answer = known.get(key)
    if (answer !== undefined) return answer
    if (left === 0) return false
    left -= 1
    const one = kitCase(db, placeOf(db, axis.axisId), versionRow(db, axis.versionId), unit, { replaced: 'unit', putBack: false, facts: {} })
    const fits = fitsTonight(fitCase(db, one, judgeKit(db, one), now))
    known.set(key, fits)
    return fits
  }
  return {
    fits: (axis) => {
      const near = spares.filter(({ siteId }) => siteId === null || siteId === axis.siteId)
      return near.some(({ model }) => model === axis.model) || oneOfEachModel(near).some(unit => other(axis, unit))
    },
  }
}

/** Units of one model fit alike; the first stands for them. */
function oneOfEachModel(units: readonly UnitRow[]): UnitRow[] {
  return [...new Map(units.toReversed().map(unit => [unit.model, unit])).values()]
}
