import { existsSync, readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { consistencyPath, inclusionPath, provesConsistency, provesInclusion } from '../../../../shared/trail/proofs'
import { growingTree, leafHash, type Hash } from '../../../../shared/trail/tree'
import { bytes, hex, sha256 } from '../../../support/merkle'

/*
 * The test data that implementations of RFC 6962 share (Apache-2.0) lies beside the project, not in it: where it is, every
 * row of it is run; a plain clone has the figures typed in tree.test.ts and proofs.test.ts.
 */
const file = '../shared/check-values/vectors/merkle-rfc6962.json'

interface Probe { readonly id: string, readonly proof: readonly string[], readonly must_verify: boolean }
interface Vectors {
  readonly leaf_inputs_hex: readonly string[]
  readonly inclusion_proofs: readonly { leaf_index: number, tree_size: number, proof: readonly string[] }[]
  readonly consistency_proofs: readonly { size1: number, size2: number, proof: readonly string[] }[]
  readonly verify_inclusion_probes: readonly (Probe & { leaf_index: number, tree_size: number, root: string, leaf_hash: string })[]
  readonly verify_consistency_probes: readonly (Probe & { size1: number, size2: number, root1: string, root2: string })[]
}

describe.runIf(existsSync(file))('the shared vector file', () => {
  const vectors: Vectors = existsSync(file)
    ? JSON.parse(readFileSync(file, 'utf8')) as Vectors
    : { leaf_inputs_hex: [], inclusion_proofs: [], consistency_proofs: [], verify_inclusion_probes: [], verify_consistency_probes: [] }
  const kept = new Map<string, Hash>()
  const tree = growingTree(sha256, (level, index, hash) => kept.set(`${level}/${index}`, hash))
  for (const leaf of vectors.leaf_inputs_hex) tree.append(leafHash(bytes(leaf), sha256))
  const subtree = (level: number, index: number) => kept.get(`${level}/${index}`)!

  it('is whole', () => {
    expect([vectors.inclusion_proofs.length, vectors.consistency_proofs.length, vectors.verify_inclusion_probes.length, vectors.verify_consistency_probes.length]).toEqual([36, 36, 98, 98])
  })
  it('inclusion paths', () => {
    for (const row of vectors.inclusion_proofs) expect(inclusionPath(row.leaf_index, row.tree_size, subtree, sha256).map(hex)).toEqual(row.proof)
  })
  it('consistency paths', () => {
    for (const row of vectors.consistency_proofs) expect(consistencyPath(row.size1, row.size2, subtree, sha256).map(hex)).toEqual(row.proof)
  })
  it('inclusion probes', () => {
    for (const row of vectors.verify_inclusion_probes) expect(provesInclusion(bytes(row.leaf_hash), row.leaf_index, row.tree_size, row.proof.map(bytes), bytes(row.root), sha256), row.id).toBe(row.must_verify)
  })
  it('consistency probes', () => {
    for (const row of vectors.verify_consistency_probes) expect(provesConsistency(row.size1, row.size2, row.proof.map(bytes), bytes(row.root1), bytes(row.root2), sha256), row.id).toBe(row.must_verify)
  })
})
