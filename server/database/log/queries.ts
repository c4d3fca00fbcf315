import { asc, desc, eq, gte, sql } from 'drizzle-orm'
import { formatLeaf, parseLeaf, type Entry, type EntryActor, type Json } from '#shared/trail/entry'
import { acts, type Act } from '#shared/trail/acts'
import { prepared, type VaultDb } from '../prepared'
import { keepNodes } from './nodes'
import { log } from './table'

export const logQueries = prepared(db => ({
  newest: db.select().from(log).orderBy(desc(log.seq)).limit(1).prepare(),
  append: db.insert(log).values({ seq: sql.placeholder('seq'), leaf: sql.placeholder('leaf') }).prepare(),
  at: db.select({ leaf: log.leaf }).from(log).where(eq(log.seq, sql.placeholder('seq'))).prepare(),
  from: db.select().from(log).where(gte(log.seq, sql.placeholder('seq'))).orderBy(asc(log.seq)).limit(sql.placeholder('limit')).prepare(),
}))

/** What a service hands to the log: the act, whose it is, and the whole new state. Buffers and secrets have no place in it. */
export interface NewEntry { readonly act: Act, readonly id: number | string, readonly state: object, readonly note?: string | null }

/** Appends after the newest entry; only within a write. Answers the entry's seq. */
export function appendEntry(db: VaultDb, actor: EntryActor, at: string, { act, id, state, note = null }: NewEntry): number {
  const seq = (logQueries(db).newest.get()?.seq ?? -1) + 1
  const entry: Entry = { v: 1, seq, at, actor, act, subject: { kind: acts[act], id }, state: state as Record<string, Json>, note }
  logQueries(db).append.run({ seq, leaf: formatLeaf(entry) })
  keepNodes(db, seq)
  return seq
}

/** When the newest entry was made; null in an empty vault. */
export function newestInstant(db: VaultDb): string | null {
  const newest = logQueries(db).newest.get()
  return newest === undefined ? null : parseLeaf(newest.leaf).at
}

/** When the oldest entry was made; null in an empty vault. */
export function firstInstant(db: VaultDb): string | null {
  const first = leafAt(db, 0)
  return first === undefined ? null : parseLeaf(first).at
}

/** The leaf text of an entry; undefined where there is none. */
export const leafAt = (db: VaultDb, seq: number): string | undefined => logQueries(db).at.get({ seq })?.leaf
