import type { Move } from '../settings/types'
import { minus, remainder } from './exact'

export interface Distance {
  /** Signed, in mm or deg. */
  readonly distance: number
  /** `shortest` asked for just half a turn: either way is as short, and the drive chooses. */
  readonly halfTurn: boolean
}

/**
 * How far a move goes from a place. On a modulo axis as `turn` says: positive 0 … < M, negative −M < … 0, shortest
 * ((t − x + M/2) mod M) − M/2, signed straight on; a relative move goes its distance.
 */
export function distanceOf({ kind, target, turn = 'signed' }: Pick<Move, 'kind' | 'target' | 'turn'>, from: number, modulo?: number): Distance {
  if (kind === 'relative') return { distance: target, halfTurn: false }
  const straight = minus(target, from)
  if (modulo === undefined || turn === 'signed') return { distance: straight, halfTurn: false }
  const onward = remainder(straight, modulo)
  const back = minus(onward, onward === 0 ? 0 : modulo)
  if (turn === 'positive') return { distance: onward, halfTurn: false }
  if (turn === 'negative') return { distance: back, halfTurn: false }
  return { distance: onward < -back ? onward : back, halfTurn: onward === -back && onward !== 0 }
}
