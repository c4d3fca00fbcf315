import type { SetupFieldName } from '../settings/fields'
import type { MoveFieldName, ZoneFieldName } from '../settings/move-fields'
import type { AxisKind } from '../settings/types'
import { amount } from './measure'
import { rulesFor } from './rules'
import type { FieldChange } from './types'

/** The axis kind of the first content where the kind changed; else undefined, and units stay what they are. */
export function otherKindOf(changes: readonly FieldChange[]): AxisKind | undefined {
  return changes.find(change => change.section === 'file')?.before as AxisKind | undefined
}

/** One change the other way round, at another index of its table where it stands on both sides. */
export function swapSides(change: FieldChange, otherKind: AxisKind | undefined, index?: (index: number) => number): FieldChange {
  const { section, row, field, before, after, delta, points, weight, watched, affects } = change
  const both = before !== undefined && after !== undefined
  const unit = both && otherKind ? unitIn(change, otherKind) : change.unit
  const base = amount(after)
  return {
    at: index && before !== undefined ? atIndex(change.at, index) : change.at,
    section,
    ...row === undefined ? {} : { row },
    field,
    ...after === undefined ? {} : { before: after },
    ...before === undefined ? {} : { after: before },
    ...unit === undefined ? {} : { unit },
    ...delta === undefined ? {} : { delta: 0 - delta },
    ...delta === undefined || points !== undefined || !base ? {} : { percent: 100 * (0 - delta) / Math.abs(base) },
    ...points === undefined ? {} : { points: 0 - points },
    weight,
    watched,
    ...affects === undefined ? {} : { affects },
  }
}

function atIndex(at: string, index: (index: number) => number): string {
  const [, table, from, field] = at.split('/')
  return `/${table}/${index(Number(from))}/${field}`
}

function unitIn({ section, field, unit }: FieldChange, kind: AxisKind): string | undefined {
  const rules = rulesFor(kind, {})
  if (section === 'setup') return rules.setup(field as SetupFieldName).unit
  if (section === 'move') return rules.move[field as MoveFieldName].unit
  if (section === 'zone') return rules.zone[field as ZoneFieldName].unit
  return unit
}
