import type { Content } from '../settings/types'
import { countStatements, MovePass } from './diff-moves'
import { pushExtraChanges, pushFileChanges, pushSetupChanges, pushZoneChanges } from './diff-values'
import { followersOf } from './followers'
import { inOrder } from './order'
import { pairRows, type Pairing } from './pair-rows'
import { none } from './partners'
import { pairsInOrder, runsOf } from './runs'
import { sidesOf } from './sides'
import type { DiffContext, FieldChange, RenumberedReading, RowPair } from './types'
import { walkByNumber } from './walk'

/**
 * The renumbered reading: rows paired by what they do. Undefined unless it says less of the moves than the flat one, where a
 * run, an edit, a row added and a row removed are one statement each. `before` and `after` of a follower are numbers of the
 * first and of the second content.
 */
export function diffRenumbered(before: Content, after: Content, context: DiffContext = {}): RenumberedReading | undefined {
  const flat = countStatements(before.moves, after.moves)
  if (flat < 2) return undefined
  const pairing = pairRows(before.moves, after.moves)
  const renumbered = runsOf(before.moves, after.moves, pairing)
  if (renumbered.length === 0 || renumbered.length >= flat) return undefined
  const pairs = pairsInOrder(pairsByNumber(before, after, pairing))
  const { changes, statements } = changesBetween(before, after, pairing, pairs, context)
  return renumbered.length + statements < flat ? { renumbered, pairs, changes } : undefined
}

function pairsByNumber(before: Content, after: Content, pairing: Pairing): RowPair[] {
  const added = after.moves.filter((_, j) => pairing.after[j] === none).map(({ move }) => ({ after: move }))
  return [...added, ...before.moves.map(({ move }, i) => {
    const partner = after.moves[pairing.before[i] ?? none]
    return partner ? { before: move, after: partner.move } : { before: move }
  })]
}

/** The changes, and how many statements those of moves are. */
interface Told { readonly changes: FieldChange[], readonly statements: number }

function changesBetween(before: Content, after: Content, pairing: Pairing, pairs: readonly RowPair[], context: DiffContext): Told {
  const sides = sidesOf(before, after, context)
  const { agree } = followersOf(pairs)
  const first: FieldChange[] = []
  pushFileChanges(first, sides)
  pushSetupChanges(first, sides, () => after.moves.flatMap((is, j) => {
    const was = before.moves[pairing.after[j] ?? none]
    return was ? [[was, is] as const] : []
  }))
  pushZoneChanges(first, sides)
  const moves = new MovePass(sides, agree)
  const gone = before.moves.map((move, i) => ({ move, i })).filter(({ i }) => pairing.before[i] === none)
  walkByNumber(gone, after.moves.map((move, j) => ({ move, i: j })), row => row.move.move, (left, _, row) => {
    if (left) moves.compare(left.move, left.i, undefined, -1)
    if (!row) return
    const i = pairing.after[row.i] ?? none
    moves.compare(before.moves[i], i, row.move, row.i)
  })
  const last: FieldChange[] = []
  pushExtraChanges(last, sides)
  return { changes: inOrder(first, moves.changes(), last), statements: moves.statements }
}
