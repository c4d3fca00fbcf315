import type { Sha256 } from '../settings/hash'
import { sameBytes } from './bytes'
import { nodeHash, rangeHash, splitOf, type Hash, type SubtreeHash } from './tree'

/*
 * Proofs that an entry is in the log and that a longer log begins with a shorter one (RFC 9162, sections 2.1.3 and 2.1.4).
 * The verifiers need the hash function and the figures alone, so they run in the browser of someone who distrusts the server.
 */

/** The path of leaf `index` in a tree of `size` leaves, leaf to root (RFC 9162, 2.1.3.1). Throws RangeError where the leaf is not in the tree. */
export function inclusionPath(index: number, size: number, subtree: SubtreeHash, sha256: Sha256): Hash[] {
  if (!inOrder(0, index, size - 1)) throw new RangeError(`Leaf ${index} is not in a tree of ${size}.`)
  const path: Hash[] = []
  let [low, high] = [0, size]
  while (high - low > 1) {
    const middle = low + splitOf(high - low)
    if (index < middle) {
      path.push(rangeHash(middle, high, subtree, sha256))
      high = middle
    }
    else {
      path.push(rangeHash(low, middle, subtree, sha256))
      low = middle
    }
  }
  return path.reverse()
}

/** The path from a tree of `from` leaves to one of `to` (RFC 9162, 2.1.4.1); empty where both are one size or the first is empty. */
export function consistencyPath(from: number, to: number, subtree: SubtreeHash, sha256: Sha256): Hash[] {
  if (!inOrder(0, from, to)) throw new RangeError(`A tree of ${to} leaves does not begin with ${from}.`)
  if (from === 0 || from === to) return []
  const path: Hash[] = []
  let [low, high, whole] = [0, to, true]
  while (high !== from) {
    const middle = low + splitOf(high - low)
    if (from <= middle) {
      path.push(rangeHash(middle, high, subtree, sha256))
      high = middle
    }
    else {
      path.push(rangeHash(low, middle, subtree, sha256))
      low = middle
      whole = false
    }
  }
  if (!whole) path.push(rangeHash(low, high, subtree, sha256))
  return path.reverse()
}

/** Whether `leaf` is leaf `index` of the tree with this root (RFC 9162, 2.1.3.2). Never throws: what makes no sense is not proven. */
export function provesInclusion(leaf: Hash, index: number, size: number, path: readonly Hash[], root: Hash, sha256: Sha256): boolean {
  if (!inOrder(0, index, size - 1) || !areHashes(leaf, root, ...path)) return false
  let [first, last, hash] = [index, size - 1, leaf]
  for (const sibling of path) {
    if (last === 0) return false
    if (isOdd(first) || first === last) {
      hash = nodeHash(sibling, hash, sha256)
      while (!isOdd(first) && first !== 0) [first, last] = [half(first), half(last)]
    }
    else hash = nodeHash(hash, sibling, sha256);
    [first, last] = [half(first), half(last)]
  }
  return last === 0 && sameBytes(hash, root)
}

/** Whether the tree of `to` leaves begins with the tree of `from` (RFC 9162, 2.1.4.2). Never throws: what makes no sense is not proven, nor is anything from an empty tree. */
export function provesConsistency(from: number, to: number, path: readonly Hash[], fromRoot: Hash, toRoot: Hash, sha256: Sha256): boolean {
  // From 1: an empty log is the beginning of every other, so it proves nothing about any of them.
  if (!inOrder(1, from, to)) return false
  if (from === to) return path.length === 0 && sameBytes(fromRoot, toRoot)
  if (!areHashes(fromRoot, toRoot, ...path)) return false
  const [start, ...rest] = isPowerOfTwo(from) ? [fromRoot, ...path] : path
  if (start === undefined) return false
  let [first, last] = [from - 1, to - 1]
  while (isOdd(first)) [first, last] = [half(first), half(last)]
  let [before, after] = [start, start]
  for (const sibling of rest) {
    if (last === 0) return false
    if (isOdd(first) || first === last) {
      before = nodeHash(sibling, before, sha256)
      after = nodeHash(sibling, after, sha256)
      while (!isOdd(first) && first !== 0) [first, last] = [half(first), half(last)]
    }
    else after = nodeHash(after, sibling, sha256);
    [first, last] = [half(first), half(last)]
  }
  return last === 0 && sameBytes(before, fromRoot) && sameBytes(after, toRoot)
}

const inOrder = (...numbers: readonly number[]) => numbers.every((n, i) => Number.isSafeInteger(n) && n >= (numbers[i - 1] ?? n))
const areHashes = (...hashes: readonly Hash[]) => hashes.every(hash => hash.length === 32)
const isOdd = (n: number) => n % 2 === 1
// Not a shift: bit operators cut a size to 32 bits.
const half = (n: number) => Math.floor(n / 2)
const isPowerOfTwo = (n: number) => n === 1 || splitOf(n) * 2 === n
