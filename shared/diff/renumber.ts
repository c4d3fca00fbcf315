import type { Content } from '../settings/types'
import { countMoveChanges, MovePass } from './diff-moves'
import { pushExtraChanges, pushFileChanges, pushSetupChanges } from './diff-values'
import { pushZoneChanges } from './diff-zones'
import { followersOf } from './followers'
import { byWeight } from './order'
import { pairRows, type Pairing } from './pair-rows'
import { pairsInOrder, runsOf } from './runs'
import { sidesOf } from './sides'
import type { DiffContext, FieldChange, RenumberedReading, RowPair } from './types'
import { walkByNumber } from './walk'

/**
 * The renumbered reading: rows paired by what they do. Undefined unless it says less than the flat one, runs and changes of
 * moves counted together (the other sections read alike in both). `before` and `after` of a follower are numbers of the first and the second content.
 */
export function diffRenumbered(before: Content, after: Content, context: DiffContext = {}): RenumberedReading | undefined {
  const flat = countMoveChanges(before.moves, after.moves)
  if (flat < 2) return undefined
  const pairing = pairRows(before.moves, after.moves)
  const renumbered = runsOf(before.moves, after.moves, pairing)
  if (renumbered.length === 0 || renumbered.length >= flat) return undefined
  const pairs = pairsInOrder(pairsByNumber(before, after, pairing))
  const changes = changesBetween(before, after, pairing, pairs, context)
  const ofMoves = changes.filter((change) => change.section === 'move').length
  return renumbered.length + ofMoves < flat ? { renumbered, pairs, changes } : undefined
}

function pairsByNumber(before: Content, after: Content, pairing: Pairing): RowPair[] {
  const added = after.moves.filter((_, j) => pairing.after[j]! < 0).map(({ move }) => ({ after: move }))
  return [...added, ...before.moves.map(({ move }, i) => {
    const partner = after.moves[pairing.before[i]!]
    return partner ? { before: move, after: partner.move } : { before: move }
  })]
}

function changesBetween(before: Content, after: Content, pairing: Pairing, pairs: readonly RowPair[], context: DiffContext): FieldChange[] {
  const sides = sidesOf(before, after, context)
  const { agree } = followersOf(pairs)
  const out: FieldChange[] = []
  pushFileChanges(out, sides)
  pushSetupChanges(out, sides, () => after.moves.flatMap((is, j) => {
    const was = before.moves[pairing.after[j]!]
    return was ? [[was, is] as const] : []
  }))
  pushZoneChanges(out, sides)
  const moves = new MovePass(out, sides, agree)
  const gone = before.moves.map((move, i) => ({ move, i })).filter(({ i }) => pairing.before[i]! < 0)
  walkByNumber(gone, after.moves.map((move, j) => ({ move, i: j })), (row) => row.move.move, (left, _, row) => {
    if (left) moves.compare(left.move, left.i, undefined, -1)
    if (row) moves.compare(before.moves[pairing.after[row.i]!], pairing.after[row.i]!, row.move, row.i)
  })
  pushExtraChanges(out, sides)
  return byWeight(out)
}
