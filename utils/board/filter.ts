import type { BoardAxis } from '#shared/api/board'
import { lackWords } from '~/utils/words/readiness'
import { weightWords } from '~/utils/strip-words'

export const filters = ['all', 'in-line', 'off', 'unmarked', 'never-read', 'overdue', 'stop', 'not-ready'] as const
export type Filter = (typeof filters)[number]

export const filterWords: Record<Filter, string> = {
  'all': 'all', 'in-line': 'in line', 'off': 'off', 'unmarked': 'no known-good', 'never-read': 'no upload', 'overdue': 'overdue', 'stop': 'with a stop', 'not-ready': 'not restorable',
}

/** Whether an axis belongs under a filter; the first four after `all` exclude one another. */
export function fits(axis: BoardAxis, filter: Filter): boolean {
  if (filter === 'all') return true
  if (filter === 'overdue') return axis.overdueSince !== null
  if (filter === 'not-ready') return axis.lacks.length > 0
  if (filter === 'stop') return axis.checks.stop > 0
  return axis.status === filter
}

/** How many axes each filter would leave. */
export function countFilters(axes: readonly BoardAxis[]): Record<Filter, number> {
  const counts = Object.fromEntries(filters.map(filter => [filter, 0])) as Record<Filter, number>
  for (const axis of axes) for (const filter of filters) if (fits(axis, filter)) counts[filter] += 1
  return counts
}

/** What a row says in lower case, a cell a line, made once and searched as one types. */
export interface Searchable { readonly axis: BoardAxis, readonly words: string }

export function searchable(axes: readonly BoardAxis[]): Searchable[] {
  return axes.map(axis => ({ axis, words: `\n${wordsOf(axis).toLowerCase()}\n` }))
}

function wordsOf(axis: BoardAxis): string {
  const state = axis.status === 'off' ? `off ${weightWords(axis.off)}` : filterWords[axis.status]
  return [axis.tag, axis.machine, axis.line, axis.site, axis.role, axis.serial, axis.model, state, axis.knownGood && `v${axis.knownGood.number}`, axis.swap && (axis.swap.runningSince ? 'swap not released' : 'swap open'), ...axis.lacks.map(lack => lackWords[lack])].filter(Boolean).join('\n')
}

/** The axes under a filter whose row holds every word of the text, wherever it stands; words in quotes are one whole cell. */
export function findAxes(rows: readonly Searchable[], text: string, filter: Filter): BoardAxis[] {
  const wanted = [...text.toLowerCase().matchAll(/"([^"]+)"|[^\s"]+/g)].map(match => (match[1] ? `\n${match[1]}\n` : match[0]))
  const found: BoardAxis[] = []
  for (const { axis, words } of rows) if (fits(axis, filter) && wanted.every(word => words.includes(word))) found.push(axis)
  return found
}
