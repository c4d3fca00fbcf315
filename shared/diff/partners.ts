import type { IndexPair } from './table'

/** Partners by index, -1 for none: `after[before[i]] === i` wherever there is one. */
export interface Partners { readonly before: Int32Array, readonly after: Int32Array }

export function noPartners(before: number, after: number): Partners {
  return { before: new Int32Array(before).fill(-1), after: new Int32Array(after).fill(-1) }
}

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
  let start = 0
  while (start < before.length) {
    if (before[start] !== -1) { start += 1; continue }
    let end = start
    while (end < before.length && before[end] === -1) end += 1
    const from = start === 0 ? 0 : before[start - 1]! + 1
    const to = end === before.length ? after.length : before[end]!
    const facing = indicesBetween(from - 1, to)
    if (facing.every((j) => after[j] === -1)) joinEquallyMany(indicesBetween(start - 1, end), facing, partners)
    start = end
  }
}

function joinEquallyMany(here: readonly number[], there: readonly number[], partners: Partners): void {
  if (here.length === there.length) here.forEach((i, k) => join(partners, i, there[k]!))
}

function leftBetween(partners: Int32Array, from: number, to: number): number[] {
  return indicesBetween(from, to).filter((index) => partners[index] === -1)
}

/** Whole numbers between two bounds, both left out; none where the second is not beyond the first. */
function indicesBetween(from: number, to: number): number[] {
  return Array.from({ length: Math.max(0, to - from - 1) }, (_, k) => from + 1 + k)
}
