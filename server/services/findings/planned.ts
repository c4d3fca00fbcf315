import type { FieldChange } from '#shared/diff/types'
import type { VaultDb } from '#server/database/prepared'
import { plannedChangeQueries } from '#server/database/planned-change/queries'
import type { PlannedChangeRow } from '#server/database/planned-change/table'
import { rangesOf } from '../planned-changes/ranges'
import { namedPerson } from '../versions/summary'
import type { Explaining } from './raise'

/** The field of a change as rules and plans name it: `thrustLimit`, `move.speed`, `zone.from`, `extra:K-017`. */
export function fieldName({ section, field }: Pick<FieldChange, 'section' | 'field'>): string {
  if (section === 'extra') return `extra:${field}`
  return section === 'move' || section === 'zone' ? `${section}.${field}` : field
}

/** Whether a plan has the field, and the value lies in the range of that field; a field with a range covers numbers only. */
export function covers(plan: Pick<PlannedChangeRow, 'fields' | 'min' | 'max' | 'ranges'>, change: FieldChange): boolean {
  const range = rangesOf(plan).find(({ field }) => field === fieldName(change))
  if (range === undefined) return false
  const { min, max } = range
  if (min === null && max === null) return true
  const value = typeof change.after === 'object' ? change.after.value : change.after
  return typeof value === 'number' && (min === null || value >= min) && (max === null || value <= max)
}

/**
 * What announced changes say to these of an axis, made at some time between two readings: an explanation of each plan that is
 * needed, or none where any change is covered by no plan.
 */
export function plannedExplanations(db: VaultDb, axisId: number, changes: readonly FieldChange[], from: string, to: string): Explaining[] {
  const plans = plannedChangeQueries(db).holding.all({ axisId, from, to }).map(({ plan }) => plan)
  const used = changes.map(change => plans.find(plan => covers(plan, change)))
  if (used.length === 0 || used.includes(undefined)) return []
  return [...new Set(used)].flatMap(plan => plan === undefined
    ? []
    : [{
        byPerson: plan.madeBy, plannedChangeId: plan.id, text: `Announced before: ${plan.reason.replace(/\.$/, '')}. Allowed by ${namedPerson(db, plan.allowedBy) ?? plan.allowedBy}.`,
      }])
}
