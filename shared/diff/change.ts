import type { ExtraValue } from '../settings/types'
import { amount, difference, unitBeside } from './measure'
import type { FieldRule } from './rules'
import type { FieldChange, Section } from './types'

type Draft = { -readonly [Key in keyof FieldChange]: FieldChange[Key] }

/** Where a change stands: its pointer, and the number of the zone or move it belongs to. */
export interface Place { readonly at: string, readonly section: Section, readonly row: number | undefined }

/**
 * One change record. `percent` is absent at before = 0 and for percentages, which have `points`. A default written out
 * (`sameMotion`) weighs text and is watched only where the site added its field.
 */
export function changeOf(rule: FieldRule, place: Place, before: ExtraValue | undefined, after: ExtraValue | undefined, sameMotion: boolean): FieldChange {
  const { at, section, row } = place
  const { field, unit } = rule
  const change = { at, section } as Draft
  if (row !== undefined) change.row = row
  change.field = field
  if (before !== undefined) change.before = before
  if (after !== undefined) change.after = after
  if (rule.fromValue) setOwnMeasures(change, rule)
  else {
    if (unit !== undefined) change.unit = unit
    if (typeof before === 'number' && typeof after === 'number') setMeasures(change, before, after, rule.driveOwn)
  }
  change.weight = sameMotion ? 'text' : rule.weight
  change.watched = sameMotion ? rule.added : rule.watched
  return change
}

/** A value of extra brings its unit along, or has the dictionary's; two units have no difference. */
function setOwnMeasures(change: Draft, rule: FieldRule): void {
  const from = amount(change.before)
  const to = amount(change.after)
  if (from !== undefined && to !== undefined && unitBeside(change.before) !== unitBeside(change.after)) return
  const unit = unitBeside(change.after) ?? unitBeside(change.before) ?? (from === undefined && to === undefined ? undefined : rule.unit)
  if (unit !== undefined) change.unit = unit
  if (from !== undefined && to !== undefined) setMeasures(change, from, to, rule.driveOwn)
}

function setMeasures(change: Draft, before: number, after: number, driveOwn: boolean): void {
  const delta = difference(before, after, driveOwn)
  change.delta = delta
  if (change.unit === '%') change.points = delta
  else if (before !== 0) change.percent = 100 * delta / Math.abs(before)
}
