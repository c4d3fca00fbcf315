import { knownStarts, usedRows } from '../motion/chains'
import { minus, plus } from '../motion/exact'
import type { Content } from '../settings/types'
import { calledMoves, type Called } from './motion-items'

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

/** A way that is gone wherever it begins. */
export interface Travel { readonly moves: readonly number[], readonly length: number }

/**
 * The longest way of relative moves that a call sets going, from its lowest to its highest place, mm or deg: where it begins
 * nobody knows, and it takes so much room anywhere. Undefined where no call begins with a relative move.
 */
export function longestTravel({ moves }: Pick<Content, 'moves'>): Travel | undefined {
  const ways = calledMoves(moves).map(travelOf).filter(({ length }) => length > 0)
  return ways.reduce<Travel | undefined>((longest, way) => longest && longest.length >= way.length ? longest : way, undefined)
}

function travelOf({ moves }: Called): Travel {
  const placed = moves.findIndex(({ kind }) => kind !== 'relative')
  const run = placed < 0 ? moves : moves.slice(0, placed)
  let place = 0, low = 0, high = 0
  for (const { target } of run) {
    place = plus(place, target)
    low = Math.min(low, place)
    high = Math.max(high, place)
  }
  return { moves: run.map(({ move }) => move), length: minus(high, low) }
}
