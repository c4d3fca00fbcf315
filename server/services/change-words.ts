import type { FieldChange } from '#shared/diff/types'
import { setupField } from '#shared/settings/fields'
import { moveFields, zoneFields, type RowField } from '#shared/settings/move-fields'
import type { ExtraValue } from '#shared/settings/types'

type Named = Pick<FieldChange, 'section' | 'row' | 'field'>

/** Where a change stands, by the names of the format: `thrustLimit`, `move 5 forceLimit`, `extra K-017`. */
export function formatPlace({ section, row, field }: Named): string {
  return row === undefined ? (section === 'extra' ? `extra ${field}` : field) : `${section} ${row} ${field}`
}

/** The same in the words of the screens: `thrust limit`, `move 5 force`. */
export function spokenPlace({ section, row, field }: Named): string {
  const rows: Readonly<Record<string, RowField>> = section === 'move' ? moveFields : zoneFields
  const label = section === 'setup' ? setupField(field)?.label : row === undefined ? undefined : rows[field]?.label
  return formatPlace({ section, field: label ?? field, ...(row === undefined ? {} : { row }) })
}

/** `38 → 55 %`; only what there is where a value is new or gone. */
export function valueWords({ before, after, unit }: Pick<FieldChange, 'before' | 'after' | 'unit'>): string {
  if (before === undefined) return shown(after, unit)
  if (after === undefined) return `${shown(before, unit)} taken away`
  return `${shown(before, undefined)} → ${shown(after, unit)}`
}

function shown(value: ExtraValue | undefined, unit: string | undefined): string {
  if (typeof value === 'object') return `${value.value} ${value.unit}`
  const text = typeof value === 'string' && value.length > 40 ? `${[...value].slice(0, 39).join('')}…` : String(value)
  return unit === undefined ? text : `${text} ${unit}`
}
