import { and, asc, count, eq, gte, lt, max, sql } from 'drizzle-orm'
import { growingTree, leafHash, type Hash, type SubtreeHash } from '#shared/trail/tree'
import { prepared, type VaultDb } from '../prepared'
import { sha256 } from '../sha256'
import { log, logNode } from './table'

/*
 * The tree over the log. A leaf is hashed from its row; of the inner nodes every eighth level is kept, so that a root or a
 * proof over millions of entries reads some hundreds of rows.
 */

/** Levels whose complete subtrees are kept, lowest first. */
export const keptLevels = [8, 16, 24] as const

const place = sql.placeholder
const queries = prepared(db => ({
  leaves: db.select({ leaf: log.leaf }).from(log).where(and(gte(log.seq, place('from')), lt(log.seq, place('to')))).orderBy(asc(log.seq)).prepare(),
  nodes: db.select({ hash: logNode.hash }).from(logNode)
    .where(and(eq(logNode.level, place('level')), gte(logNode.place, place('from')), lt(logNode.place, place('to')))).orderBy(asc(logNode.place)).prepare(),
  newest: db.select({ seq: max(log.seq) }).from(log).prepare(),
  kept: db.select({ nodes: count() }).from(logNode).where(eq(logNode.level, place('level'))).prepare(),
  keep: db.insert(logNode).values({ level: place('level'), place: place('place'), hash: place('hash') }).prepare(),
}))

/** How many entries there are: they are numbered from 0 without gaps, and counting them would read the whole log. */
export const logSize = (db: VaultDb): number => (queries(db).newest.get()?.seq ?? -1) + 1

/** Hashes of complete subtrees as the log has them; throws RangeError where the log is too short for one. */
export function subtreesOf(db: VaultDb): SubtreeHash {
  return (level, index) => {
    const below = keptLevels.findLast(kept => kept <= level) ?? 0
    if (below === level && level > 0) return onlyOne(hashesAt(db, level, index, index + 1), level, index)
    const width = 2 ** (level - below)
    const hashes = hashesAt(db, below, index * width, (index + 1) * width)
    if (hashes.length !== width) throw new RangeError(`The log has no complete subtree ${index} of level ${level}.`)
    return folded(hashes)
  }
}

function onlyOne([hash]: readonly Hash[], level: number, index: number): Hash {
  if (hash === undefined) throw new RangeError(`The log has no complete subtree ${index} of level ${level}.`)
  return hash
}

function hashesAt(db: VaultDb, level: number, from: number, to: number): Hash[] {
  return level === 0
    ? queries(db).leaves.all({ from, to }).map(({ leaf }) => leafHash(leaf, sha256))
    : queries(db).nodes.all({ level, from, to }).map(({ hash }) => hash)
}

function folded(hashes: readonly Hash[]): Hash {
  const tree = growingTree(sha256)
  for (const hash of hashes) tree.append(hash)
  return tree.root()
}

/** Keeps the nodes that the entry `seq` completes; called with each append, within its write. */
export function keepNodes(db: VaultDb, seq: number): void {
  for (const [i, level] of keptLevels.entries()) {
    const width = 2 ** level
    if ((seq + 1) % width !== 0) return
    keepNode(db, level, keptLevels[i - 1] ?? 0, (seq + 1) / width - 1)
  }
}

/** Keeps what an older version of the vault did not; called once when it is opened. */
export function catchUpNodes(db: VaultDb): void {
  const size = logSize(db)
  for (const [i, level] of keptLevels.entries()) {
    const complete = Math.floor(size / 2 ** level)
    for (let at = queries(db).kept.get({ level })?.nodes ?? 0; at < complete; at += 1) keepNode(db, level, keptLevels[i - 1] ?? 0, at)
  }
}

function keepNode(db: VaultDb, level: number, below: number, at: number): void {
  const width = 2 ** (level - below)
  queries(db).keep.run({ level, place: at, hash: Buffer.from(folded(hashesAt(db, below, at * width, (at + 1) * width))) })
}

/** Whether nodes of that level are kept. */
export const isKept = (level: number): boolean => keptLevels.some(kept => kept === level)

/** A kept node; undefined where it is missing. */
export const keptNode = (db: VaultDb, level: number, at: number): Hash | undefined => hashesAt(db, level, at, at + 1)[0]
