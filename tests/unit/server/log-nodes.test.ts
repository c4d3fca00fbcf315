import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { catchUpNodes, logSize, subtreesOf } from '../../../server/database/log/nodes'
import { logQueries } from '../../../server/database/log/queries'
import { openVault } from '../../../server/database/client'
import { checkpointNow, proveConsistency, proveEntry, takeCheckpoint, verifierKey } from '../../../server/services/trail/trail'
import { recordTrailKey, trailActor, trailKeyOf } from '../../../server/services/trail/key'
import { openCheckpoint, parseVerifierKey } from '../../../shared/trail/checkpoint'
import { provesConsistency, provesInclusion } from '../../../shared/trail/proofs'
import { rootOf } from '../../../shared/trail/tree'
import { bytes, hex, naiveRoot, sha256 } from '../../support/merkle'
import { freshVault } from '../../support/vault'

/* A log of 700 entries: two and a half kept nodes of level 8. */
const { vault, folder, remove } = freshVault()
const leaves: Uint8Array[] = []
beforeAll(() => {
  recordTrailKey(vault)
  for (let i = logSize(vault.db); i < 700; i += 1) vault.write(trailActor, ({ log }) => log({ act: 'vault-set-up', id: 'vault', state: { i } }))
  leaves.push(...logQueries(vault.db).from.all({ seq: 0, limit: 1000 }).map(({ leaf }) => new TextEncoder().encode(leaf)))
})
afterAll(remove)

describe('the tree over the log', () => {
  it('keeps a node for every 256 entries', () => {
    expect(vault.sqlite.prepare('SELECT level, place FROM log_node').all()).toEqual([{ level: 8, place: 0 }, { level: 8, place: 1 }])
  })
  it('has the root of the definition at every size that matters', () => {
    for (const size of [0, 1, 2, 255, 256, 257, 511, 512, 513, 700]) expect(hex(rootOf(size, subtreesOf(vault.db), sha256))).toBe(hex(naiveRoot(leaves.slice(0, size))))
  })
  it('knows no subtree beyond its end', () => {
    expect(() => subtreesOf(vault.db)(0, 700)).toThrow(RangeError)
    expect(() => subtreesOf(vault.db)(8, 2)).toThrow('The log has no complete subtree 2 of level 8.')
    expect(() => subtreesOf(vault.db)(4, 43)).toThrow(RangeError)
  })
  it('catches up where an older version kept no nodes', () => {
    const kept = () => vault.sqlite.prepare('SELECT level, place, hex(hash) AS hash FROM log_node').all()
    const before = kept()
    const guard = vault.sqlite.prepare(`SELECT sql FROM sqlite_schema WHERE name = 'log_node_no_delete'`).pluck().get() as string
    vault.sqlite.exec(`DROP TRIGGER log_node_no_delete; DELETE FROM log_node; ${guard}`)
    expect(kept()).toEqual([])
    catchUpNodes(vault.db)
    expect(kept()).toEqual(before)
  })
})

describe('a checkpoint', () => {
  it('is signed by the key that the log names, and stores nothing', () => {
    const { note, size } = checkpointNow(vault)
    const key = parseVerifierKey(verifierKey(vault).verifierKey)
    expect(openCheckpoint(note, key)).toMatchObject({ size, origin: key.name })
    expect(logSize(vault.db)).toBe(size)
    expect(logQueries(vault.db).at.get({ seq: 0 })?.leaf).toContain(verifierKey(vault).verifierKey)
  })
  it('is kept on demand, with an entry behind it', () => {
    const { size, note } = takeCheckpoint(vault)
    expect(logSize(vault.db)).toBe(size + 1)
    expect(vault.sqlite.prepare('SELECT size, note FROM checkpoint').get()).toEqual({ size, note })
  })
  it('keeps its key over a restart', () => {
    const before = verifierKey(vault).verifierKey
    vault.close()
    const again = openVault(folder)
    recordTrailKey(again)
    expect(verifierKey(again).verifierKey).toBe(before)
    expect(logSize(again.db)).toBe(701)
    expect(trailKeyOf(again).verifier.name).toMatch(/^witnessmark\/[0-9a-f]{12}$/)
    again.close()
  })
})

describe('proofs', () => {
  it('hold for who has a leaf and two checkpoints and nothing else', () => {
    const again = openVault(folder)
    const root = (size: number) => rootOf(size, subtreesOf(again.db), sha256)
    for (const entry of [0, 1, 255, 256, 511, 512, 699]) {
      const { size, leafHash, path } = proveEntry(again, entry)
      expect(provesInclusion(bytes(leafHash), entry, size, path.map(bytes), root(size), sha256), `entry ${entry}`).toBe(true)
    }
    for (const from of [1, 2, 255, 256, 300, 512, 700, 701]) {
      const { to, path } = proveConsistency(again, from)
      expect(provesConsistency(from, to, path.map(bytes), root(from), root(to), sha256), `from ${from}`).toBe(true)
    }
    expect(() => proveEntry(again, 701)).toThrow('?entry: is not below 701.')
    expect(() => proveEntry(again, 3, 702)).toThrow('?size: is above the 701 entries of the log.')
    expect(() => proveConsistency(again, 5, 4)).toThrow('?from: is above 4.')
    again.close()
  })
})
