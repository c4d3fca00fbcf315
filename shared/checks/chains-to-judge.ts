import { endlessChains, followers, rowsByNumber, type Row } from '../motion/chains'

/** Rows that run one after the other. */
export interface Chain {
  readonly rows: readonly Row[]
  /** It runs without end; another ends and is looked at as if it began again. */
  readonly endless: boolean
}

/**
 * Endless chains, and those that end, from each row that nobody names on. A chain that leads into an endless one is not told:
 * what it does once counts for nothing against what is done for ever.
 */
export function chainsOf(rows: readonly Row[]): Chain[] {
  const loops = endlessChains(rows)
  const looping = new Set(loops.flat().map(({ move }) => move.move))
  const byNumber = rowsByNumber(rows)
  const named = followers(rows)
  const ending = rows.filter(({ move }) => move.next !== undefined && !named.has(move.move)).flatMap((head): Chain[] => {
    const chain: Row[] = []
    for (let row: Row | undefined = head; row; row = row.move.next === undefined ? undefined : byNumber.get(row.move.next)) {
      if (looping.has(row.move.move)) return []
      chain.push(row)
    }
    return chain.length > 1 ? [{ rows: chain, endless: false }] : []
  })
  return [...loops.map(loop => ({ rows: loop, endless: true })), ...ending]
}

/** Whether chainsOf tells any: so wherever a row names another that is in use, since it is then in a chain or leads into one. */
export function hasChains(rows: readonly Row[]): boolean {
  const byNumber = rowsByNumber(rows)
  return rows.some(({ move }) => move.next !== undefined && byNumber.has(move.next))
}
