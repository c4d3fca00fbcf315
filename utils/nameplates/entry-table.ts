import { entryTableFaults } from '#shared/settings/entry-table/faults'
import { entryTableSchema, roundings, type EntryColumn, type EntryParameter, type EntryTable } from '#shared/settings/entry-table/schema'
import type { AxisKind } from '#shared/settings/types'
import { numberOrText } from '../forms/fields'

/** One row of the entry table as its form holds it: all texts. A column of zones or moves has no number. */
export interface EntryRow { number: string, name: string, field: string, unit: string, factor: string, step: string, digits: string, rounding: string, words: string, none: string }
export type EntryPart = 'parameters' | 'zones' | 'moves'
export interface EntryDraft {
  delimiter: EntryTable['delimiter']
  decimal: EntryTable['decimal']
  header: string
  columns: Record<keyof EntryTable['columns'], string>
  parameters: EntryRow[]
  zones: EntryRow[]
  moves: EntryRow[]
}

export const emptyRow = (): EntryRow => ({ number: '', name: '', field: '', unit: '', factor: '', step: '', digits: '', rounding: '', words: '', none: '' })

/** A table to begin with: semicolons, one header line, and the columns that each zone and move needs. */
export const newEntryDraft = (): EntryDraft => ({
  delimiter: ';', decimal: 'point', header: 'Number;Name;Value;Unit', columns: { number: '1', name: '2', value: '3', unit: '4' },
  parameters: [emptyRow()], zones: [], moves: ['move', 'kind', 'target', 'speed', 'acceleration'].map(field => ({ ...emptyRow(), field })),
})

const text = (value: string | number | undefined) => value === undefined ? '' : String(value)
const rowOf = (entry: EntryColumn & Partial<EntryParameter>): EntryRow => ({
  number: text(entry.number), name: text(entry.name), field: entry.field, unit: text(entry.unit), factor: text(entry.factor), step: text(entry.step), digits: text(entry.digits),
  rounding: text(entry.rounding), words: Object.entries(entry.words ?? {}).map(([word, own]) => `${word}=${own}`).join(', '), none: text(entry.none),
})

/** The form of a table; undefined for a model that has none. */
export function entryDraftOf(table: EntryTable | undefined): EntryDraft | undefined {
  if (table === undefined) return undefined
  const { number, name, value, unit } = table.columns
  return {
    delimiter: table.delimiter, decimal: table.decimal, header: table.header.join('\n'),
    columns: { number: text(number), name: text(name), value: text(value), unit: text(unit) },
    parameters: table.parameters.map(entry => rowOf({ ...entry, name: entry.name ?? '' })), zones: table.zones.map(rowOf), moves: table.moves.map(rowOf),
  }
}

/** `extend=0, retract=1` by word; a part without a sign is kept whole, so that the schema names it. */
function wordsIn(words: string): Record<string, string> | undefined {
  const parts = words.split(',').map(part => part.trim()).filter(part => part !== '')
  return parts.length === 0
    ? undefined
    : Object.fromEntries(parts.map((part) => {
        const at = part.indexOf('=')
        return at === -1 ? [part, ''] : [part.slice(0, at).trim(), part.slice(at + 1).trim()]
      }))
}

function entryOf({ number, name, field, unit, factor, step, digits, rounding, words, none }: EntryRow, part: EntryPart): Record<string, unknown> {
  const whole = (value: string) => value.trim() === '' ? undefined : numberOrText(value)
  const entry = {
    ...(part === 'parameters' ? { number: number.trim() } : {}), name: name.trim() || undefined, field: field.trim(), unit: unit.trim() || undefined,
    factor: whole(factor), step: whole(step), digits: whole(digits), rounding: rounding || undefined, words: wordsIn(words), none: none.trim() || undefined,
  }
  return Object.fromEntries(Object.entries(entry).filter(([, value]) => value !== undefined))
}

const isBlank = (row: EntryRow) => Object.values(row).every(value => value.trim() === '')

/** What the form says as a table, whether it holds or not; rows with nothing in them are left away. */
export function entryBody(draft: EntryDraft): Record<string, unknown> {
  const rows = (part: EntryPart) => draft[part].filter(row => !isBlank(row)).map(row => entryOf(row, part))
  return {
    delimiter: draft.delimiter, decimal: draft.decimal, header: draft.header === '' ? [] : draft.header.split('\n'),
    columns: Object.fromEntries(Object.entries(draft.columns).map(([key, value]) => [key, value.trim() === '' ? 0 : numberOrText(value)])),
    parameters: rows('parameters'), zones: rows('zones'), moves: rows('moves'),
  }
}

export interface EntryFinding { readonly part: EntryPart | undefined, readonly row: number | undefined, readonly message: string }
export type EntryJudged = { readonly table: EntryTable, readonly findings: readonly [] } | { readonly table: undefined, readonly findings: readonly EntryFinding[] }

/** The table that the form says, or all that keeps it from being used, each at its row. */
export function judgeEntry(draft: EntryDraft, axisKind: AxisKind): EntryJudged {
  const parsed = entryTableSchema.safeParse(entryBody(draft))
  const faults = parsed.success
    ? entryTableFaults(parsed.data, axisKind)
    : parsed.error.issues.map(({ path, message }) => ({ path: path.map(part => typeof part === 'number' ? part : String(part)), message: `${String(path.at(-1) ?? '')}: ${message}` }))
  if (parsed.success && faults.length === 0) return { table: parsed.data, findings: [] }
  return { table: undefined, findings: faults.map(({ path, message }) => findingOf(path, message, draft)) }
}

function findingOf(path: readonly (string | number)[], message: string, draft: EntryDraft): EntryFinding {
  const part = (['parameters', 'zones', 'moves'] as const).find(each => each === path[0])
  const sent = typeof path[1] === 'number' ? path[1] : undefined
  if (part === undefined || sent === undefined) return { part, row: undefined, message }
  const filled = draft[part].flatMap((row, index) => isBlank(row) ? [] : [index])
  return { part, row: filled[sent], message }
}

export const roundingOptions = [{ value: '', label: 'half-even' }, ...roundings.slice(1).map(value => ({ value, label: value }))]
