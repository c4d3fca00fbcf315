import { sha256 } from '@noble/hashes/sha2.js'
import { hexToBytes } from '@noble/hashes/utils.js'
import { CheckpointError, openCheckpoint, parseVerifierKey, type Checkpoint } from '#shared/trail/checkpoint'
import { sameBytes, toBase64 } from '#shared/trail/bytes'
import { provesConsistency, provesInclusion } from '#shared/trail/proofs'
import { growingTree, leafHash } from '#shared/trail/tree'

/*
 * What the trail page reckons by itself: the server hands over figures, and nothing of what it says about them is believed.
 */

/** What the page asks the server for. */
export interface TrailSource {
  readonly checkpoint: () => Promise<string>
  readonly consistency: (from: number, to: number) => Promise<{ readonly path: readonly string[] }>
  readonly proof: (entry: number, size: number) => Promise<{ readonly path: readonly string[] }>
  /** Entries from a number on, some of them. */
  readonly entries: (from: number) => Promise<readonly { readonly seq: number, readonly leaf: string }[]>
}

/** One line of what was reckoned: what holds, or what does not and what that means. */
export interface Told { readonly holds: boolean, readonly says: string }

const holds = (says: string): Told => ({ holds: true, says })
const fails = (says: string): Told => ({ holds: false, says })

/** Reads a note by a key on one line; the words of what is wrong with either. */
export function opened(note: string, keyLine: string): Checkpoint | Told {
  try {
    return openCheckpoint(note, parseVerifierKey(keyLine))
  }
  catch (error) {
    if (error instanceof CheckpointError) return fails(error.message)
    throw error
  }
}

const isTold = (value: Checkpoint | Told): value is Told => 'says' in value

/** Holds the log of today against a checkpoint that was kept elsewhere, by that key. */
export async function proveCheckpoint(kept: string, keyLine: string, source: TrailSource): Promise<Told[]> {
  const before = opened(kept, keyLine)
  if (isTold(before)) return [before]
  const signed = holds(`Your checkpoint is signed by ${before.origin}: ${before.size} entries, root ${toBase64(before.root)}.`)
  const now = opened(await source.checkpoint(), keyLine)
  if (isTold(now)) return [signed, fails(`The checkpoint of today does not hold: ${now.says}`)]
  if (now.size < before.size) return [signed, fails(`The log of today has ${now.size} entries, your checkpoint ${before.size}: its end was cut off.`)]
  const { path } = await source.consistency(before.size, now.size)
  const begins = provesConsistency(before.size, now.size, path.map(hexToBytes), before.root, now.root, sha256)
  return [signed, begins
    ? holds(`The log of today, ${now.size} entries, begins with exactly those ${before.size}: nothing up to there was rewritten.`)
    : fails(`The log of today, ${now.size} entries, does not begin with those ${before.size}: entries up to there were rewritten.`)]
}

/** Whether an entry is in the log of today; answers its text as well. */
export async function proveEntry(entry: number, keyLine: string, source: TrailSource): Promise<{ told: Told, leaf?: string }> {
  const now = opened(await source.checkpoint(), keyLine)
  if (isTold(now)) return { told: now }
  if (entry >= now.size) return { told: fails(`There is no entry ${entry}: the log has ${now.size}, counted from 0.`) }
  const [found] = await source.entries(entry)
  if (found?.seq !== entry) return { told: fails(`The server did not hand over entry ${entry}.`) }
  const { path } = await source.proof(entry, now.size)
  const within = provesInclusion(leafHash(found.leaf, sha256), entry, now.size, path.map(hexToBytes), now.root, sha256)
  return { leaf: found.leaf, told: within ? holds(`Entry ${entry} is in the log of today, ${now.size} entries: ${path.length} hashes lead from it to the signed root.`) : fails(`Entry ${entry} is not what the signed root stands over.`) }
}

/** Reads every entry and reckons the root again; `read` hears how far it came. */
export async function recomputeRoot(keyLine: string, source: TrailSource, read: (done: number, of: number) => void): Promise<Told> {
  const now = opened(await source.checkpoint(), keyLine)
  if (isTold(now)) return now
  const tree = growingTree(sha256)
  while (tree.size() < now.size) {
    const page = await source.entries(tree.size())
    if (page[0]?.seq !== tree.size()) return fails(`The server did not hand over entry ${tree.size()}.`)
    for (const { leaf } of page.slice(0, now.size - tree.size())) tree.append(leafHash(leaf, sha256))
    read(tree.size(), now.size)
  }
  return sameBytes(tree.root(), now.root)
    ? holds(`All ${now.size} entries were read and hashed here; they give the signed root.`)
    : fails(`All ${now.size} entries were read and hashed here; they give another root than the signed one.`)
}
