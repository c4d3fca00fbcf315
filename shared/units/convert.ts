import type { Exact } from './exact'
import type { Unit } from './units'

/** The value in the canonical unit of the same dimension: exact, save for radians, where π has 50 digits. Not yet rounded. */
export function toCanonical(value: Exact, from: Unit): Exact {
  return value.times(from.times).div(from.over)
}
