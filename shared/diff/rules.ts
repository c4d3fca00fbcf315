import { setupFields, type SetupField, type SetupFieldName, type UnitByKind } from '../settings/fields'
import { moveFields, zoneFields, type RowField } from '../settings/move-fields'
import type { AxisKind, Weight } from '../settings/types'
import type { DiffContext } from './types'
import { watching } from './watched'
import { extraWeight, moveWeight } from './weight'

/** What every change of one field has in common on one axis. */
export interface FieldRule {
  readonly field: string
  readonly unit?: string
  readonly weight: Weight
  readonly watched: boolean
  /** Watched because the planners of the site added it. */
  readonly added: boolean
  /** The drive's own number: any double, not only whole millionths. */
  readonly driveOwn: boolean
  /** A field of extra: its unit may stand beside the value. */
  readonly fromValue: boolean
}

/** The field tables as one axis reads them: units by its kind, weights and watching by its context. */
export interface Rules {
  readonly axisKind: FieldRule
  /** In the order of the field tables, as `zone` is. */
  readonly move: readonly FieldRule[]
  readonly zone: readonly FieldRule[]
  readonly setup: (name: SetupFieldName) => FieldRule
  readonly extra: (key: string) => FieldRule
}

const plain = { driveOwn: false, fromValue: false }
const axisKindRule: FieldRule = { field: 'axisKind', weight: 'harm', watched: true, added: false, ...plain }

/** Rules of one axis kind and context; without an axis flag no motion field weighs harm. */
export function rulesFor(kind: AxisKind, context: DiffContext): Rules {
  const watch = watching(context)
  const rows = (fields: Readonly<Record<string, RowField>>, weigh: (field: RowField) => Weight): FieldRule[] =>
    Object.entries(fields).map(([field, entry]) =>
      ({ field, ...unitOf(entry.unit, kind), weight: weigh(entry), ...watch(field, entry.watched), ...plain }))
  return {
    axisKind: axisKindRule,
    move: rows(moveFields, (field) => moveWeight(field.weight, context.flags ?? [])),
    zone: rows(zoneFields, (field) => field.weight),
    setup: (name) => {
      const entry: SetupField = setupFields[name]
      const numeric = entry.type === 'number' ? entry : undefined
      return {
        field: name, ...unitOf(numeric?.unit, kind), weight: entry.weight, ...watch(name, entry.watched),
        driveOwn: numeric?.driveOwn ?? false, fromValue: false,
      }
    },
    extra: (key) => {
      const dictionary = context.dictionary ?? {}
      const entry = Object.hasOwn(dictionary, key) ? dictionary[key] : undefined
      const weight = extraWeight(entry)
      const unit = entry?.unit === undefined ? {} : { unit: entry.unit }
      return { field: key, ...unit, weight, ...watch(`extra:${key}`, weight === 'harm'), driveOwn: true, fromValue: true }
    },
  }
}

function unitOf(unit: UnitByKind | undefined, kind: AxisKind): { unit?: string } {
  const name = unit?.[kind]
  return name ? { unit: name } : {}
}
