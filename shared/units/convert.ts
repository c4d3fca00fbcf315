import type { Exact } from './exact'
import type { Unit } from './units'

/** The value in the canonical unit of the same dimension: exact, save for radians, where π has 50 digits. Not yet rounded. */
export function toCanonical(value: Exact, from: Unit): Exact {
  return value.times(from.times).div(from.over)
}

/** The inverse of toCanonical: a canonical value in another unit of its dimension; 1/25.4 and the like end after 160 digits. */
export function fromCanonical(value: Exact, to: Unit): Exact {
  return value.times(to.over).div(to.times)
}
