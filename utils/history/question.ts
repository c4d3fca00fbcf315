import { historyKinds, type HistoryItem, type HistoryKind } from '#shared/api/history'
import { families, familyNames, fieldsNamed } from '#shared/settings/families'
import { setupFieldNames, setupFields } from '#shared/settings/fields'
import { moveFieldNames, moveFields, zoneFieldNames, zoneFields } from '#shared/settings/move-fields'
import type { ValuePlace } from '#shared/settings/value-place'
import { counted } from '../format'
import { toInstant } from '../forms/zoned'

/** What the page asks, as its address holds it: all texts, '' = not asked. Days are days of the zone shown. */
export const questionKeys = ['field', 'kind', 'row', 'axis', 'machine', 'line', 'site', 'unit', 'by', 'weight', 'from', 'to'] as const
export type Question = Record<(typeof questionKeys)[number], string>

export function questionOf(query: Readonly<Record<string, unknown>>): Question {
  return Object.fromEntries(questionKeys.map(key => [key, typeof query[key] === 'string' ? query[key] : ''])) as Question
}

/** Only what is asked stands in the address. */
export const addressQuery = (question: Question): Partial<Question> => Object.fromEntries(Object.entries(question).filter(([, value]) => value !== ''))

const nextDay = (day: string) => new Date(Date.parse(`${day}T00:00:00Z`) + 86_400_000).toISOString().slice(0, 10)
const isDay = (text: string) => /^\d{4}-\d{2}-\d{2}$/.test(text)

/** The days of a question as instants: the whole of its last day counts. */
export function stretchOf({ from, to }: Question, zone: string): { from?: string, to?: string } {
  return { ...(isDay(from) && { from: toInstant(`${from}T00:00`, zone) }), ...(isDay(to) && { to: toInstant(`${nextDay(to)}T00:00`, zone) }) }
}

/** The question as the routes take it. */
export function apiQuery(question: Question, zone: string): Record<string, string> {
  const { kind: _kind, axis, from: _from, to: _to, ...rest } = question
  return { ...addressQuery({ ...rest, axis: '', kind: '', from: '', to: '' }), ...(axis !== '' && { axis: `tag:${axis}` }), ...stretchOf(question, zone) }
}

export interface FieldGroup { readonly label: string, readonly options: readonly { readonly value: string, readonly label: string }[] }

const kindWords: Readonly<Record<HistoryKind, string>> = {
  settings: 'the terms of a site, what it watches', places: 'a line, a machine, an axis', nameplates: 'a nameplate', rules: 'a site rule', people: 'people and their roles', marks: 'what is known-good',
}
export const isKind = (text: string): text is HistoryKind => (historyKinds as readonly string[]).includes(text)

/** What may stand behind "Who changed". */
export const fieldGroups: readonly FieldGroup[] = [
  { label: 'together', options: familyNames.map(value => ({ value, label: families[value].words })) },
  { label: 'setup', options: setupFieldNames.map(value => ({ value, label: `the ${setupFields[value].group === 'homing' ? 'homing ' : ''}${setupFields[value].label}` })) },
  { label: 'moves', options: moveFieldNames.map(name => ({ value: `move.${name}`, label: `the ${moveFields[name].label} of a move` })) },
  { label: 'zones', options: zoneFieldNames.map(name => ({ value: `zone.${name}`, label: `the ${zoneFields[name].label} of a zone` })) },
  { label: 'beside settings', options: historyKinds.map(kind => ({ value: `kind:${kind}`, label: kindWords[kind] })) },
]

/** 'any force limit', 'the thrust limit', 'K-017'. */
export function fieldWords({ field, kind }: Question): string {
  const value = kind === '' ? field : `kind:${kind}`
  return fieldGroups.flatMap(({ options }) => options).find(option => option.value === value)?.label ?? (field.replace(/^extra:/, '') || 'anything')
}

/** The one value that a question is about, where it names an axis and a single field, with its row if it has rows. */
export function placeAsked({ field, row, axis, kind }: Question): ValuePlace | undefined {
  if (axis === '' || field === '' || kind !== '') return undefined
  const names = fieldsNamed(field)
  const [name] = names
  if (name === undefined || names.length > 1) return undefined
  const rowed = name.section === 'move' || name.section === 'zone'
  if (!rowed) return name
  return /^\d{1,5}$/.test(row) ? { ...name, row: Number(row) } : undefined
}

/** 'LID-03.Z: 5 changes. 4 by somebody named. 1 by nobody named.' */
export function answerWords({ axis }: Question, items: readonly HistoryItem[], more: boolean): { readonly head: string, readonly open: string } {
  const open = items.filter(({ changedBy }) => changedBy === null).length
  const head = `${axis === '' ? '' : `${axis}: `}${items.length === 0 ? 'no change' : `${more ? 'the newest ' : ''}${counted(items.length, 'change', 'changes')}`}.`
  return { head: head.charAt(0).toUpperCase() + head.slice(1), open: open === 0 ? '' : `${open} by nobody named.` }
}
