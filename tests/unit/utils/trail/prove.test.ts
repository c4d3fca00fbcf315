import { ed25519 } from '@noble/curves/ed25519.js'
import { describe, expect, it } from 'vitest'
import { formatCheckpoint, formatVerifierKey } from '../../../../shared/trail/checkpoint'
import { consistencyPath, inclusionPath } from '../../../../shared/trail/proofs'
import { growingTree, leafHash, type Hash } from '../../../../shared/trail/tree'
import { proveCheckpoint, proveEntry, recomputeRoot, type TrailSource } from '../../../../utils/trail/prove'
import { hex, sha256 } from '../../../support/merkle'

const seed = sha256(new TextEncoder().encode('a seed for tests only'))
const key = { name: 'witnessmark/tests', publicKey: ed25519.getPublicKey(seed) }
const line = formatVerifierKey(key)

/** A server over these leaves, honest about them. */
function server(leaves: readonly string[]) {
  const kept = new Map<string, Hash>()
  const tree = growingTree(sha256, (level, index, hash) => kept.set(`${level}/${index}`, hash))
  for (const leaf of leaves) tree.append(leafHash(leaf, sha256))
  const subtree = (level: number, index: number) => kept.get(`${level}/${index}`) ?? new Uint8Array(32)
  const note = formatCheckpoint({ origin: key.name, size: leaves.length, root: tree.root() }, key, message => ed25519.sign(message, seed))
  const source: TrailSource = {
    checkpoint: () => Promise.resolve(note),
    consistency: (from, to) => Promise.resolve({ path: consistencyPath(from, to, subtree, sha256).map(hex) }),
    proof: (entry, size) => Promise.resolve({ path: inclusionPath(entry, size, subtree, sha256).map(hex) }),
    entries: from => Promise.resolve(leaves.slice(from, from + 7).map((leaf, i) => ({ seq: from + i, leaf }))),
  }
  return { note, source }
}
const leavesOf = (count: number) => Array.from({ length: count }, (_, i) => `entry ${i}`)
const early = server(leavesOf(11))
const honest = server(leavesOf(30))
const rewritten = server(leavesOf(30).map((leaf, i) => i === 4 ? 'entry 4, as ordered' : leaf))
const cut = server(leavesOf(9))

describe('a checkpoint kept elsewhere', () => {
  it('holds against the log that grew from it', async () => {
    const told = await proveCheckpoint(early.note, line, honest.source)
    expect(told.map(({ holds }) => holds)).toEqual([true, true])
    expect(told[1]?.says).toBe('The log of today, 30 entries, begins with exactly those 11: nothing up to there was rewritten.')
  })
  it('shows a log that was rewritten, though its own proofs are sound', async () => {
    const told = await proveCheckpoint(early.note, line, rewritten.source)
    expect(told.map(({ holds }) => holds)).toEqual([true, false])
    expect(told[1]?.says).toContain('does not begin with those 11')
  })
  it('shows a log that was cut off', async () => {
    expect((await proveCheckpoint(early.note, line, cut.source))[1]?.says).toBe('The log of today has 9 entries, your checkpoint 11: its end was cut off.')
  })
  it('is not believed where it was altered, or signed by another key', async () => {
    expect(await proveCheckpoint(early.note.replace('\n11\n', '\n12\n'), line, honest.source)).toMatchObject([{ holds: false }])
    const other = formatVerifierKey({ name: key.name, publicKey: ed25519.getPublicKey(sha256(seed)) })
    expect(await proveCheckpoint(early.note, other, honest.source)).toMatchObject([{ holds: false, says: 'The checkpoint bears no signature of witnessmark/tests.' }])
    expect(await proveCheckpoint('a shopping list', line, honest.source)).toMatchObject([{ holds: false }])
  })
})

describe('one entry', () => {
  it('is proven with its text', async () => {
    expect(await proveEntry(17, line, honest.source)).toMatchObject({ leaf: 'entry 17', told: { holds: true } })
  })
  it('is not where the server hands over another text, another entry, or none', async () => {
    const lying = { ...honest.source, entries: () => Promise.resolve([{ seq: 17, leaf: 'entry 17, as ordered' }]) }
    expect((await proveEntry(17, line, lying)).told).toEqual({ holds: false, says: 'Entry 17 is not what the signed root stands over.' })
    expect((await proveEntry(17, line, { ...honest.source, entries: () => Promise.resolve([]) })).told.holds).toBe(false)
    expect((await proveEntry(30, line, honest.source)).told.says).toBe('There is no entry 30: the log has 30, counted from 0.')
  })
})

describe('the whole log', () => {
  it('is read and hashed again, and tells how far it is', async () => {
    const steps: number[] = []
    expect(await recomputeRoot(line, honest.source, done => steps.push(done))).toEqual({ holds: true, says: 'All 30 entries were read and hashed here; they give the signed root.' })
    expect(steps).toEqual([7, 14, 21, 28, 30])
  })
  it('does not hold where one entry is another, or the server stops', async () => {
    expect((await recomputeRoot(line, { ...honest.source, entries: rewritten.source.entries }, () => {})).holds).toBe(false)
    expect((await recomputeRoot(line, { ...honest.source, entries: cut.source.entries }, () => {})).says).toBe('The server did not hand over entry 9.')
  })
})
