import { toInstant, toLocal } from './zoned'

/*
 * A form is a list of fields. What stands in the inputs is a draft of texts, flags and lists; the body that travels is
 * made of it, and the schema of the route judges that body, so that page and server can never disagree.
 */

export interface Option { readonly value: string, readonly label: string }

interface Common {
  readonly name: string
  readonly label: string
  /** One sentence under the field. */
  readonly help?: string
  readonly needed?: boolean
  /** What an emptied field travels as: absent (default), null to clear, or the empty text. */
  readonly empty?: null | ''
}
export type FormField = Common & (
  | { readonly type: 'text', readonly mono?: boolean, readonly suggestions?: readonly string[], readonly example?: string }
  | { readonly type: 'long' }
  | { readonly type: 'number', readonly unit?: string }
  | { readonly type: 'choice', readonly options: readonly Option[], readonly as?: 'number' }
  /** true or false, and for an optional one neither. */
  | { readonly type: 'flag' }
  | { readonly type: 'many', readonly options: readonly Option[], readonly as?: 'number' }
  /** Texts cut at commas and line ends. */
  | { readonly type: 'list', readonly as?: 'number' }
  /** An instant, written in the local time of a zone. */
  | { readonly type: 'time', readonly zone: string }
  | { readonly type: 'password' }
  /** A row of the register, found by typing; travels as its id. */
  | { readonly type: 'pick', readonly find: (text: string) => Promise<readonly Option[]>, readonly shown?: string }
)

export type DraftValue = string | boolean | readonly string[]
export type Draft = Record<string, DraftValue>
export type Body = Record<string, unknown>

/** A number if it is one; else the text as it stands, so that the schema names it. A comma is not guessed at. */
export function numberOrText(text: string): number | string {
  const trimmed = text.trim()
  return /^[-−]?(\d+\.?\d*|\.\d+)$/.test(trimmed) ? Number(trimmed.replace('−', '-')) : trimmed
}

const cut = (text: string) => text.split(/[,\n]/).map(part => part.trim()).filter(part => part !== '')

function listOf(field: FormField, parts: readonly string[]): unknown[] {
  return 'as' in field && field.as === 'number' ? parts.map(numberOrText) : [...parts]
}

function valueOf(field: FormField, value: DraftValue | undefined): unknown {
  if (field.type === 'many') return listOf(field, Array.isArray(value) ? value : [])
  if (field.type === 'flag') return value === true || value === 'yes' ? true : value === false || value === 'no' ? false : undefined
  const text = typeof value === 'string' ? value : ''
  if (text.trim() === '') return field.empty
  if (field.type === 'list') return listOf(field, cut(text))
  if (field.type === 'time') return toInstant(text, field.zone)
  if (field.type === 'number' || field.type === 'pick' || (field.type === 'choice' && field.as === 'number')) return numberOrText(text)
  return text
}

/** The body of a draft; absent values left out. */
export function bodyOf(fields: readonly FormField[], draft: Draft): Body {
  const entries = fields.map(field => [field.name, valueOf(field, draft[field.name])] as const)
  return Object.fromEntries(entries.filter(([, value]) => value !== undefined))
}

function draftValue(field: FormField, value: unknown): DraftValue {
  if (field.type === 'many') return Array.isArray(value) ? value.map(String) : []
  if (field.type === 'flag') return value === true ? 'yes' : value === false ? 'no' : ''
  if (field.type === 'list') return Array.isArray(value) ? value.join(', ') : ''
  if (value === null || value === undefined) return ''
  return field.type === 'time' ? toLocal(String(value), field.zone) : String(value)
}

/** The draft that shows a record: the inverse of `bodyOf` for values that a form can hold. */
export function draftOf(fields: readonly FormField[], record: Readonly<Body> = {}): Draft {
  return Object.fromEntries(fields.map(field => [field.name, draftValue(field, record[field.name])]))
}

const same = (a: DraftValue | undefined, b: DraftValue | undefined) => JSON.stringify(a) === JSON.stringify(b)

/** Only what was edited, for PATCH. An emptied field travels as its `empty`, or as null where it names none. */
export function editedBody(fields: readonly FormField[], before: Draft, after: Draft): Body {
  const edited = fields.filter(field => !same(before[field.name], after[field.name]))
  return Object.fromEntries(edited.map(field => [field.name, valueOf(field, after[field.name]) ?? field.empty ?? null]))
}
