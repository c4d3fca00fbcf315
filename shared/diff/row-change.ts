import type { ExtraValue } from '../settings/types'
import { changeOf } from './change'
import { difference } from './measure'
import type { FieldRule } from './rules'
import type { FieldChange } from './types'

/**
 * As changeOf, of a field of a row. What nearly all of a long difference consists of is written out here, since a literal
 * takes a third of the time of a record that is filled key by key.
 */
export function rowChange(
  rule: FieldRule, at: string, section: 'zone' | 'move', row: number, before: ExtraValue | undefined, after: ExtraValue | undefined, sameMotion: boolean,
): FieldChange {
  const { field, unit, weight, watched } = rule
  if (!sameMotion && unit !== undefined) {
    if (typeof before === 'number' && typeof after === 'number') {
      const delta = difference(before, after, false)
      if (unit === '%') return { at, section, row, field, before, after, unit, delta, points: delta, weight, watched }
      if (before !== 0) return { at, section, row, field, before, after, unit, delta, percent: 100 * delta / Math.abs(before), weight, watched }
    }
    if (before === undefined && after !== undefined) return { at, section, row, field, after, unit, weight, watched }
    if (after === undefined && before !== undefined) return { at, section, row, field, before, unit, weight, watched }
  }
  if (!sameMotion && typeof before === 'string' && typeof after === 'string' && unit === undefined) return { at, section, row, field, before, after, weight, watched }
  return changeOf(rule, { at, section, row }, before, after, sameMotion)
}
