import type { Sha256 } from '../settings/hash'

/*
 * The hash tree over the log, as RFC 9162, section 2.1 defines it: a leaf is hashed behind the byte 0, an inner node behind
 * the byte 1, a tree of n leaves splits at the largest power of two below n. Hashes are 32 bytes.
 */

export type Hash = Uint8Array

/** Answers the hash of the complete subtree over the leaves from index · 2^level up to (index + 1) · 2^level; level 0 = the leaf itself. */
export type SubtreeHash = (level: number, index: number) => Hash

const encoder = new TextEncoder()

/** SHA-256(0 ‖ leaf), RFC 9162, section 2.1.1: the byte keeps a leaf from passing for an inner node. A text is hashed as UTF-8. */
export function leafHash(leaf: string | Uint8Array, sha256: Sha256): Hash {
  const bytes = typeof leaf === 'string' ? encoder.encode(leaf) : leaf
  const input = new Uint8Array(bytes.length + 1)
  input.set(bytes, 1)
  return sha256(input)
}

/** SHA-256(1 ‖ left ‖ right), RFC 9162, section 2.1.1. */
export function nodeHash(left: Hash, right: Hash, sha256: Sha256): Hash {
  const input = new Uint8Array(65)
  input[0] = 1
  input.set(left, 1)
  input.set(right, 33)
  return sha256(input)
}

/** The hash of a tree without leaves: SHA-256 of nothing (RFC 9162, section 2.1.1). */
export const emptyRoot = (sha256: Sha256): Hash => sha256(new Uint8Array(0))

/** The largest power of two below n, for n > 1: where a tree of n leaves splits. Exact up to 2^53. */
export function splitOf(n: number): number {
  let k = 1
  while (k * 2 < n) k *= 2
  return k
}

/** A tree that only grows at its right edge: it holds one hash for each 1 in the binary form of its size, never the leaves. */
export interface GrowingTree {
  readonly size: () => number
  readonly append: (leaf: Hash) => void
  /** The root over all leaves so far. */
  readonly root: () => Hash
}

/** Begins empty. `completed` hears of each subtree that a leaf completes, the leaf itself included, lowest level first. */
export function growingTree(sha256: Sha256, completed: (level: number, index: number, hash: Hash) => void = () => {}): GrowingTree {
  const edge: { level: number, hash: Hash }[] = []
  let size = 0
  return {
    size: () => size,
    append: (leaf) => {
      let [level, hash, index] = [0, leaf, size]
      completed(level, index, hash)
      for (let left = edge.at(-1); left?.level === level; left = edge.at(-1)) {
        edge.pop()
        hash = nodeHash(left.hash, hash, sha256)
        level += 1
        index = (index - 1) / 2
        completed(level, index, hash)
      }
      edge.push({ level, hash })
      size += 1
    },
    root: () => edge.length === 0 ? emptyRoot(sha256) : edge.map(({ hash }) => hash).reduceRight((right, left) => nodeHash(left, right, sha256)),
  }
}

/** The root of the first `size` leaves, from the hashes of complete subtrees; it asks for at most one a binary digit of `size`. */
export function rootOf(size: number, subtree: SubtreeHash, sha256: Sha256): Hash {
  return size === 0 ? emptyRoot(sha256) : rangeHash(0, size, subtree, sha256)
}

/** The hash over the leaves from `low` up to `high`, as a tree of n leaves has them below one node: `low` is a multiple of its left part. */
export function rangeHash(low: number, high: number, subtree: SubtreeHash, sha256: Sha256): Hash {
  const count = high - low
  if (count === 1) return subtree(0, low)
  const half = splitOf(count)
  if (half * 2 === count) return subtree(levelOf(count), low / count)
  return nodeHash(rangeHash(low, low + half, subtree, sha256), rangeHash(low + half, high, subtree, sha256), sha256)
}

/** k of 2^k; only for powers of two. */
function levelOf(power: number): number {
  let level = 0
  for (let rest = power; rest > 1; rest /= 2) level += 1
  return level
}
