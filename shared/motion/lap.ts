import type { Move } from '../settings/types'
import { minus, plus } from './exact'

/** One round of an endless chain of relative moves, seen from where it starts; mm or deg. */
export interface Lap {
  /** How far the next round starts from this one. */
  readonly net: number
  /** Lowest and highest place on the way, the start (0) counted. */
  readonly low: number
  readonly high: number
}

/** The travel of one round; undefined where a member goes to a place of its own, so that the chain cannot run away. */
export function lapTravel(chain: readonly Move[]): Lap | undefined {
  let net = 0, low = 0, high = 0
  for (const move of chain) {
    if (move.kind !== 'relative') return undefined
    net = plus(net, move.target)
    low = Math.min(low, net)
    high = Math.max(high, net)
  }
  return { net, low, high }
}

/**
 * The first round, counted from 1, that leaves min … max (inclusive). Without a start: from the place that lets it last
 * longest. Infinity where the net travel is 0 and one round fits.
 */
export function lapThatLeaves(lap: Lap, min: number, max: number, start?: number): number {
  if (lap.net < 0) return lapThatLeaves({ net: -lap.net, low: -lap.high, high: -lap.low }, -max, -min, start === undefined ? undefined : -start)
  const from = start ?? minus(min, lap.low)
  const room = minus(minus(max, from), lap.high)
  if (room < 0 || plus(from, lap.low) < min) return 1
  if (lap.net === 0) return Infinity
  return Math.floor(room / lap.net + 1e-9) + 2
}

/** Whether a round of an endless chain takes no time at all: nothing moves and nothing waits. */
export function takesNoTime(chain: readonly Move[]): boolean {
  if (chain.some(move => (move.dwell ?? 0) > 0)) return false
  const places = chain.filter(move => move.kind !== 'relative').map(move => move.target)
  return chain.every(move => move.kind !== 'relative' || move.target === 0)
    && places.every(place => place === places[0])
}
