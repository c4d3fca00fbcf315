import type { Move } from '../settings/types'
import { align } from './align'
import { join, none, noPartners, pairBetween, pairInsideBlocks, type Partners } from './partners'
import { classify, compareSignatures } from './signature'
import { wholeNumbers, type Table } from './table'

/** Two tables paired, with what tells whether a pair is sure. */
export interface Pairing extends Partners {
  /** True where the row does what its partner does and no other row of either table does that. */
  readonly isSure: (beforeIndex: number) => boolean
}

/**
 * Pairs rows by what they do, in five steps: (1) order-keeping alignment; (2) signatures left exactly once on both sides;
 * (3) between neighbouring anchors with equally many rows left on both sides the k-th with the k-th; (4) what is left by
 * number; (5) the rest has no partner. Exchanging the tables exchanges the partners and nothing else.
 */
export function pairRows(before: readonly Move[], after: readonly Move[]): Pairing {
  const known = classify(before, after)
  const a = tableOf(before, known.before)
  const b = tableOf(after, known.after)
  const partners = comesLater(before, after) ? turned(pairTables(b, a, known.count)) : pairTables(a, b, known.count)
  const counts = [countsOf(a, known.count), countsOf(b, known.count)] as const
  return {
    ...partners,
    isSure: (i) => {
      const signature = a.signatures[i] as number
      return b.signatures[partners.before[i] ?? none] === signature && counts.every(count => count[signature] === 1)
    },
  }
}

function pairTables(a: Table, b: Table, signatures: number): Partners {
  const partners = noPartners(a.numbers.length, b.numbers.length)
  const anchors = align(a, b, signatures)
  for (const [i, j] of anchors) join(partners, i, j)
  pairLeftOnce(a, b, signatures, partners)
  pairInsideBlocks(partners)
  pairBetween(anchors, partners)
  pairByNumber(a, b, partners)
  return partners
}

function pairLeftOnce(a: Table, b: Table, signatures: number, partners: Partners): void {
  const here = leftBySignature(a, partners.before, signatures)
  const there = leftBySignature(b, partners.after, signatures)
  for (let signature = 0; signature < signatures; signature += 1) {
    const i = here[signature] as number
    const j = there[signature] as number
    if (i >= 0 && j >= 0) join(partners, i, j)
  }
}

const several = -2

/** By signature the index of the one row without a partner that has it. */
function leftBySignature(table: Table, partners: Int32Array, signatures: number): Int32Array {
  const left = new Int32Array(signatures).fill(none)
  for (const [index, signature] of table.signatures.entries()) {
    if (partners[index] === none) left[signature] = left[signature] === none ? index : several
  }
  return left
}

function pairByNumber(a: Table, b: Table, partners: Partners): void {
  let j = 0
  for (const [i, number] of a.numbers.entries()) {
    while ((b.numbers[j] ?? Infinity) < number) j += 1
    if (b.numbers[j] === number && partners.before[i] === none && partners.after[j] === none) join(partners, i, j)
  }
}

function tableOf(moves: readonly Move[], signatures: Int32Array): Table {
  return { numbers: wholeNumbers(moves, move => move.move), signatures }
}

function countsOf(table: Table, signatures: number): Int32Array {
  const counts = new Int32Array(signatures)
  for (const signature of table.signatures) counts[signature] = counts[signature] as number + 1
  return counts
}

/**
 * An order of tables. Two alignments can be equally good and each the earlier one from its own side; taking the tables in
 * one order, whichever was named first, is what makes a reading the exact inverse of the one the other way round.
 */
function comesLater(before: readonly Move[], after: readonly Move[]): boolean {
  for (const [index, was] of before.entries()) {
    const is = after[index]
    if (!is) return true
    const order = was.move - is.move || compareSignatures(was, is)
    if (order !== 0) return order > 0
  }
  return false
}

function turned({ before, after }: Partners): Partners {
  return { before: after, after: before }
}
