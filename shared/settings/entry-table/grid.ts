import type { AxisKind } from '../types'
import type { Nameplate } from '../nameplate'
import { Exact } from '../../units/exact'
import { findUnit } from '../../units/units'
import { addressOf, rowKind } from './address'
import type { EntryTable, EntryValue } from './schema'

type Plate = Partial<Pick<Nameplate, 'axisKind' | 'entryTable'>>
/** A place of a value, as differences name it. */
export interface Place { readonly section: string, readonly row?: number, readonly field: string }

/** The grid on which a drive keeps a value, in the canonical unit of its field. */
export interface Grid {
  /** The coarser of the entry's step and its last digit. */
  readonly step: Exact
  /** Its last digit, where the entry says how many there are. */
  readonly digit: Exact | undefined
  /** The drive takes the next step down or up, never the nearest. */
  readonly cuts: boolean
}

/** What the entry table says of the steps of a field; undefined where it has no place for it, or neither step nor digits. */
export function gridOf({ axisKind, entryTable }: Plate, place: Place): Grid | undefined {
  const found = axisKind && entryTable && entryAt(entryTable, axisKind, place)
  if (!found) return undefined
  const { entry, canonical } = found
  const unit = entry.unit === undefined ? undefined : findUnit(entry.unit, canonical)
  const intoCanonical = (value: Exact) => unit === undefined || typeof unit === 'string' ? value : value.times(unit.times).div(unit.over)
  const digit = entry.digits === undefined ? undefined : intoCanonical(new Exact(10).pow(-entry.digits).times(entry.factor ?? 1))
  const step = entry.step === undefined ? digit : Exact.max(intoCanonical(new Exact(entry.step)), digit ?? 0)
  return step && { step, digit, cuts: entry.rounding === 'down' || entry.rounding === 'up' }
}

function entryAt({ parameters, zones, moves }: EntryTable, axisKind: AxisKind, { section, row, field }: Place): { readonly entry: EntryValue, readonly canonical: string } | undefined {
  const name = section === 'setup' ? field : `${section}:${row ?? ''}:${field}`
  const parameter = parameters.find(entry => entry.field === name)
  const kind = parameter ? addressOf(name, axisKind)?.kind : section === 'move' || section === 'zone' ? rowKind(section, field, axisKind) : undefined
  const columns = section === 'move' ? moves : section === 'zone' ? zones : []
  const entry = parameter ?? columns.find(column => column.field === field)
  return entry && kind?.type === 'number' ? { entry, canonical: kind.unit } : undefined
}

/**
 * A value drawn towards 0 onto the step of the entry table, to six decimals: for limits, which must not grow on their way into
 * the drive. The same where no step is known. A value below one step becomes 0: see that the format allows it there.
 */
export function roundDownToStep(value: number, nameplate: Plate, place: Place): number {
  const step = gridOf(nameplate, place)?.step
  if (step === undefined) return value
  return new Exact(value).div(step).toDecimalPlaces(0, Exact.ROUND_DOWN).times(step).toDecimalPlaces(6, Exact.ROUND_DOWN).toNumber()
}
