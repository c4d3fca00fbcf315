import type { ExtraValue } from '../settings/types'
import { Exact } from '../units/exact'
import { fromMillionths, largestNumber, toMillionths } from '../units/number'

/**
 * after − before. Canonical numbers are subtracted as whole millionths, exact; the drive's own (`driveOwn`) as exact
 * decimals, and the nearest double is answered.
 */
export function difference(before: number, after: number, driveOwn: boolean): number {
  if (driveOwn) return new Exact(after).minus(before).toNumber() + 0
  // Whole numbers need no such care: within ±1e9 their difference is exact.
  if (Number.isInteger(before) && Number.isInteger(after) && Math.abs(before) <= largestNumber && Math.abs(after) <= largestNumber) return after - before + 0
  return fromMillionths(toMillionths(after) - toMillionths(before))
}

/** The number in a value, with or without a unit beside it; undefined for words, flags and nothing. */
export function amount(value: ExtraValue | undefined): number | undefined {
  const bare = typeof value === 'object' ? value.value : value
  return typeof bare === 'number' ? bare : undefined
}

/** The unit that stands beside a value of extra; undefined for a bare one. */
export function unitBeside(value: ExtraValue | undefined): string | undefined {
  return typeof value === 'object' ? value.unit : undefined
}

/** Equality of values, `{ value, unit }` by its parts. */
export function sameValue(a: ExtraValue | undefined, b: ExtraValue | undefined): boolean {
  if (a === b) return true
  return typeof a === 'object' && typeof b === 'object' && a.value === b.value && a.unit === b.unit
}
