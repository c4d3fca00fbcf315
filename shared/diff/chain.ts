import type { Span } from './span'
import type { IndexPair } from './table'

/*
 * The best chain of matches, searched over the matches alone: r matches among m rows cost r·log m, where a full table would
 * cost n·m whatever the rows hold. A pair is worth `pair` points and one more at the same number; no chain has enough
 * pairs for those extra points to outweigh a pair.
 */

const pair = 4096

/** The best alignment of two spans; among equally good ones the first in the order of their pairs, row for row. */
export function chain(a: Span, b: Span): IndexPair[] {
  if (a.isEmpty || b.isEmpty) return []
  const columns = columnsBySignature(b)
  const rows: { readonly i: number, readonly columns: readonly number[], readonly scores: Float64Array }[] = []
  const bestFrom = new BestFrom(b.from, b.to)
  for (let i = a.to - 1; i >= a.from; i -= 1) {
    const matches = columns.get(a.signature(i))
    if (!matches) continue
    const scores = new Float64Array(matches.length)
    for (let k = 0; k < matches.length; k += 1) {
      const j = matches[k] as number
      const score = worth(a, i, b, j) + bestFrom.beyond(j)
      scores[k] = score
      // At once, since the columns ascend: the queries to come look beyond this one only.
      bestFrom.raise(j, score)
    }
    rows.push({ i, columns: matches, scores })
  }
  return firstBest(rows.reverse(), b.from, bestFrom.beyond(b.from - 1), (i, j) => worth(a, i, b, j))
}

function worth(a: Span, i: number, b: Span, j: number): number {
  return a.number(i) === b.number(j) ? pair + 1 : pair
}

function columnsBySignature(b: Span): Map<number, number[]> {
  const columns = new Map<number, number[]>()
  for (let j = b.from; j < b.to; j += 1) {
    const known = columns.get(b.signature(j))
    if (known) known.push(j)
    else columns.set(b.signature(j), [j])
  }
  return columns
}

/** Walks the matches in order and takes each from which a chain worth the whole rest begins. */
function firstBest(
  rows: readonly { readonly i: number, readonly columns: readonly number[], readonly scores: Float64Array }[],
  firstColumn: number, best: number, worthOf: (i: number, j: number) => number,
): IndexPair[] {
  const taken: IndexPair[] = []
  let rest = best
  let from = firstColumn
  for (const { i, columns, scores } of rows) {
    const k = columns.findIndex((j, index) => j >= from && scores[index] === rest)
    if (k < 0) continue
    const j = columns[k] as number
    taken.push([i, j])
    rest -= worthOf(i, j)
    from = j + 1
  }
  return taken
}

/** Highest score at or beyond a column, by a binary indexed tree over the columns counted from the end. */
class BestFrom {
  private readonly tree: Float64Array

  constructor(from: number, private readonly to: number) {
    this.tree = new Float64Array(to - from + 1)
  }

  beyond(column: number): number {
    let best = 0
    for (let slot = this.to - 1 - column; slot > 0; slot -= slot & -slot) best = Math.max(best, this.tree[slot] as number)
    return best
  }

  raise(column: number, score: number): void {
    for (let slot = this.to - column; slot < this.tree.length; slot += slot & -slot) this.tree[slot] = Math.max(this.tree[slot] as number, score)
  }
}
