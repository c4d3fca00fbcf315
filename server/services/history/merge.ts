import type Database from 'better-sqlite3'
import { newestFirst, walkOn, type Asked, type ChangeKey, type Stretch, type Walked, type Way } from '#server/database/history/walk'

/** A request reads no more entries of an index than this; its page is then short and still has a next one. */
export const mostEntries = 20_000
const firstChunk = 64
const mostChunk = 1024

export interface Found { readonly keys: readonly ChangeKey[], /** After which key to go on; null = that was all. */ readonly next: ChangeKey | null }

/** One way with what was read of it ahead. */
class Walk {
  private ahead: Walked[] = []
  private ended = false
  private chunk = firstChunk
  constructor(private readonly sqlite: Database.Database, private readonly way: Way, private readonly asked: Asked, private readonly stretch: Stretch, private below: ChangeKey) {}

  /** The newest key that is not taken yet; undefined at the end. `read` is told how many entries that took. */
  head(read: (entries: number) => void): Walked | undefined {
    if (this.ahead.length === 0 && !this.ended) {
      const rows = walkOn(this.sqlite, this.way, this.asked, this.stretch, this.below, this.chunk)
      read(rows.length)
      this.ended = rows.length < this.chunk
      this.below = rows.at(-1) ?? this.below
      this.ahead = rows.reverse()
      this.chunk = Math.min(this.chunk * 2, mostChunk)
    }
    return this.ahead.at(-1)
  }

  take(): void {
    this.ahead.pop()
  }
}

/** The newest keys below `after` that are asked for, from all ways in one order, each key once. */
export function findKeys(sqlite: Database.Database, ways: readonly Way[], asked: Asked, stretch: Stretch, after: ChangeKey, limit: number): Found {
  const walks = ways.map(way => new Walk(sqlite, way, asked, stretch, after))
  const keys: ChangeKey[] = []
  let entries = 0
  let last: ChangeKey | null = null
  const read = (count: number) => { entries += count }
  for (;;) {
    const heads = walks.map(walk => ({ walk, key: walk.head(read) })).filter((each): each is { walk: Walk, key: Walked } => each.key !== undefined)
    if (heads.length === 0) return { keys, next: null }
    if (last !== null && (keys.length === limit || entries >= mostEntries)) return { keys, next: last }
    const newest = heads.reduce((best, each) => (newestFirst(each.key, best.key) < 0 ? each : best)).key
    const { versionId, seq, hit } = newest
    last = { versionId, seq }
    if (hit) keys.push(last)
    for (const { walk, key } of heads) if (newestFirst(key, newest) === 0) walk.take()
  }
}
