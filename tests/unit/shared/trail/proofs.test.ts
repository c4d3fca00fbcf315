import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { consistencyPath, inclusionPath, provesConsistency, provesInclusion } from '../../../../shared/trail/proofs'
import { growingTree, leafHash, nodeHash, type Hash, type SubtreeHash } from '../../../../shared/trail/tree'
import { bytes, hex, naivePath, naiveProof, naiveRoot, numberedLeaves, sha256 } from '../../../support/merkle'

const leaves = numberedLeaves(1025)
const hashes = leaves.map(leaf => leafHash(leaf, sha256))
const kept = new Map<string, Hash>()
const tree = growingTree(sha256, (level, index, hash) => kept.set(`${level}/${index}`, hash))
for (const hash of hashes) tree.append(hash)
const subtree: SubtreeHash = (level, index) => kept.get(`${level}/${index}`)!
const roots = new Map<number, Hash>()
const root = (size: number): Hash => roots.get(size) ?? (roots.set(size, naiveRoot(leaves.slice(0, size))), roots.get(size)!)

const size = fc.integer({ min: 1, max: 1025 })
const places = size.chain(n => fc.record({ n: fc.constant(n), m: fc.integer({ min: 0, max: n - 1 }) }))
const flipped = (hash: Hash, bit: number): Hash => hash.map((byte, i) => i === bit >> 3 ? byte ^ (1 << (bit & 7)) : byte)

describe('the published paths', () => {
  // The seven leaves of RFC 9162, section 2.1.5: their paths by the names of the figure there.
  const seven = leaves.slice(0, 7)
  const [, b, c, d, , f, j] = hashes.slice(0, 7) as [Hash, Hash, Hash, Hash, Hash, Hash, Hash]
  const over = (from: number, to: number) => naiveRoot(seven.slice(from, to))
  const [g, h, i, k, l] = [over(0, 2), over(2, 4), over(4, 6), over(0, 4), over(4, 7)]
  it.each([
    ['d0 is [b, h, l]', 0, [b, h, l]],
    ['d3 is [c, g, l]', 3, [c, g, l]],
    ['d4 is [f, j, k]', 4, [f, j, k]],
    ['d6 is [i, k]', 6, [i, k]],
  ])('inclusion: %s', (_, leaf, path) => {
    expect(inclusionPath(leaf, 7, subtree, sha256).map(hex)).toEqual(path.map(hex))
  })
  it.each([
    ['of 3 and 7 is [c, d, g, l]', 3, [c, d, g, l]],
    ['of 4 and 7 is [l]', 4, [l]],
    ['of 6 and 7 is [i, j, k]', 6, [i, j, k]],
  ])('consistency: %s', (_, from, path) => {
    expect(consistencyPath(from, 7, subtree, sha256).map(hex)).toEqual(path.map(hex))
  })
})

describe('inclusion', () => {
  it('is the path of the definition, and proves', () => {
    fc.assert(fc.property(places, ({ n, m }) => {
      const path = inclusionPath(m, n, subtree, sha256)
      expect(path.map(hex)).toEqual(naivePath(m, leaves.slice(0, n)).map(hex))
      expect(provesInclusion(hashes[m]!, m, n, path, root(n), sha256)).toBe(true)
    }), { numRuns: 150 })
  })
  it('holds for every leaf of every tree up to 40', () => {
    for (let n = 1; n <= 40; n += 1) {
      for (let m = 0; m < n; m += 1) expect(provesInclusion(hashes[m]!, m, n, inclusionPath(m, n, subtree, sha256), root(n), sha256), `${m} of ${n}`).toBe(true)
    }
  })
  it('fails on every single bit of leaf, root and path', () => {
    const [m, n] = [11, 21]
    const path = inclusionPath(m, n, subtree, sha256)
    for (let bit = 0; bit < 256; bit += 1) {
      expect(provesInclusion(flipped(hashes[m]!, bit), m, n, path, root(n), sha256)).toBe(false)
      expect(provesInclusion(hashes[m]!, m, n, path, flipped(root(n), bit), sha256)).toBe(false)
      for (const step of path.keys()) expect(provesInclusion(hashes[m]!, m, n, path.map((hash, i) => i === step ? flipped(hash, bit) : hash), root(n), sha256)).toBe(false)
    }
  })
  it('fails for another place, and for a path too long or too short', () => {
    const path = inclusionPath(11, 21, subtree, sha256)
    const proves = (index: number, of: number, by: readonly Hash[]) => provesInclusion(hashes[11]!, index, of, by, root(21), sha256)
    for (let index = 0; index < 21; index += 1) expect(proves(index, 21, path)).toBe(index === 11)
    expect(proves(11, 21, path.slice(1))).toBe(false)
    expect(proves(11, 21, path.slice(0, -1))).toBe(false)
    expect(proves(11, 21, [...path, root(3)])).toBe(false)
    expect(proves(11, 10, path)).toBe(false)
    expect(proves(-1, 21, path)).toBe(false)
    expect(proves(0.5, 21, path)).toBe(false)
    expect(proves(Number.NaN, 21, path)).toBe(false)
  })
  it('refuses to make a path for a leaf that is not there', () => {
    expect(() => inclusionPath(21, 21, subtree, sha256)).toThrow('Leaf 21 is not in a tree of 21.')
    expect(() => inclusionPath(0, 0, subtree, sha256)).toThrow(RangeError)
    expect(() => inclusionPath(-1, 3, subtree, sha256)).toThrow(RangeError)
  })
})

