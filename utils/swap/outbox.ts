import { problemSchema, type Problem } from '#shared/api/common'
import { z } from 'zod'

/*
 * What was entered without reception waits in this browser, in the order in which it was entered, each under the
 * Idempotency-Key it was first tried with: sent twice it counts once.
 */

const jsonBody = z.object({ kind: z.literal('json'), value: z.record(z.string(), z.unknown()) })
/** A file by its bytes, base 64. */
const fileBody = z.object({ kind: z.literal('file'), name: z.string(), mediaType: z.string(), base64: z.string() })

const entrySchema = z.object({
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
export type OutboxBody = OutboxEntry['body']

/** What a browser kept; entries that this version cannot read are left out rather than sent wrong. */
export function readOutbox(text: string): OutboxEntry[] {
  const list = z.array(z.unknown()).safeParse(jsonOf(text))
  return (list.data ?? []).flatMap((one) => {
    const read = entrySchema.safeParse(one)
    return read.success ? [read.data] : []
  })
}

function jsonOf(text: string): unknown {
  try {
    return JSON.parse(text)
  }
  catch {
    return undefined
  }
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

/** Largest file that is kept for later, in bytes: a browser keeps about five million characters in all. */
export const keptFileLimit = 1024 * 1024

export async function fileBodyOf(file: File, mediaType: string): Promise<OutboxBody> {
  const bytes = new Uint8Array(await file.arrayBuffer())
  let binary = ''
  for (let at = 0; at < bytes.length; at += 0x8000) binary += String.fromCharCode(...bytes.subarray(at, at + 0x8000))
  return { kind: 'file', name: file.name, mediaType, base64: btoa(binary) }
}

export function bytesOf(base64: string): Uint8Array<ArrayBuffer> {
  return Uint8Array.from(atob(base64), letter => letter.charCodeAt(0))
}
