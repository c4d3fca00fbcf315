import type { Move } from '../settings/types'
import type { Pairing } from './pair-rows'
import { none } from './partners'
import type { Renumbering, RowPair } from './types'

/**
 * Runs of rows that went the same way: neighbours in both tables, rows that have no partner passed over. Sorted by their
 * first number; rows that kept theirs are in none.
 */
export function runsOf(before: readonly Move[], after: readonly Move[], pairing: Pairing): Renumbering[] {
  const runs: { first: number, last: number, by: number, sure: boolean }[] = []
  const follows = neighboursAmongPartners(pairing.after)
  let previous = -1
  for (const [i, { move }] of before.entries()) {
    const j = pairing.before[i] ?? none
    const partner = after[j]
    if (!partner) continue
    const by = partner.move - move
    const run = runs.at(-1)
    const goesOn = run !== undefined && run.last === before[previous]?.move && run.by === by && follows[j] === previous
    if (goesOn) {
      run.last = move
      run.sure ||= pairing.isSure(i)
    }
    else if (by !== 0) runs.push({ first: move, last: move, by, sure: pairing.isSure(i) })
    previous = i
  }
  return runs
}

/** For each row of the second table, the row of the first whose partner comes last before it; -1 for the first of them. */
function neighboursAmongPartners(partners: Int32Array): Int32Array {
  let previous = -1
  return partners.map((i) => {
    const before = previous
    if (i >= 0) previous = i
    return before
  })
}

/**
 * All rows of both tables, by their numbers, in the order of the second; one that is gone directly after the row that it
 * followed in the first.
 */
export function pairsInOrder(pairs: readonly RowPair[]): RowPair[] {
  const first = rowsOf(pairs, 'before')
  const second = rowsOf(pairs, 'after')
  const goneAfter = new Map<RowPair | undefined, RowPair[]>()
  let staying: RowPair | undefined
  for (const pair of first) {
    if (pair.after !== undefined) staying = pair
    else goneAfter.set(staying, [...goneAfter.get(staying) ?? [], pair])
  }
  return [...goneAfter.get(undefined) ?? [], ...second.flatMap(pair => [pair, ...goneAfter.get(pair) ?? []])]
}

/** The pairs that have a row in one of the tables, by its number there: the k-th is the row of index k. */
export function rowsOf(pairs: readonly RowPair[], side: 'before' | 'after'): RowPair[] {
  return pairs.filter(pair => pair[side] !== undefined).sort((a, b) => (a[side] ?? 0) - (b[side] ?? 0))
}
