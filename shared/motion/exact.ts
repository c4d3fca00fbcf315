/*
 * Sums of settings values without binary noise: 200.1 - 0.1 must be 200, or a span that just fits the stroke would be
 * refused. Values of a settings file are whole millionths, at most 1e9, so that the sums stay exact in a double. Unlike the
 * reader's toMillionths this takes any number: a sum may lie beyond 1e9, and a nameplate's stroke may come from inches.
 */

/** The nearest whole number of millionths; exact where the value has at most six decimals. */
function millionths(value: number): number {
  return Math.floor(value * 1e6 + 0.5)
}

/** a + b, exact for values with at most six decimals. */
export function plus(a: number, b: number): number {
  return (millionths(a) + millionths(b)) / 1e6
}

/** a - b, exact for values with at most six decimals. */
export function minus(a: number, b: number): number {
  return (millionths(a) - millionths(b)) / 1e6
}

/** value mod m, from 0 to below m, for an m above 0; exact for values with at most six decimals. */
export function remainder(value: number, m: number): number {
  const whole = millionths(m)
  return (((millionths(value) % whole) + whole) % whole) / 1e6
}

/** Whether a value that went through roots and products lies above a limit, by more than they lose: 1e-9 of the limit. */
export function isAbove(value: number, limit: number): boolean {
  return value > (Number.isFinite(limit) ? limit + 1e-9 * Math.abs(limit) : limit)
}
