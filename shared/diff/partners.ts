import type { IndexPair } from './table'

/** Stands for a partner that there is not. */
export const none = -1

/** Partners by index, or `none`: `after[before[i]] === i` wherever there is one. */
export interface Partners { readonly before: Int32Array, readonly after: Int32Array }

/** Two tables of so many rows, not one of them paired. */
export function noPartners(before: number, after: number): Partners {
  return { before: new Int32Array(before).fill(none), after: new Int32Array(after).fill(none) }
}

/** Makes two rows partners, from both sides; either of them must be without one. */
export function join(partners: Partners, i: number, j: number): void {
  partners.before[i] = j
  partners.after[j] = i
}

/**
 * Pairs the k-th with the k-th wherever two neighbouring anchors, or an anchor and an end of the table, have equally many
 * rows between them that are left on both sides. The anchors ascend on both sides.
 */
export function pairBetween(anchors: readonly IndexPair[], partners: Partners): void {
  const ends: readonly IndexPair[] = [...anchors, [partners.before.length, partners.after.length]]
  let from: IndexPair = [-1, -1]
  for (const to of ends) {
    joinEquallyMany(leftBetween(partners.before, from[0], to[0]), leftBetween(partners.after, from[1], to[1]), partners)
    from = to
  }
}

/**
 * As pairBetween, with every pair made so far for an anchor, moved rows too: a row edited inside a moved block. Neighbours
 * are then pairs that have nothing but left rows between them in either table.
 */
export function pairInsideBlocks(partners: Partners): void {
  const { before, after } = partners
  let from = -1
  for (let to = 0; to <= before.length; to += 1) {
    if (before[to] === none) continue
    const otherFrom = from < 0 ? -1 : before[from] as number
    const otherTo = before[to] ?? after.length
    const there = leftBetween(after, otherFrom, otherTo)
    if (there.length === otherTo - otherFrom - 1) joinEquallyMany(leftBetween(before, from, to), there, partners)
    from = to
  }
}

function joinEquallyMany(here: readonly number[], there: readonly number[], partners: Partners): void {
  if (here.length === there.length) here.forEach((i, k) => join(partners, i, there[k] as number))
}

/** The rows without a partner between two indices, both left out. */
function leftBetween(partners: Int32Array, from: number, to: number): number[] {
  const left: number[] = []
  for (let index = from + 1; index < to; index += 1) if (partners[index] === none) left.push(index)
  return left
}
