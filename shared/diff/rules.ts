import { setupFields, type SetupField, type SetupFieldName, type UnitByKind } from '../settings/fields'
import { moveFieldNames, moveFields, zoneFields, type MoveFieldName, type RowField, type ZoneFieldName } from '../settings/move-fields'
import type { AxisKind, Weight } from '../settings/types'
import type { DiffContext } from './types'
import { watching } from './watched'
import { extraWeight, moveWeight } from './weight'

/** What every change of one field has in common on one axis. */
export interface FieldRule {
  readonly field: string
  readonly unit: string | undefined
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
  readonly move: Readonly<Record<MoveFieldName, FieldRule>>
  /** Those of `move` in the order of moveFieldNames. */
  readonly moveByRank: readonly FieldRule[]
  /** Which of them weigh harm and which motion, as bits by rank; the rest weighs text. */
  readonly moveWeights: { readonly harm: number, readonly motion: number }
  readonly zone: Readonly<Record<ZoneFieldName, FieldRule>>
  readonly setup: (name: SetupFieldName) => FieldRule
}

const plain = { driveOwn: false, fromValue: false }
const axisKindRule: FieldRule = { field: 'axisKind', unit: undefined, weight: 'harm', watched: true, added: false, ...plain }

/** Rules of one axis kind and context; without an axis flag no motion field weighs harm. */
export function rulesFor(kind: AxisKind, context: DiffContext): Rules {
  if (context.watched?.length) return tablesFor(kind, context)
  return (context.flags?.length ? flaggedTables : bareTables)[kind]
}

/** Where the planners of the site added no field, which is nearly everywhere, all that counts is whether there is a flag at all. */
const bareTables: Readonly<Record<AxisKind, Rules>> = { linear: tablesFor('linear', {}), rotary: tablesFor('rotary', {}) }
const flaggedTables: Readonly<Record<AxisKind, Rules>> = { linear: tablesFor('linear', { flags: ['gravity'] }), rotary: tablesFor('rotary', { flags: ['gravity'] }) }

function tablesFor(kind: AxisKind, context: DiffContext): Rules {
  const watch = watching(context)
  const rows = <Name extends string>(fields: Readonly<Record<Name, RowField>>, weigh: (field: RowField) => Weight) =>
    Object.fromEntries(Object.entries<RowField>(fields).map(([field, entry]) =>
      [field, { field, unit: unitOf(entry.unit, kind), weight: weigh(entry), ...watch(field, entry.watched), ...plain }])) as Record<Name, FieldRule>
  const move = rows(moveFields, field => moveWeight(field.weight, context.flags ?? []))
  const moveByRank = moveFieldNames.map(name => move[name])
  const ranksOf = (weight: Weight) => moveByRank.reduce((bits, rule, rank) => rule.weight === weight ? bits | 1 << rank : bits, 0)
  return {
    axisKind: axisKindRule,
    move,
    moveByRank,
    moveWeights: { harm: ranksOf('harm'), motion: ranksOf('motion') },
    zone: rows(zoneFields, field => field.weight),
    setup: (name) => {
      const entry: SetupField = setupFields[name]
      const numeric = entry.type === 'number' ? entry : undefined
      return {
        field: name, unit: unitOf(numeric?.unit, kind), weight: entry.weight, ...watch(name, entry.watched),
        driveOwn: numeric?.driveOwn ?? false, fromValue: false,
      }
    },
  }
}

/** Rule of a drive's own key: the dictionary's word, else motion, copied as it is. */
export function extraRule(key: string, context: DiffContext): FieldRule {
  const dictionary = context.dictionary ?? {}
  const entry = Object.hasOwn(dictionary, key) ? dictionary[key] : undefined
  const weight = extraWeight(entry)
  return { field: key, unit: entry?.unit, weight, ...watching(context)(`extra:${key}`, weight === 'harm'), driveOwn: true, fromValue: true }
}

/** undefined for words and for bare numbers. */
function unitOf(unit: UnitByKind | undefined, kind: AxisKind): string | undefined {
  return unit?.[kind] || undefined
}
