import type Database from 'better-sqlite3'
import { newestFirst, type ChangeKey, type Walked } from '#server/database/history/keys'
import { walkAlong, type Asked, type Stretch, type Way } from '#server/database/history/walk'

/** A request reads no more entries of an index than this for each plan; its page is then short and still has a next one. */
export const mostEntries = 20_000
const firstEntries = 64
const turns = [8000, mostEntries] as const

export interface Found { readonly keys: readonly ChangeKey[], /** After which key to go on; null = that was all. */ readonly next: ChangeKey | null }

/** Ways that together lead over every change that is asked for. */
export type Plan = readonly Way[]

/** One way with what was read of it ahead. */
class Walk {
  private ahead: Walked[] = []
  private ended = false
  constructor(private readonly read: ReturnType<typeof walkAlong>) {}

  /** The newest key that is not taken yet; undefined at the end. `told` hears how many entries that took. */
  head(told: (entries: number) => void): Walked | undefined {
    while (this.ahead.length === 0 && !this.ended) {
      const { keys, entries, ended } = this.read()
      told(entries)
      this.ended = ended
      this.ahead = keys.toReversed()
    }
    return this.ahead.at(-1)
  }

  take(): void {
    this.ahead.pop()
  }
}

/** The newest keys that are asked for along one plan, all ways in one order, each key once. */
class Search {
  private readonly keys: ChangeKey[] = []
  private last: ChangeKey | null = null
  private entries = 0
  constructor(private readonly walks: readonly Walk[], private readonly limit: number) {}

  /** Reads on until a page is full or the ways end; null where so many entries were read before. */
  upTo(most: number): Found | null {
    for (;;) {
      const heads = this.walks.map(walk => ({ walk, key: walk.head((count) => { this.entries += count }) })).filter((each): each is { walk: Walk, key: Walked } => each.key !== undefined)
      if (heads.length === 0) return { keys: this.keys, next: null }
      if (this.last !== null && this.keys.length === this.limit) return this.page()
      if (this.last !== null && this.entries >= most) return null
      const newest = heads.reduce((best, each) => (newestFirst(each.key, best.key) < 0 ? each : best)).key
      const { versionId, seq, hit } = newest
      this.last = { versionId, seq }
      if (hit) this.keys.push(this.last)
      for (const { walk, key } of heads) if (newestFirst(key, newest) === 0) walk.take()
    }
  }

  /** What was found so far, all of it down to its last key. */
  page(): Found & { readonly next: ChangeKey } {
    if (this.last === null) throw new RangeError('Nothing was read yet.')
    return { keys: this.keys, next: this.last }
  }
}

/**
 * The newest keys below `after` that are asked for. Every plan leads to the same page; which of them reads least depends on how
 * often the field changed and how many axes the place has, which nobody knows beforehand. The last one has a first short turn:
 * what is rare in the whole vault ends there. Then they go on in turns, the first one with a long one: its entries cost least.
 */
export function findKeys(sqlite: Database.Database, plans: readonly Plan[], asked: Asked, stretch: Stretch, after: ChangeKey, limit: number): Found {
  const searches = plans.map(ways => new Search(ways.map(way => new Walk(walkAlong(sqlite, way, asked, stretch, after))), limit))
  const rare = searches.at(-1)?.upTo(firstEntries)
  if (rare) return rare
  for (const entries of turns) {
    for (const search of searches) {
      const found = search.upTo(entries)
      if (found !== null) return found
    }
  }
  return searches.map(search => search.page()).reduce((best, page) => (newestFirst(best.next, page.next) < 0 ? page : best))
}
