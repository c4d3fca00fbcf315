import type { Content, Move } from '../settings/types'
import { MovePass } from './diff-moves'
import { pushExtraChanges, pushFileChanges, pushSetupChanges, pushZoneChanges } from './diff-values'
import { byWeight } from './order'
import { sidesOf } from './sides'
import type { DiffContext, FieldChange } from './types'
import { walkByNumber } from './walk'

/**
 * The flat reading: rows paired by number, because controllers call moves by number. Sorted by weight, then section, row
 * and field. applyFlat is its inverse; empty for equal contents.
 */
export function diffContents(before: Content, after: Content, context: DiffContext = {}): FieldChange[] {
  const sides = sidesOf(before, after, context)
  const out: FieldChange[] = []
  pushFileChanges(out, sides)
  pushSetupChanges(out, sides, () => movesOfBoth(before, after))
  pushZoneChanges(out, sides)
  const moves = new MovePass(out, sides)
  walkByNumber<Move>(before.moves, after.moves, move => move.move, (was, i, is, j) => moves.compare(was, i, is, j))
  pushExtraChanges(out, sides)
  return byWeight(out)
}

function movesOfBoth(before: Content, after: Content): (readonly [Move, Move])[] {
  const byNumber = new Map(before.moves.map(move => [move.move, move]))
  return after.moves.flatMap((move) => {
    const was = byNumber.get(move.move)
    return was ? [[was, move] as const] : []
  })
}
