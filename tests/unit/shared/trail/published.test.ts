import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { parseLeaf } from '../../../../shared/trail/entry'
import { consistencyPath, inclusionPath, provesConsistency, provesInclusion } from '../../../../shared/trail/proofs'
import { growingTree, leafHash, nodeHash, splitOf, type Hash, type SubtreeHash } from '../../../../shared/trail/tree'
import { codeOf } from '../../../support/codes'
import { bytes, hex, naiveRoot, sha256 } from '../../../support/merkle'

/*
 * The proofs that stand word for word in the tests which implementations of RFC 6962 share (transparency-dev/merkle, commit
 * 417fb0c31475), over the eight leaves whose roots tree.test.ts has.
 */

const leaves = ['', '00', '10', '2021', '3031', '40414243', '5051525354555657', '606162636465666768696a6b6c6d6e6f'].map(bytes)
const kept = new Map<string, Hash>()
const tree = growingTree(sha256, (level, index, hash) => kept.set(`${level}/${index}`, hash))
for (const leaf of leaves) tree.append(leafHash(leaf, sha256))
const subtree: SubtreeHash = (level, index) => kept.get(`${level}/${index}`) ?? new Uint8Array()
const root = (size: number) => naiveRoot(leaves.slice(0, size))

const leaf0 = '6e340b9cffb37a989ca544e6bb780a2c78901d3fb33738768511a30617afa01d'
const leaf1 = '96a296d224f285c67bee93c30f8a309157f0daa35dc5b87e410b78630a09cfc7'
const leaf4 = 'bc1a0643b12e4d2d7c77918f44e0f4f79a838b6cf9ec5b5c283e1f4d88599e6b'
const over0to2 = 'fac54203e7cc696cf0dfcb42c92a1d9dbaf70ad9e621f4bd8d98662f00e3c125'
const over2to4 = '5f083f0a1a33ca076a95279832580db3e0ef4584bdff1f54c8a360f50de3031e'
const over0to4 = 'd37ee418976dd95753c1c73862b9398fa2a2cf9b4ff0fdfe8b30cd95209614b7'
const over4to6 = '0ebc5d3437fbe2db158b9f126a1d118e308181031d0a949f8dededebc558ef6a'
const over6to8 = 'ca854ea128ed050b41b35ffc1b87b8eb2bde461e9e3b5596ece6b9d5975a0ae0'
const over4to8 = '6b47aaf29ee3c2af9af889bc1fb9254dabd31177f16232dd6aab035ca39bf6e4'

describe('published proofs', () => {
  it.each([
    [0, 1, []], [0, 2, [leaf1]], [1, 2, [leaf0]], [2, 3, [over0to2]], [1, 5, [leaf0, over2to4, leaf4]], [0, 8, [leaf1, over2to4, over4to8]], [5, 8, [leaf4, over6to8, over0to4]],
  ] as const)('leaf %i of %i', (index, size, path) => {
    expect(inclusionPath(index, size, subtree, sha256).map(hex)).toEqual(path)
    expect(provesInclusion(leafHash(leaves[index] ?? bytes(''), sha256), index, size, path.map(bytes), root(size), sha256)).toBe(true)
  })

  it.each([
    [1, 1, []], [2, 5, [over2to4, leaf4]], [1, 8, [leaf1, over2to4, over4to8]], [6, 8, [over4to6, over6to8, over0to4]],
  ] as const)('%i leaves in %i', (from, to, path) => {
    expect(consistencyPath(from, to, subtree, sha256).map(hex)).toEqual(path)
    expect(provesConsistency(from, to, path.map(bytes), root(from), root(to), sha256)).toBe(true)
  })

  it('each of all the others up to eight leaves proves its own place, and no other', () => {
    for (let size = 1; size <= 8; size += 1) for (let index = 0; index < size; index += 1) for (let other = 0; other < size; other += 1) {
      const proven = provesInclusion(leafHash(leaves[index] ?? bytes(''), sha256), other, size, inclusionPath(index, size, subtree, sha256), root(size), sha256)
      expect(proven, `${index} as ${other} of ${size}`).toBe(index === other)
    }
  })
})

describe('a log longer than any vault will have', () => {
  // Sizes beyond 32 bits, where an operator on bits would cut them. The root is worked out from the path by the definition,
  // RFC 9162, section 2.1.3.1: at each split the leaf lies left or right of the other part.
  const depth = (index: number, size: number): number => size === 1 ? 0 : index < splitOf(size) ? 1 + depth(index, splitOf(size)) : 1 + depth(index - splitOf(size), size - splitOf(size))
  function rootBy(leaf: Hash, index: number, size: number, path: readonly Hash[]): Hash {
    const other = path.at(-1)
    if (size === 1 || other === undefined) return leaf
    const k = splitOf(size), rest = path.slice(0, -1)
    return index < k ? nodeHash(rootBy(leaf, index, k, rest), other, sha256) : nodeHash(other, rootBy(leaf, index - k, size - k, rest), sha256)
  }
  const hashOf = (text: string) => sha256(new TextEncoder().encode(text))
  const place = fc.tuple(fc.integer({ min: 1, max: 2 ** 53 - 1 }), fc.nat({ max: 2 ** 30 })).map(([size, part]) => ({ size, index: Math.floor((size - 1) * (part / 2 ** 30)) }))

  it('is proven and disproven by the same arithmetic', () => {
    fc.assert(fc.property(place, ({ size, index }) => {
      const leaf = hashOf('leaf'), path = Array.from({ length: depth(index, size) }, (_, step) => hashOf(`step ${step}`))
      const top = rootBy(leaf, index, size, path)
      expect(provesInclusion(leaf, index, size, path, top, sha256)).toBe(true)
      if (path.length > 0) expect(provesInclusion(leaf, index, size, path.slice(1), top, sha256)).toBe(false)
      expect(provesInclusion(leaf, index, size, [...path, leaf], top, sha256)).toBe(false)
    }), { numRuns: 60 })
  })

  it.each([[2 ** 32, 2 ** 32 + 1], [2 ** 31, 2 ** 33], [2 ** 52, 2 ** 53 - 1]])('leaf %i of %i', (index, size) => {
    const leaf = hashOf('leaf'), path = Array.from({ length: depth(index, size) }, (_, step) => hashOf(`step ${step}`))
    expect(provesInclusion(leaf, index, size, path, rootBy(leaf, index, size, path), sha256)).toBe(true)
  })
})

describe('the time of an entry', () => {
  const leaf = (at: string) => `{"act":"site-changed","actor":{"kind":"vault","name":"Witnessmark"},"at":"${at}","note":null,"seq":0,"state":{},"subject":{"id":1,"kind":"site"},"v":1}`

  it.each(['2026-03-09T14:32:00.000Z', '2028-02-29T23:59:59.999Z', '1970-01-01T00:00:00.000Z'])('%s is one', at => expect(parseLeaf(leaf(at)).at).toBe(at))

  it.each(['2026-03-09T14:32:00Z', '2026-03-09T14:32:00.0000Z', '2026-03-09T15:32:00.000+01:00', '2026-02-30T00:00:00.000Z', '2026-03-09T24:00:00.000Z', 'xxxxxxxxxxxxxxxxxxxxxxxx', ''])('%s is none', (at) => {
    expect(codeOf(() => parseLeaf(leaf(at)))).toBe('entry-unreadable')
  })
})
