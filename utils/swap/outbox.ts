import { problemSchema, type Problem } from '#shared/api/common'
import { z } from 'zod'

/*
 * What was entered without reception waits in this browser, in the order in which it was entered, each under the
 * Idempotency-Key it was first tried with: sent twice it counts once. `order` is its place there; an entry for which the
 * browser had no room has none, and lives as long as the page.
 */

const jsonBody = z.object({ kind: z.literal('json'), value: z.record(z.string(), z.unknown()) })
const bytes = z.custom<Uint8Array<ArrayBuffer>>(value => ArrayBuffer.isView(value))
const fileBody = z.object({ kind: z.literal('file'), name: z.string(), mediaType: z.string(), bytes })

const entrySchema = z.object({
  order: z.int().optional(),
  key: z.string(),
  /** Whose entry: sent only while that person is signed in here. */
  personId: z.int(), person: z.string(),
  swapId: z.int(), tag: z.string(),
  path: z.string(),
  body: z.discriminatedUnion('kind', [jsonBody, fileBody]),
  /** What it says, for the person: 'Made safe, pin'. */
  says: z.string(),
  enteredAt: z.string(),
  /** The rev of the swap that it follows on: where another device went on from there, the vault refuses it. */
  rev: z.int(),
  /** What the vault answered when it would not take it; null while it waits. */
  refused: problemSchema.nullable(),
})
export type OutboxEntry = z.infer<typeof entrySchema>

/** What a browser kept; entries that this version cannot read are left out rather than sent wrong. */
export function readOutbox(rows: readonly unknown[]): OutboxEntry[] {
  return rows.flatMap((row) => {
    const read = entrySchema.safeParse(row)
    return read.success ? [read.data] : []
  })
}

/** What is to be put and dropped so that the entries of `now` become those of `next`; rows that were not read stay. */
export function changesTo(now: readonly OutboxEntry[], next: readonly OutboxEntry[]): { put: OutboxEntry[], drop: number[] } {
  const stays = new Set(next.map(({ key }) => key))
  return { put: next.filter(entry => !now.includes(entry)), drop: now.flatMap(({ key, order }) => stays.has(key) || order === undefined ? [] : [order]) }
}

/** The entry to be sent next: the oldest of this person whose swap has none before it that was refused. */
export function nextToSend(entries: readonly OutboxEntry[], personId: number): OutboxEntry | undefined {
  const stuck = new Set(entries.filter(({ refused }) => refused !== null).map(({ swapId }) => swapId))
  return entries.find(entry => entry.personId === personId && !stuck.has(entry.swapId))
}

export function withRefusal(entries: readonly OutboxEntry[], key: string, refused: Problem | null): OutboxEntry[] {
  return entries.map(entry => entry.key === key ? { ...entry, refused } : entry)
}

/** An entry was taken and the swap stands at `to`: those that were to follow on it follow on that. */
export function following(entries: readonly OutboxEntry[], { swapId, rev }: OutboxEntry, to: number): OutboxEntry[] {
  return entries.map(entry => entry.swapId === swapId && entry.rev === rev ? { ...entry, rev: to } : entry)
}

export async function fileBodyOf(file: File, mediaType: string): Promise<OutboxEntry['body']> {
  return { kind: 'file', name: file.name, mediaType, bytes: new Uint8Array(await file.arrayBuffer()) }
}
