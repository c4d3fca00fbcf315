import { minus } from '../motion/exact'
import type { Content, SetupFieldName } from '../settings/types'

/** Soft limits as written, whether active or not; mm or deg. */
export interface SoftLimits {
  readonly min?: number
  readonly max?: number
  /** Names of those that are not given. */
  readonly missing: readonly SetupFieldName[]
}

/** The soft limits that places are held against. */
export function softLimits({ setup }: Content): SoftLimits {
  const missing: SetupFieldName[] = []
  if (setup.softLimitMin === undefined) missing.push('softLimitMin')
  if (setup.softLimitMax === undefined) missing.push('softLimitMax')
  return { min: setup.softLimitMin, max: setup.softLimitMax, missing }
}

/** A modulo axis whose limits are off, or that has none: it turns on and on, so that no place is out of reach. */
export function turnsFreely({ setup }: Content): boolean {
  if (setup.modulo === undefined) return false
  const given = setup.softLimitMin !== undefined || setup.softLimitMax !== undefined
  return !(setup.softLimitsActive ?? given)
}

/** A soft limit and how far a place lies beyond it. */
export interface Beyond { readonly limit: number, readonly beyond: number, readonly field: SetupFieldName }

/** The soft limit that a place lies beyond; undefined on the limit, inside, or where that limit is not given. */
export function beyondLimit(place: number, { min, max }: SoftLimits): Beyond | undefined {
  if (max !== undefined && place > max) return { limit: max, beyond: minus(place, max), field: 'softLimitMax' }
  if (min !== undefined && place < min) return { limit: min, beyond: minus(min, place), field: 'softLimitMin' }
  return undefined
}
