import type { HistoryAct, HistoryItem } from '#shared/api/history'
import { changeWords } from '../words/fields'
import { sayValue } from '../format'

/** Label and place of an item: 'thrust limit' in 'setup', 'target' of 'move 5'. */
export function itemWords({ section, field, row, unit }: Pick<HistoryItem, 'section' | 'field' | 'row' | 'unit'>): { readonly label: string, readonly place: string, readonly unit: string } {
  const words = changeWords({ at: '', section, field, ...(row !== null && { row }), ...(unit !== null && { unit }), weight: 'text', watched: false }, { axisKind: 'linear' })
  return { label: words.label, unit: unit ?? '', place: row === null ? section === 'extra' ? 'the drive’s own value' : section : `${section} ${row}` }
}

/** `243.2 N to 352 N`: what both percentages mean; only one where the other is not set, or nobody knows. */
export function forceSides({ before, after }: NonNullable<HistoryItem['newtons']>): string {
  if (before === null) return after === null ? '' : `now ${after}`
  return after === null ? `before ${before}` : `${before} to ${after}`
}

/** A value of a term in one line: lists by commas, what is not set as such. */
export function termWords(value: unknown): string {
  if (value === undefined || value === null) return 'not set'
  if (Array.isArray(value)) return value.length === 0 ? 'none' : value.map(termWords).join(', ')
  if (typeof value === 'object') return Object.entries(value).map(([key, part]) => `${key} ${termWords(part)}`).join(', ')
  return sayValue(value as string | number | boolean)
}

const spaced = (name: string) => name.replaceAll(/([a-z])([A-Z])/g, (_, before: string, after: string) => `${before} ${after.toLowerCase()}`)

export const actWords = ({ act }: HistoryAct): string => act.replaceAll('-', ' ')
export const termName = (field: string): string => spaced(field)
