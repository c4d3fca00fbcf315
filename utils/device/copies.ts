import { z } from 'zod'
import { changeRows, putRow, rowOf } from './database'

/*
 * Copies of what a page read last, so that a reload without reception shows it again. The vault's answers say `no-store`, and
 * no cache of the browser or of the service worker has any: these few, of the swap pages alone, are kept on purpose, under
 * the person who read them. They go when that person signs out, when the vault no longer knows the session, and when anybody
 * signs in; none is made on a shared panel. Entries of the outbox are a person's own words and stay until they are sent.
 */
const copySchema = z.object({ name: z.string(), personId: z.int(), readAt: z.iso.datetime(), value: z.unknown() })
export type Copy = z.infer<typeof copySchema>

/** Name of the copy that says who was signed in when a page with copies was last read. */
export const copyOfMe = 'who is signed in'

/** How long a copy is shown, in ms: no longer than a session lives. */
const shownFor = 7 * 24 * 60 * 60 * 1000
/** Copies that are kept at most, the newest: about a dozen swaps. */
const most = 80

const readCopy = (row: unknown): Copy | undefined => copySchema.safeParse(row).data
const copiesOf = (rows: readonly unknown[]): Copy[] => rows.flatMap(row => readCopy(row) ?? [])
const newestFirst = (a: Copy, b: Copy) => (a.readAt < b.readAt ? 1 : -1)

/** What a browser that keeps nothing, or has no room left, answers: the page goes on without copies. */
async function orElse<Answer>(work: Promise<Answer>, without: Answer): Promise<Answer> {
  try {
    return await work
  }
  catch (failure) {
    if (failure instanceof DOMException) return without
    throw failure
  }
}

/** Answers whether it was kept. */
export function keepCopy(copy: Copy): Promise<boolean> {
  // What a value holds besides data, a proxy of the page above all, cannot be kept.
  const plain = { ...copy, value: JSON.parse(JSON.stringify(copy.value)) as unknown }
  return orElse(putRow('copies', plain).then(() => true), false)
}

/** The copy of a name, unless it is too old to be shown, or another person's; without a person anybody's. */
export async function copyOf(name: string, now: number, personId?: number): Promise<Copy | undefined> {
  const copy = readCopy(await orElse(rowOf('copies', name), undefined))
  return copy && isShown(copy, now) && (personId === undefined || copy.personId === personId) ? copy : undefined
}

const isShown = ({ readAt }: Copy, now: number) => now - Date.parse(readAt) < shownFor

/** Takes away what is too old, and of the rest all but the newest. */
export async function trimCopies(now: number): Promise<void> {
  await orElse(changeRows('copies', (rows) => {
    const copies = copiesOf(rows).sort(newestFirst)
    return { put: [], drop: copies.filter((copy, index) => index >= most || !isShown(copy, now)).map(({ name }) => name) }
  }), [])
}

export async function dropCopies(): Promise<void> {
  await orElse(changeRows('copies', rows => ({ put: [], drop: copiesOf(rows).map(({ name }) => name) })), [])
}
