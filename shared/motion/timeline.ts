import type { Move } from '../settings/types'
import { distanceOf } from './distance'
import { plus } from './exact'
import { moveTime, profile, type Surroundings } from './profile'
import type { Segment } from './ramp'

/** move: on its way. press: from the approach on. wait: at rest after a move. hold: at rest after a press, pushing. */
export type Part = 'move' | 'press' | 'wait' | 'hold'

/** One segment of a chain and the row that it belongs to; times in seconds from the start of the chain. */
export interface Stretch extends Segment { readonly move: number, readonly part: Part }

/** Several moves over time, one after the other. */
export interface Timeline {
  /** Without gaps from t = 0. */
  readonly stretches: readonly Stretch[]
  readonly from: number
  readonly end: number
  /** Seconds with smoothing and dwells, no press meeting its part. */
  readonly seconds: number
  /** Seconds where each press meets its part right at the approach. */
  readonly least: number
  /** A jerk limit makes it longer than can be told. */
  readonly atLeast: boolean
}

/**
 * Strings the moves of a chain, each from where the one before ends, with smoothing and dwell after each. `around` is what
 * `profile` goes by. Throws 'unused-row' as that does.
 */
export function timeline(chain: readonly Move[], from: number, around: Surroundings = {}): Timeline {
  const stretches: Stretch[] = []
  let place = from, clock = 0, saved = 0
  for (const move of chain) {
    const one = profile(move, place, around)
    const { approachAt = Infinity } = one
    for (const { t0, t1, x0, v0, a } of one.segments) {
      stretches.push({ t0: clock + t0, t1: clock + t1, x0, v0, a, move: move.move, part: t0 < approachAt ? 'move' : 'press' })
    }
    saved += Math.max(0, one.duration - approachAt)
    const moved = clock + one.duration
    const done = clock + moveTime(one, around.setup ?? {}).seconds + (move.dwell ?? 0) / 1000
    if (done > moved) stretches.push({ t0: moved, t1: done, x0: one.end, v0: 0, a: 0, move: move.move, part: move.kind === 'press' ? 'hold' : 'wait' })
    clock = Math.max(moved, done)
    place = one.end
  }
  return { stretches, from, end: place, seconds: clock, least: clock - saved, atLeast: around.setup?.jerk !== undefined }
}

/**
 * Where a chain that is run again and again begins each time: where it ends. Relative moves alone begin anywhere, 0 is
 * taken; any other chain ends at the same place wherever it began, whole turns of a modulo axis aside.
 */
export function lapStart(chain: readonly Move[], modulo?: number): number {
  // What came before a move that ends at its target wherever it began counts for nothing.
  const last = chain.findLastIndex(({ kind, turn = 'signed' }) => kind !== 'relative' && (modulo === undefined || turn === 'signed'))
  return chain.slice(Math.max(0, last)).reduce((place, move) => plus(place, distanceOf(move, place, modulo).distance), 0)
}
