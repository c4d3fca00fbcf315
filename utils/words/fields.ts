import type { FieldChange } from '#shared/diff/types'
import { setupField, type UnitByKind } from '#shared/settings/fields'
import { moveFields, zoneFields, type RowField } from '#shared/settings/move-fields'
import type { Dictionary, Nameplate } from '#shared/settings/nameplate'
import type { AxisKind, ExtraValue } from '#shared/settings/types'

/** What the words of a field hang on: the kind of axis, and what its model says of forces and of the drive's own values. */
export interface WordContext {
  readonly axisKind: AxisKind
  readonly nameplate?: Nameplate
}

export interface FieldWords {
  readonly label: string
  /** As it stands beside the value: '% of rated', 'mm'; '' where there is none. */
  readonly unit: string
  readonly plusMinus: boolean
}

const rowFields: Readonly<Record<'move' | 'zone', Readonly<Record<string, RowField>>>> = { move: moveFields, zone: zoneFields }

/** Fields in percent of the unit's force; the other percentages are of something else. */
const ofForce = new Set(['thrustLimit', 'thrustLimitPositive', 'thrustLimitNegative', 'overloadLevel', 'homingForceLimit', 'forceLimit'])

export const isForce = (field: string) => ofForce.has(field)

function unitWord(field: string, unit: UnitByKind | undefined, { axisKind, nameplate }: WordContext): string {
  const plain = unit?.[axisKind] ?? ''
  if (plain !== '%' || !isForce(field)) return plain
  return nameplate?.forceBase === 'peak-thrust' ? '% of peak' : '% of rated'
}

export function setupWords(field: string, context: WordContext): FieldWords {
  const entry = setupField(field)
  if (!entry) return { label: field, unit: '', plusMinus: false }
  const number = entry.type === 'number'
  return { label: entry.label, unit: number ? unitWord(field, entry.unit, context) : '', plusMinus: number && entry.plusMinus === true }
}

export function rowWords(section: 'move' | 'zone', field: string, context: WordContext): FieldWords {
  const entry = rowFields[section][field]
  if (!entry) return { label: field, unit: '', plusMinus: false }
  return { label: entry.label, unit: unitWord(field, entry.unit, context), plusMinus: entry.plusMinus === true }
}

/** An extra value has the name that its model's dictionary gives it, else its key. */
export function extraWords(key: string, dictionary: Dictionary | undefined): FieldWords {
  const entry = dictionary && Object.hasOwn(dictionary, key) ? dictionary[key] : undefined
  return { label: entry?.name ? `${entry.name} (${key})` : key, unit: entry?.unit ?? '', plusMinus: false }
}

const longLabels: Readonly<Record<string, string>> = { acceleration: 'acceleration', deceleration: 'deceleration', forceLimit: 'force limit', next: 'following move' }

/** The words of a change; in a list a field of a move is spelt out, where its table says it short. */
export function changeWords(change: FieldChange, context: WordContext): FieldWords {
  if (change.section === 'file') return { label: 'axis kind', unit: '', plusMinus: false }
  if (change.section === 'setup') return setupWords(change.field, context)
  if (change.section === 'extra') return { ...extraWords(change.field, context.nameplate?.dictionary), unit: change.unit ?? '' }
  const words = rowWords(change.section, change.field, context)
  return change.section === 'move' ? { ...words, label: longLabels[change.field] ?? words.label } : words
}

/** Where a change stands: 'setup, force', 'move 1', 'zone 2'. */
export function placeWords(change: FieldChange): string {
  if (change.section === 'setup') return `setup, ${setupField(change.field)?.group ?? 'other'}`
  if (change.section === 'extra') return 'extra value'
  if (change.section === 'file') return 'the whole file'
  return `${change.section} ${change.row ?? ''}`
}

const codedWords: Readonly<Record<string, Readonly<Record<string, string>>>> = {
  inputSwitching: { p: 'p, pulls to plus', n: 'n, pulls to 0 V' },
  outputSwitching: { p: 'p, pulls to plus', n: 'n, pulls to 0 V' },
}

/** A coded value with its meaning beside it; every other value as it is. */
export function valueWord(field: string, value: ExtraValue | undefined): ExtraValue | undefined {
  return typeof value === 'string' ? codedWords[field]?.[value] ?? value : value
}

const absentInMove: Readonly<Record<string, string>> = { deceleration: 'as acceleration', pressSpeed: 'as the setup', window: 'as the setup', turn: 'signed' }

/** What an absent value of a move stands for, in words; undefined where it stands for nothing. */
export function absentWord(change: FieldChange): string | undefined {
  return change.section === 'move' ? absentInMove[change.field] : undefined
}
