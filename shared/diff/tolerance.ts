import { setupField, type UnitByKind } from '../settings/fields'
import { moveFields, zoneFields, type RowField } from '../settings/move-fields'
import type { Nameplate } from '../settings/nameplate'
import { Exact } from '../units/exact'
import type { FieldChange } from './types'

/** Steps in which a drive stores speeds and accelerations, in canonical units, as its entry table has them. */
export interface Steps { readonly speed?: number, readonly acceleration?: number }

type Rounding = Pick<Nameplate, 'resolution' | 'shownDigit' | 'truncates'>

/**
 * How far a value may be off when it is read back, inclusive. Positions: half a count and half a shown digit. Speeds and
 * accelerations: half a step. A drive that truncates: a whole digit or step. What weighs harm: never more than one shown
 * digit. 0 where nothing is known and for everything that is stored as it is.
 */
export function toleranceOf(change: FieldChange, nameplate: Rounding, steps: Steps): Exact {
  const part = nameplate.truncates ? 1 : 0.5
  const quantity = quantityOf(change)
  if (quantity === 'speed') return new Exact(steps.speed ?? 0).times(part)
  if (quantity === 'acceleration') return new Exact(steps.acceleration ?? 0).times(part)
  if (quantity !== 'position') return new Exact(0)
  const { resolution = 0, shownDigit } = nameplate
  const tolerance = new Exact(resolution).times(0.5).plus(new Exact(shownDigit ?? 0).times(part))
  return change.weight === 'harm' && shownDigit !== undefined ? Exact.min(tolerance, shownDigit) : tolerance
}

/** What a drive counts in steps of its own; undefined for the rest, angles of mounting among it. */
function quantityOf({ section, field }: FieldChange): 'position' | 'speed' | 'acceleration' | undefined {
  const unit = unitByKind(section, field)
  if (unit?.linear === 'mm' || field === 'modulo') return 'position'
  if (unit?.linear === 'mm/s') return 'speed'
  return unit?.linear === 'mm/s²' ? 'acceleration' : undefined
}

function unitByKind(section: FieldChange['section'], field: string): UnitByKind | undefined {
  const rows: Readonly<Record<string, RowField>> = section === 'move' ? moveFields : section === 'zone' ? zoneFields : {}
  if (section !== 'setup') return rows[field]?.unit
  const entry = setupField(field)
  return entry?.type === 'number' ? entry.unit : undefined
}