describe('consistency', () => {
  const pairs = size.chain(to => fc.record({ to: fc.constant(to), from: fc.integer({ min: 1, max: to }) }))
  it('is the path of the definition, and proves', () => {
    fc.assert(fc.property(pairs, ({ from, to }) => {
      const path = consistencyPath(from, to, subtree, sha256)
      expect(path.map(hex)).toEqual(naiveProof(from, leaves.slice(0, to)).map(hex))
      expect(provesConsistency(from, to, path, root(from), root(to), sha256)).toBe(true)
    }), { numRuns: 150 })
  })
  it('holds for every pair up to 40', () => {
    for (let to = 1; to <= 40; to += 1) {
      for (let from = 1; from <= to; from += 1) expect(provesConsistency(from, to, consistencyPath(from, to, subtree, sha256), root(from), root(to), sha256), `${from} of ${to}`).toBe(true)
    }
  })
  it('fails on every single bit of either root and of the path', () => {
    const [from, to] = [11, 21]
    const path = consistencyPath(from, to, subtree, sha256)
    for (let bit = 0; bit < 256; bit += 1) {
      expect(provesConsistency(from, to, path, flipped(root(from), bit), root(to), sha256)).toBe(false)
      expect(provesConsistency(from, to, path, root(from), flipped(root(to), bit), sha256)).toBe(false)
      for (const step of path.keys()) expect(provesConsistency(from, to, path.map((hash, i) => i === step ? flipped(hash, bit) : hash), root(from), root(to), sha256)).toBe(false)
    }
  })
  it('fails for other sizes, a path too long or too short, and a tail cut off', () => {
    const path = consistencyPath(11, 21, subtree, sha256)
    const proves = (from: number, to: number, by: readonly Hash[], before = root(11), after = root(21)) => provesConsistency(from, to, by, before, after, sha256)
    for (let from = 1; from <= 21; from += 1) expect(proves(from, 21, path, root(from))).toBe(from === 11)
    expect(proves(11, 21, path.slice(1))).toBe(false)
    expect(proves(11, 21, path.slice(0, -1))).toBe(false)
    expect(proves(11, 21, [...path, root(3)])).toBe(false)
    expect(proves(21, 11, path, root(21), root(11))).toBe(false)
    expect(proves(11, 21, [])).toBe(false)
    expect(proves(16, 21, [], root(16))).toBe(false)
    expect(proves(11, 11, [root(1)], root(11), root(11))).toBe(false)
    expect(proves(0, 21, [], root(11))).toBe(false)
    expect(proves(0, 21, [], bytes('e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855'))).toBe(false)
    expect(proves(11, 21, path, root(11).subarray(1))).toBe(false)
  })
  it('refuses to go back', () => {
    expect(() => consistencyPath(5, 4, subtree, sha256)).toThrow('A tree of 4 leaves does not begin with 5.')
  })
})

describe('proofs made to deceive', () => {
  it('a tree of one leaf has no path: a root that a longer one leads to is not its root', () => {
    const [leaf, other] = hashes as [Hash, Hash]
    expect(provesInclusion(leaf, 0, 1, [other], nodeHash(other, leaf, sha256), sha256)).toBe(false)
    expect(provesInclusion(leaf, 0, 1, [other], nodeHash(leaf, other, sha256), sha256)).toBe(false)
    expect(provesConsistency(1, 2, [other, other], leaf, nodeHash(other, nodeHash(leaf, other, sha256), sha256), sha256)).toBe(false)
  })

  it('a hash with a byte behind it is no hash, though as a left part it would hash the same', () => {
    const longer = (path: readonly Hash[]) => path.map((hash, index) => index === path.length - 1 ? new Uint8Array([...hash, 7]) : hash)
    const inclusion = inclusionPath(5, 8, subtree, sha256), consistency = consistencyPath(6, 8, subtree, sha256)
    expect(provesInclusion(hashes[5]!, 5, 8, inclusion, root(8), sha256)).toBe(true)
    expect(provesInclusion(hashes[5]!, 5, 8, longer(inclusion), root(8), sha256)).toBe(false)
    expect(provesConsistency(6, 8, consistency, root(6), root(8), sha256)).toBe(true)
    expect(provesConsistency(6, 8, longer(consistency), root(6), root(8), sha256)).toBe(false)
  })
})
