import { z } from 'zod'
import { CodedError } from '../errors/coded'
import { canonicalJson } from '../settings/canonical'
import { isCanonicalText } from '../settings/is-canonical'
import { acts, isAct, type Act } from './acts'

/*
 * A log entry as it is stored and hashed. The leaf is the UTF-8 of the RFC 8785 form of one object:
 *
 *   {"act":"site-changed","actor":{"id":3,"kind":"person","name":"Runa Haldersen"},"at":"2026-03-09T14:32:00.000Z",
 *    "note":null,"seq":41,"state":{"fourEyes":true,…},"subject":{"id":1,"kind":"site"},"v":1}
 *
 * state is the whole new state of the subject, never a difference and never a secret. A v of 2 would mean another set of
 * keys; entries of v 1 stay as they are and are read by their own v for good.
 */

export type Json = string | number | boolean | null | readonly Json[] | { readonly [key: string]: Json }

const subjectKinds = [...new Set(Object.values(acts))] as [string, ...string[]]
const jsonSchema: z.ZodType<Json> = z.lazy(() => z.union([z.string(), z.number(), z.boolean(), z.null(), z.array(jsonSchema), z.record(z.string(), jsonSchema)]))

export const actorSchema = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('person'), id: z.int().positive(), name: z.string() }),
  z.strictObject({ kind: z.literal('token'), id: z.int().positive(), name: z.string(), ownerId: z.int().positive() }),
  /** The vault itself: set-up and work that nobody asked for. */
  z.strictObject({ kind: z.literal('vault'), name: z.string() }),
])
export type EntryActor = z.infer<typeof actorSchema>

export const entrySchema = z.strictObject({
  v: z.literal(1),
  seq: z.int().nonnegative(),
  at: z.iso.datetime({ precision: 3 }),
  actor: actorSchema,
  act: z.string().refine(isAct, 'an act of the list'),
  subject: z.strictObject({ kind: z.enum(subjectKinds), id: z.union([z.int().positive(), z.string()]) }),
  state: z.record(z.string(), jsonSchema),
  note: z.string().nullable(),
})
export interface Entry {
  readonly v: 1
  /** Counts from 0 without gaps. */
  readonly seq: number
  readonly at: string
  readonly actor: EntryActor
  readonly act: Act
  readonly subject: { readonly kind: (typeof acts)[Act], readonly id: number | string }
  readonly state: Readonly<Record<string, Json>>
  readonly note: string | null
}

export type EntryErrorCode = 'entry-unreadable' | 'entry-not-canonical' | 'entry-subject'
export class EntryError extends CodedError<EntryErrorCode> {}

/** The leaf text of an entry; `parseLeaf` is its inverse. Throws `not-canonical` on undefined and on numbers that JSON cannot hold. */
export function formatLeaf(entry: Entry): string {
  return canonicalJson(entry)
}

/** Accepts only what `formatLeaf` would print; throws EntryError, and names what is wrong. */
export function parseLeaf(leaf: string): Entry {
  const entry = read(leaf)
  if (acts[entry.act] !== entry.subject.kind) throw new EntryError('entry-subject', `${entry.act} is about a ${acts[entry.act]}, not a ${entry.subject.kind}.`)
  if (!isCanonicalText(leaf, entry)) throw new EntryError('entry-not-canonical', `Entry ${entry.seq} is not in its canonical form.`, { seq: entry.seq })
  return entry
}

function read(leaf: string): Entry {
  let value: unknown
  try {
    value = JSON.parse(leaf)
  }
  catch {
    throw new EntryError('entry-unreadable', 'The entry is not JSON.')
  }
  if (isEntry(value)) return value
  const parsed = entrySchema.safeParse(value)
  if (!parsed.success) throw new EntryError('entry-unreadable', z.prettifyError(parsed.error))
  return parsed.data as Entry
}

/** What the schema says of a value that JSON.parse made, many times faster: a log of millions is read entry by entry. */
function isEntry(value: unknown): value is Entry {
  if (!isObject(value) || Object.keys(value).length !== 8) return false
  const { v, seq, at, actor, act, subject, state, note } = value
  return v === 1 && isCount(seq) && isInstant(at) && isActor(actor) && typeof act === 'string' && isAct(act)
    && isObject(subject) && Object.keys(subject).length === 2 && kinds.has(subject.kind) && (isId(subject.id) || typeof subject.id === 'string')
    && isObject(state) && (typeof note === 'string' || note === null)
}

const kinds: ReadonlySet<unknown> = new Set(subjectKinds)
const isObject = (value: unknown): value is Readonly<Record<string, unknown>> => typeof value === 'object' && value !== null && !Array.isArray(value)
const isCount = (value: unknown) => Number.isSafeInteger(value) && (value as number) >= 0
const instant = /^\d{4}-(?:0[1-9]|1[0-2])-(?:0[1-9]|[12]\d|3[01])T(?:[01]\d|2[0-3]):[0-5]\d:[0-5]\d\.\d{3}Z$/
/** RFC 3339 UTC with milliseconds; every month has 28 days, and a Date makes of a day that there is not another one. */
const isInstant = (value: unknown) => typeof value === 'string' && instant.test(value)
  && (value.slice(8, 10) <= '28' || new Date(value).getUTCDate() === Number(value.slice(8, 10)))
const isId = (value: unknown) => isCount(value) && value !== 0
const membersOfActor: Readonly<Record<string, number>> = { person: 3, token: 4, vault: 2 }

function isActor(value: unknown): boolean {
  if (!isObject(value) || typeof value.name !== 'string' || typeof value.kind !== 'string' || Object.keys(value).length !== membersOfActor[value.kind]) return false
  return value.kind === 'vault' || (isId(value.id) && (value.kind === 'person' || isId(value.ownerId)))
}
