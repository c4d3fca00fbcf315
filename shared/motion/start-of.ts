import { isUnused } from '../settings/move-fields'
import type { Move } from '../settings/types'

/**
 * The move whose end a move sets off from: the one that names it as its follower, else the one before it in the table.
 * Undefined where neither ends at a place of its own.
 */
export function startOf(move: Move, moves: readonly Move[]): Move | undefined {
  const places = moves.filter(other => other.kind !== 'relative' && !isUnused(other) && other.move !== move.move)
  return places.find(other => other.next === move.move) ?? places.filter(other => other.move < move.move).at(-1)
}
