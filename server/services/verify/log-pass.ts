import { CodedError } from '#shared/errors/coded'
import { CheckpointError, openCheckpoint, parseCheckpoint, parseVerifierKey, type Checkpoint, type VerifierKey } from '#shared/trail/checkpoint'
import { sameBytes } from '#shared/trail/bytes'
import { EntryError, parseLeaf, type Entry } from '#shared/trail/entry'
import { growingTree, leafHash, type Hash } from '#shared/trail/tree'
import { isKept, keptNode } from '#server/database/log/nodes'
import { logQueries } from '#server/database/log/queries'
import type { VaultDb } from '#server/database/prepared'
import { sha256 } from '#server/database/sha256'
import type { Faults } from './faults'

/** A checkpoint to hold the log against, and where it was found. */
export interface GivenCheckpoint { readonly from: string, readonly note: string }

export interface LogPass {
  readonly entries: number
  /** Lines of all keys that the log names, oldest first. */
  readonly keys: readonly VerifierKey[]
}

const pageLength = 512

/**
 * Reads the log from its first byte: numbering, form and times of the entries, the kept nodes of the tree, the root at the
 * size of every checkpoint, and their signatures. Hands each readable entry on.
 */
export async function passOverLog(db: VaultDb, given: readonly GivenCheckpoint[], faults: Faults, entryRead: (entry: Entry) => void, pause: () => Promise<void>): Promise<LogPass> {
  const roots = new Map<number, Hash>()
  const checkpoints = readable(given, faults)
  const sizes = new Set(checkpoints.map(({ checkpoint }) => checkpoint.size))
  const keys: VerifierKey[] = []
  const tree = growingTree(sha256, (level, index, hash) => {
    if (isKept(level) && !sameBytes(keptNode(db, level, index) ?? new Uint8Array(), hash)) faults.add(`log node ${level}/${index}`, 'is not the hash of the entries below it')
  })
  let newest = ''
  for (let from = 0; ; from = tree.size()) {
    const page = logQueries(db).from.all({ seq: from, limit: pageLength })
    if (page.length === 0) break
    for (const { seq, leaf } of page) {
      if (sizes.has(tree.size())) roots.set(tree.size(), tree.root())
      const entry = entryAt(seq, tree.size(), leaf, faults)
      tree.append(leafHash(leaf, sha256))
      if (entry === null) continue
      if (entry.at < newest) faults.add(`log ${seq}`, `is of ${entry.at}, and one before it is of ${newest}`)
      newest = entry.at
      if (entry.subject.kind === 'setting' && entry.subject.id === 'trail-key') keys.push(parseVerifierKey(String(entry.state.value)))
      entryRead(entry)
    }
    await pause()
  }
  roots.set(tree.size(), tree.root())
  for (const one of checkpoints) holdAgainst(one, keys, roots, tree.size(), faults)
  return { entries: tree.size(), keys }
}

function entryAt(seq: number, expected: number, leaf: string, faults: Faults): Entry | null {
  if (seq !== expected) faults.add(`log ${expected}`, `is missing: the next entry is ${seq}`)
  try {
    const entry = parseLeaf(leaf)
    if (entry.seq !== seq) faults.add(`log ${seq}`, `says that it is entry ${entry.seq}`)
    return entry
  }
  catch (error) {
    if (!(error instanceof EntryError || error instanceof CodedError)) throw error
    faults.add(`log ${seq}`, error.message)
    return null
  }
}

interface Read extends GivenCheckpoint { readonly checkpoint: Checkpoint }

function readable(given: readonly GivenCheckpoint[], faults: Faults): Read[] {
  return given.flatMap((one) => {
    try {
      return [{ ...one, checkpoint: parseCheckpoint(one.note) }]
    }
    catch (error) {
      if (!(error instanceof CheckpointError)) throw error
      faults.add(one.from, error.message)
      return []
    }
  })
}

function holdAgainst({ from, note, checkpoint }: Read, keys: readonly VerifierKey[], roots: ReadonlyMap<number, Hash>, entries: number, faults: Faults): void {
  const { size, origin } = checkpoint
  if (size > entries) return faults.add(from, `is over ${size} entries; the log has ${entries}: its end is cut off`)
  const root = roots.get(size)
  if (root === undefined || !sameBytes(root, checkpoint.root)) faults.add(from, `has another root over ${size} entries than the log: entries up to there were rewritten`)
  const key = keys.find(({ name }) => name === origin)
  if (key === undefined) return faults.add(from, `is signed by ${origin}; the log names no such key`)
  try {
    openCheckpoint(note, key)
  }
  catch (error) {
    if (!(error instanceof CheckpointError)) throw error
    faults.add(from, error.message)
  }
}
