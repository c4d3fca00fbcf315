import type { ValueKind } from '../settings/entry-table/address'
import { writeDriveCell } from '../settings/entry-table/cell'
import type { EntryTable, EntryValue } from '../settings/entry-table/schema'
import { setupField } from '../settings/fields'
import type { AxisKind, ExtraValue } from '../settings/types'
import { Exact } from '../units/exact'
import { formatNumber } from '../units/number'
import { unitOf } from './labels'

/** What stands beside a value hangs on the unit that it is written to. */
export interface BesideContext {
  readonly axisKind: AxisKind
  /** What 100 % means, N or N·m. */
  readonly base: number | undefined
  readonly prove: readonly string[]
}

const forces: ReadonlySet<string> = new Set(['thrustLimit', 'thrustLimitPositive', 'thrustLimitNegative', 'overloadLevel', 'homingForceLimit', 'forceLimit'])

/** Whether 100 % of the field means the unit's force base. */
export const isForcePercent = (field: string): boolean => forces.has(field)

/** A percentage of the base in newtons (rotary: N·m), to a tenth of a newton, half-even: "243.2 N"; N·m to a thousandth. */
export function newtons(percent: number, base: number, axisKind: AxisKind): string {
  const places = axisKind === 'linear' ? 1 : 3
  const exact = new Exact(percent).times(base).div(100).toDecimalPlaces(places, Exact.ROUND_HALF_EVEN)
  return `${printed(exact.toString())} ${axisKind === 'linear' ? 'N' : 'N·m'}`
}

/** Of a text that is to be typed in: a leading hyphen as a minus sign, all else as it stands. */
export const printed = (cell: string): string => cell.replace(/^-(?=\d)/, '−')

/** What is printed of a value: a text as it stands, without the apostrophe that a list for a spreadsheet puts before a formula. */
export function writtenCell(value: ExtraValue | undefined, entry: EntryValue, kind: ValueKind, sign: EntryTable['decimal']): string {
  return typeof value === 'string' && kind.type !== 'choice' ? value : printed(writeDriveCell(value, entry, kind, sign))
}

const words: Readonly<Record<string, string>> = { p: 'p, pulls to plus', n: 'n, pulls to 0 V', true: 'on', false: 'off' }

/**
 * The word of a coded value, the neutral value of one that the drive counts its own way, newtons of a percentage, "prove";
 * '' where nothing is to be said. `told`: the list states the value in another unit, step or digit than ours.
 */
export function besideValue({ axisKind, base, prove }: BesideContext, name: string, value: ExtraValue, { cell, told }: { readonly cell: string, readonly told: boolean }): string {
  const field = setupField(name)
  const parts: string[] = []
  if ((field?.type === 'choice' && (cell !== value || Object.hasOwn(words, cell))) || field?.type === 'flag') parts.push(words[String(value)] ?? String(value).replaceAll('-', ' '))
  if (told && typeof value === 'number' && !new Exact(cell.replace(',', '.').replace('−', '-')).equals(value)) parts.push(`= ${printed(formatNumber(value))} ${unitOf(name, axisKind, undefined)}`.trim())
  if (isForcePercent(name) && base !== undefined && typeof value === 'number') parts.push(newtons(value, base, axisKind))
  if (prove.includes(name)) parts.push('prove')
  return parts.join(', ')
}
