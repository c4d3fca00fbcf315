import { weights, type Weight } from '../settings/types'
import type { FieldChange } from './types'

/**
 * How many differences there are of each weight, as a person counts: a zone or move that is new or gone is one, of its
 * heaviest weight, however many fields it has. The zeros too.
 */
export function countByWeight(changes: readonly FieldChange[]): Record<Weight, number> {
  const counts: Record<Weight, number> = { harm: 0, motion: 0, text: 0 }
  const rows = new Map<string, Weight>()
  const whole = wholeRows(changes)
  for (const change of changes) {
    const key = rowKey(change)
    if (whole.has(key)) rows.set(key, heavier(rows.get(key), change.weight))
    else counts[change.weight] += 1
  }
  for (const weight of rows.values()) counts[weight] += 1
  return counts
}

/** The weightiest of the weights that occur; undefined where nothing changed. */
export function heaviest(changes: readonly FieldChange[]): Weight | undefined {
  return weights.find(weight => changes.some(change => change.weight === weight))
}

/** The row that a change stands in, and which side lacks the value: in the renumbered reading a gone and a new row may bear one number. */
const rowKey = ({ at, before, after }: FieldChange) => `${at.split('/', 3).join('/')} ${before === undefined ? 'new' : after === undefined ? 'gone' : 'edited'}`
const heavier = (a: Weight | undefined, b: Weight): Weight => a === undefined || weights.indexOf(b) < weights.indexOf(a) ? b : a

/** Rows of which every field came or went: `kind` of a move and `from` of a zone are never absent in a row that stays. */
function wholeRows(changes: readonly FieldChange[]): ReadonlySet<string> {
  const whole = changes.filter(({ section, field, before, after }) => (section === 'move' ? field === 'kind' : section === 'zone' && field === 'from') && (before === undefined || after === undefined))
  return new Set(whole.map(rowKey))
}
