import type { Move } from '../settings/types'
import type { Row, Starts } from './chains'
import { profile, type Profile, type Surroundings } from './profile'

/** One way in which a row may be driven. */
export interface Way {
  readonly profile: Profile
  /** The start, or the length of a relative move, is known; else the profile reaches the speed that is asked, wherever it starts. */
  readonly known: boolean
  /** The profile lies where the axis is; else only its length and its times mean something. */
  readonly placed: boolean
}

/**
 * The ways of a used row: from each known start; where a row that names it ends nobody knows where, or nobody names it,
 * in both directions (a press only towards its target, a modulo axis as `turn` says) at the speed asked. Relative moves
 * have one length from everywhere. Moves of no length have none.
 */
export function waysOf({ move }: Row, starts: Starts | undefined, around: Surroundings = {}): Way[] {
  const positions = starts?.positions ?? []
  const known = positions.map((from): Way => ({ profile: profile(move, from, around), known: true, placed: true }))
  const open = positions.length === 0 || (starts?.open ?? true)
  const elsewhere = !open ? [] : move.kind === 'relative' ? [{ profile: profile(move, 0, around), known: true, placed: false }] : runUps(move, around)
  return [...known, ...elsewhere].filter(way => way.profile.duration > 0)
}

/** Profiles to the target that start far enough off to reach the speed asked, a hair more against lost digits. */
function runUps(move: Move, around: Surroundings): Way[] {
  const { speed, acceleration, deceleration = acceleration } = move
  const straight: Move = move.turn === undefined ? move : { ...move, turn: 'signed' }
  const until = move.kind === 'press' ? move.approach ?? move.target : move.target
  const runUp = (speed ** 2 / (2 * acceleration) + speed ** 2 / (2 * deceleration)) * (1 + 1e-9) + 1e-6
  return directions(move).map(direction => ({ profile: profile(straight, until - direction * runUp, around), known: false, placed: true }))
}

function directions({ kind, target, approach, turn }: Move): (1 | -1)[] {
  if (kind === 'press' && approach !== undefined && approach !== target) return [target > approach ? 1 : -1]
  return turn === 'positive' ? [1] : turn === 'negative' ? [-1] : [1, -1]
}
