import { describe, expect, it } from 'vitest'
import { emptyRoot, growingTree, leafHash, nodeHash, rootOf, splitOf, type Hash, type SubtreeHash } from '../../../../shared/trail/tree'
import { bytes, hex, naiveRoot, numberedLeaves, sha256 } from '../../../support/merkle'

/** A store of complete subtrees, as the vault keeps them. */
function grown(leaves: readonly Uint8Array[]): { root: Hash, subtree: SubtreeHash, asked: () => number } {
  const kept = new Map<string, Hash>()
  const tree = growingTree(sha256, (level, index, hash) => kept.set(`${level}/${index}`, hash))
  for (const leaf of leaves) tree.append(leafHash(leaf, sha256))
  let asked = 0
  return {
    root: tree.root(),
    asked: () => asked,
    subtree: (level, index) => {
      asked += 1
      const hash = kept.get(`${level}/${index}`)
      if (!hash) throw new Error(`no complete subtree ${level}/${index}`)
      return hash
    },
  }
}

describe('the published figures', () => {
  // RFC 9162, section 2.1.1, over the eight leaves that implementations of RFC 6962 have shared since 2012.
  const leaves = ['', '00', '10', '2021', '3031', '40414243', '5051525354555657', '606162636465666768696a6b6c6d6e6f'].map(bytes)
  const roots = [
    'e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855',
    '6e340b9cffb37a989ca544e6bb780a2c78901d3fb33738768511a30617afa01d',
    'fac54203e7cc696cf0dfcb42c92a1d9dbaf70ad9e621f4bd8d98662f00e3c125',
    'aeb6bcfe274b70a14fb067a5e5578264db0fa9b51af5e0ba159158f329e06e77',
    'd37ee418976dd95753c1c73862b9398fa2a2cf9b4ff0fdfe8b30cd95209614b7',
    '4e3bbb1f7b478dcfe71fb631631519a3bca12c9aefca1612bfce4c13a86264d4',
    '76e67dadbcdf1e10e1b74ddc608abd2f98dfb16fbce75277b5232a127f2087ef',
    'ddb89be403809e325750d3d263cd78929c2942b7942a34b77e122c9594a74c8c',
    '5dc9da79a70659a9ad559cb701ded9a2ab9d823aad2f4960cfe370eff4604328',
  ]
  it.each(roots.map((root, size) => [size, root] as const))('root of the first %i leaves', (size, root) => {
    expect(hex(grown(leaves.slice(0, size)).root)).toBe(root)
    expect(hex(naiveRoot(leaves.slice(0, size)))).toBe(root)
  })
  it('a leaf and a node', () => {
    expect(hex(leafHash(new TextEncoder().encode('L123456'), sha256))).toBe('395aa064aa4c29f7010acfe3f25db9485bbd4b91897b6ad7ad547639252b4d56')
    const [left, right] = ['N123', 'N456'].map(text => sha256(new TextEncoder().encode(text))) as [Hash, Hash]
    expect(hex(nodeHash(left, right, sha256))).toBe(hex(sha256(new Uint8Array([1, ...left, ...right]))))
  })
  it('nothing', () => expect(hex(emptyRoot(sha256))).toBe(roots[0]))
})

describe('a growing tree', () => {
  it('agrees with the definition at every size from 1 to 1,025', () => {
    const leaves = numberedLeaves(1025)
    const tree = growingTree(sha256)
    // The definition takes n hashes a size: below 130 each size, then around the powers of two, where the shape changes.
    const looked = (size: number) => size < 130 || [255, 256, 257, 511, 512, 513, 767, 768, 769, 1023, 1024, 1025].includes(size)
    for (const [i, leaf] of leaves.entries()) {
      tree.append(leafHash(leaf, sha256))
      if (looked(i + 1)) expect(hex(tree.root()), `size ${i + 1}`).toBe(hex(naiveRoot(leaves.slice(0, i + 1))))
    }
    expect(tree.size()).toBe(1025)
  })
  it('tells each complete subtree once, with the hash that the definition gives', () => {
    const leaves = numberedLeaves(37)
    const told = new Map<string, string>()
    const tree = growingTree(sha256, (level, index, hash) => {
      expect(told.has(`${level}/${index}`)).toBe(false)
      told.set(`${level}/${index}`, hex(hash))
    })
    for (const leaf of leaves) tree.append(leafHash(leaf, sha256))
    // 37 leaves, 18 pairs, 9 fours, 4 eights, 2 sixteens, 1 thirty-two.
    expect(told.size).toBe(37 + 18 + 9 + 4 + 2 + 1)
    for (const [key, hash] of told) {
      const [level = 0, index = 0] = key.split('/').map(Number)
      expect(hash).toBe(hex(naiveRoot(leaves.slice(index * 2 ** level, (index + 1) * 2 ** level))))
    }
  })
})

describe('a root from kept subtrees', () => {
  it('is the root of each size below, and asks for few', () => {
    const leaves = numberedLeaves(600)
    const store = grown(leaves)
    for (const size of [0, 1, 2, 3, 255, 256, 257, 511, 599, 600]) {
      const before = store.asked()
      expect(hex(rootOf(size, store.subtree, sha256)), `size ${size}`).toBe(hex(naiveRoot(leaves.slice(0, size))))
      expect(store.asked() - before).toBeLessThanOrEqual(10)
    }
  })
  it('changes with every leaf', () => {
    const leaves = numberedLeaves(21)
    const roots = leaves.map((_, i) => hex(grown(leaves.map((leaf, k) => k === i ? new Uint8Array([...leaf, 33]) : leaf)).root))
    expect(new Set([...roots, hex(grown(leaves).root)]).size).toBe(22)
  })
})

describe('where a tree splits', () => {
  it.each([[2, 1], [3, 2], [4, 2], [5, 4], [8, 4], [9, 8], [1024, 512], [1025, 1024], [2 ** 40 + 1, 2 ** 40]])('%i at %i', (n, k) => expect(splitOf(n)).toBe(k))
})
