import { gridOf } from '../settings/entry-table/grid'
import { setupField, type UnitByKind } from '../settings/fields'
import { moveFields, zoneFields, type RowField } from '../settings/move-fields'
import type { Nameplate } from '../settings/nameplate'
import { Exact } from '../units/exact'
import type { FieldChange } from './types'

type Rounding = Partial<Pick<Nameplate, 'resolution' | 'shownDigit' | 'truncates' | 'axisKind' | 'entryTable'>>

/**
 * How far a value may be off when it is read back, inclusive. Positions: half a count and half a shown digit. Speeds and
 * accelerations: half a step of the entry table. A drive that truncates, or whose entry is rounded down or up: a whole digit
 * or step. What weighs harm: never more than one shown digit. 0 where nothing is known and for everything that is stored as
 * it is.
 */
export function toleranceOf(change: FieldChange, nameplate: Rounding): Exact {
  const quantity = quantityOf(change)
  if (quantity === 'position') return ofPosition(change, nameplate)
  const grid = quantity && gridOf(nameplate, change)
  if (!grid) return new Exact(0)
  const tolerance = grid.step.times(nameplate.truncates || grid.cuts ? 1 : 0.5)
  return change.weight === 'harm' && grid.digit !== undefined ? Exact.min(tolerance, grid.digit) : tolerance
}

function ofPosition({ weight }: FieldChange, { resolution = 0, shownDigit, truncates }: Rounding): Exact {
  const tolerance = new Exact(resolution).times(0.5).plus(new Exact(shownDigit ?? 0).times(truncates ? 1 : 0.5))
  return weight === 'harm' && shownDigit !== undefined ? Exact.min(tolerance, shownDigit) : tolerance
}

/** What a drive counts in digits or steps of its own; undefined for the rest, angles of mounting among it. */
function quantityOf({ section, field }: FieldChange): 'position' | 'rate' | undefined {
  const unit = unitByKind(section, field)
  if (unit?.linear === 'mm' || field === 'modulo') return 'position'
  return unit?.linear === 'mm/s' || unit?.linear === 'mm/s²' ? 'rate' : undefined
}

function unitByKind(section: FieldChange['section'], field: string): UnitByKind | undefined {
  const rows: Readonly<Record<string, RowField>> = section === 'move' ? moveFields : section === 'zone' ? zoneFields : {}
  if (section !== 'setup') return rows[field]?.unit
  const entry = setupField(field)
  return entry?.type === 'number' ? entry.unit : undefined
}
