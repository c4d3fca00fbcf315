import { knownStarts, usedRows } from '../motion/chains'
import { plus } from '../motion/exact'
import type { Content } from '../settings/types'

export interface Reach { readonly low: number, readonly high: number }

/**
 * The lowest and the highest place that the moves go to, mm or deg: targets and approaches, and relative moves from where the
 * rows that name them end. Undefined where no place is known, and on a modulo axis, which has no ends.
 */
export function reachOf({ moves, setup }: Content): Reach | undefined {
  if (setup.modulo !== undefined) return undefined
  const rows = usedRows(moves)
  const starts = knownStarts(rows)
  const places = rows.flatMap(({ move }) => move.kind === 'relative'
    ? (starts.get(move.move)?.positions ?? []).map(from => plus(from, move.target))
    : [move.target, ...move.approach === undefined ? [] : [move.approach]])
  return places.length === 0 ? undefined : { low: Math.min(...places), high: Math.max(...places) }
}

/** The longest single step of a relative move, mm or deg; 0 without one. */
export function longestStep({ moves }: Content): number {
  return usedRows(moves).reduce((longest, { move }) => move.kind === 'relative' ? Math.max(longest, Math.abs(move.target)) : longest, 0)
}
