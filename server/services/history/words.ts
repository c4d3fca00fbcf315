import type { HistoryItem } from '#shared/api/history'
import type { ExtraValue } from '#shared/settings/types'
import { spokenPlace } from '../change-words'

/** A value as files say it; '' where it is not set. */
export function valueText(value: ExtraValue | null, unit: string | null): string {
  if (value === null) return ''
  if (typeof value === 'object') return `${value.value} ${value.unit}`
  return unit === null ? String(value) : `${String(value)} ${unit}`
}

/** One side of a change, and beside it the force that a percentage means. */
export function sideText({ unit, newtons, ...change }: Pick<HistoryItem, 'before' | 'after' | 'unit' | 'newtons'>, side: 'before' | 'after'): string {
  const value = change[side]
  const force = newtons?.[side] ?? null
  return value === null ? 'not set' : `${valueText(value, unit)}${force === null ? '' : ` (${force})`}`
}

export const placeText = ({ section, row, field }: HistoryItem): string => spokenPlace({ section, field, ...(row === null ? {} : { row }) })

/** Why, by whoever said it: the reason of the version, its work order, what was said of the finding. */
export function whyText({ reason, workOrder, findingId, findingState, explanation, explainedBy }: HistoryItem): string {
  const finding = findingId === null ? [] : [`finding ${findingId} ${findingState ?? ''}${explanation === null || explanation === reason ? '' : `: ${explanation} (${explainedBy ?? ''})`}`]
  return [reason ?? '', workOrder ?? '', ...finding].filter(Boolean).join(', ') || 'no reason given'
}

export const changerText = ({ changedBy }: HistoryItem): string => changedBy ?? 'Nobody named'

export const marksText = ({ late, void: wrong }: HistoryItem): string => [late ? 'late' : '', wrong ? 'void' : ''].filter(Boolean).join(', ')
