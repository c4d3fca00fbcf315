import type { Content, Move } from '../settings/types'
import { MovePass } from './diff-moves'
import { pushExtraChanges, pushFileChanges, pushSetupChanges, pushZoneChanges } from './diff-values'
import { inOrder } from './order'
import { sidesOf } from './sides'
import type { DiffContext, FieldChange } from './types'
import { walkByNumber } from './walk'

/**
 * The flat reading: rows paired by number, because controllers call moves by number. Sorted by weight, then section, row
 * and field. applyFlat is its inverse; empty for equal contents.
 */
export function diffContents(before: Content, after: Content, context: DiffContext = {}): FieldChange[] {
  const sides = sidesOf(before, after, context)
  const first: FieldChange[] = []
  pushFileChanges(first, sides)
  pushSetupChanges(first, sides, () => movesOfBoth(before, after))
  pushZoneChanges(first, sides)
  const moves = new MovePass(sides)
  walkByNumber<Move>(before.moves, after.moves, move => move.move, (was, i, is, j) => moves.compare(was, i, is, j))
  const last: FieldChange[] = []
  pushExtraChanges(last, sides)
  return inOrder(first, moves.changes(), last)
}

function movesOfBoth(before: Content, after: Content): (readonly [Move, Move])[] {
  const byNumber = new Map(before.moves.map(move => [move.move, move]))
  return after.moves.flatMap((move) => {
    const was = byNumber.get(move.move)
    return was ? [[was, move] as const] : []
  })
}
