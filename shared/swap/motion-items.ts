import { endlessChains, followers, rowsByNumber, usedRows, type Row } from '../motion/chains'
import type { Move } from '../settings/types'

/** What a call sets going: the row that is called and those that follow by themselves. */
export interface Called {
  /** In the order in which they run; each once. */
  readonly moves: readonly Move[]
  /** The last names one of them again: it runs until another move is called. */
  readonly endless: boolean
}

/** Every used row that a controller calls, with what follows it; a loop that nothing leads into from its lowest number on. */
export function calledMoves(moves: readonly Move[]): Called[] {
  const rows = usedRows(moves)
  const byNumber = rowsByNumber(rows)
  const led = followers(rows)
  const roots = rows.filter(({ move }) => !led.has(move.move))
  const reached = new Set<number>()
  const calls = roots.map(root => chainFrom(root, byNumber, reached))
  const loops = endlessChains(rows).filter(loop => loop.every(({ move }) => !reached.has(move.move)))
  const all = [...calls, ...loops.flatMap(([first]) => first ? [chainFrom(first, byNumber, reached)] : [])]
  return all.sort((one, other) => (one.moves[0]?.move ?? 0) - (other.moves[0]?.move ?? 0))
}

function chainFrom(root: Row, byNumber: ReadonlyMap<number, Row>, reached: Set<number>): Called {
  const chain: Move[] = []
  const seen = new Set<number>()
  let row: Row | undefined = root
  while (row && !seen.has(row.move.move)) {
    seen.add(row.move.move)
    reached.add(row.move.move)
    chain.push(row.move)
    row = row.move.next === undefined ? undefined : byNumber.get(row.move.next)
  }
  return { moves: chain, endless: row !== undefined }
}
