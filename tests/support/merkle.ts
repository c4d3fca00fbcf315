import { createHash } from 'node:crypto'

/*
 * RFC 9162, sections 2.1.1, 2.1.3.1 and 2.1.4.1, written down as the document defines them, over whole lists of leaves: the
 * second opinion that the product's own tree is held against.
 */

export const sha256 = (bytes: Uint8Array): Uint8Array => new Uint8Array(createHash('sha256').update(bytes).digest())
export const hex = (bytes: Uint8Array): string => Buffer.from(bytes).toString('hex')
export const bytes = (text: string): Uint8Array => new Uint8Array(Buffer.from(text, 'hex'))

const splitBelow = (n: number) => 2 ** (Math.ceil(Math.log2(n)) - 1)
const node = (left: Uint8Array, right: Uint8Array) => sha256(new Uint8Array([1, ...left, ...right]))

/** MTH(D_n), section 2.1.1. */
export function naiveRoot(leaves: readonly Uint8Array[]): Uint8Array {
  if (leaves.length === 0) return sha256(new Uint8Array())
  if (leaves.length === 1) return sha256(new Uint8Array([0, ...leaves[0]!]))
  const k = splitBelow(leaves.length)
  return node(naiveRoot(leaves.slice(0, k)), naiveRoot(leaves.slice(k)))
}

/** PATH(m, D_n), section 2.1.3.1. */
export function naivePath(m: number, leaves: readonly Uint8Array[]): Uint8Array[] {
  if (leaves.length <= 1) return []
  const k = splitBelow(leaves.length)
  return m < k
    ? [...naivePath(m, leaves.slice(0, k)), naiveRoot(leaves.slice(k))]
    : [...naivePath(m - k, leaves.slice(k)), naiveRoot(leaves.slice(0, k))]
}

/** PROOF(m, D_n) by SUBPROOF, section 2.1.4.1. */
export function naiveProof(m: number, leaves: readonly Uint8Array[], whole = true): Uint8Array[] {
  const n = leaves.length
  if (m === n) return whole ? [] : [naiveRoot(leaves)]
  const k = splitBelow(n)
  return m <= k
    ? [...naiveProof(m, leaves.slice(0, k), whole), naiveRoot(leaves.slice(k))]
    : [...naiveProof(m - k, leaves.slice(k), false), naiveRoot(leaves.slice(0, k))]
}

/** Leaves that differ, in any number. */
export const numberedLeaves = (count: number): Uint8Array[] => Array.from({ length: count }, (_, i) => new TextEncoder().encode(`leaf ${i}`))
