import { chain } from './chain'
import { Span } from './span'
import type { IndexPair, Table } from './table'

/*
 * Order-keeping alignment of two tables that pairs equal signatures: most pairs; among those most at the same number; then
 * the earliest, row for row. What is certain is settled first, from both ends inwards: a row whose signature the other
 * side lacks has no partner, and two end rows that each best alignment pairs (the first ones: that the earliest best one
 * pairs) are taken off. After an ordinary change next to nothing is left for the search.
 */

/** Pairs of indices, ascending on both sides. `signatures` is how many different ones the two tables have. */
export function align(before: Table, after: Table, signatures: number): IndexPair[] {
  const a = new Span(before, signatures)
  const b = new Span(after, signatures)
  const front: IndexPair[] = []
  const back: IndexPair[] = []
  while (settleFirst(a, b, front) || settleLast(a, b, back));
  return [...front, ...chain(a, b), ...back.reverse()]
}

/**
 * Equal first rows of one number are in every best alignment: any other use of either row gives way to this pair at a gain.
 * Without a row at the same number to lose on either side they are in the earliest one.
 */
function settleFirst(a: Span, b: Span, pairs: IndexPair[]): boolean {
  if (a.isEmpty || b.isEmpty) return false
  const signature = a.signature(a.from)
  const other = b.signature(b.from)
  if (b.count(signature) === 0) a.takeFirst()
  else if (a.count(other) === 0) b.takeFirst()
  else if (signature !== other) return false
  else {
    const here = a.number(a.from)
    const there = b.number(b.from)
    if (here !== there && (b.holds(here, signature) || a.holds(there, signature))) return false
    pairs.push([a.takeFirst(), b.takeFirst()])
  }
  return true
}

/** As settleFirst, but an earlier partner would win: so only at one number, or where neither row has another partner. */
function settleLast(a: Span, b: Span, pairs: IndexPair[]): boolean {
  if (a.isEmpty || b.isEmpty) return false
  const signature = a.signature(a.to - 1)
  const other = b.signature(b.to - 1)
  if (b.count(signature) === 0) a.takeLast()
  else if (a.count(other) === 0) b.takeLast()
  else if (signature !== other) return false
  else {
    const only = a.count(signature) === 1 && b.count(signature) === 1
    if (!only && a.number(a.to - 1) !== b.number(b.to - 1)) return false
    pairs.push([a.takeLast(), b.takeLast()])
  }
  return true
}
