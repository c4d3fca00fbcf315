import type { RowPair } from './types'

/** Where the rows of the first content went, by number. */
export interface Followers {
  /** The number in the second content of what a follower of the first one called; undefined where that row is gone. */
  readonly mapped: (number: number) => number | undefined
  /** Whether the follower that a move had is the one that its partner has. A number that calls no row on either side stays itself. */
  readonly agree: (was: number | undefined, is: number | undefined) => boolean
}

/** The map that a pairing is, applied to followers. Exchanging the sides of all pairs exchanges the arguments of `agree`. */
export function followersOf(pairs: readonly RowPair[]): Followers {
  const went = new Map<number, number | undefined>()
  const came = new Set<number>()
  for (const { before, after } of pairs) {
    if (before !== undefined) went.set(before, after)
    if (before !== undefined && after !== undefined) came.add(after)
  }
  const mapped = (number: number) => went.get(number)
  return {
    mapped,
    agree: (was, is) => {
      if (was === undefined || is === undefined) return was === is
      return (mapped(was) ?? (came.has(is) ? undefined : was)) === is
    },
  }
}
