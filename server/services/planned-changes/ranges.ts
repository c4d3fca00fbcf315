import type { AxisKind } from '#shared/settings/types'
import { plain, quantity } from '#shared/checks/format'
import { setupField } from '#shared/settings/fields'
import { moveFields, zoneFields, type RowField } from '#shared/settings/move-fields'
import { unitAt } from '#shared/settings/value-place'
import type { PlannedChangeRow } from '#server/database/planned-change/table'

type Ranged = Pick<PlannedChangeRow, 'fields' | 'min' | 'max' | 'ranges'>
export interface FieldRange { readonly field: string, readonly min: number | null, readonly max: number | null }

/** Each field of a plan with the range that holds for it: its own, else that of the plan; null = no bound. */
export function rangesOf({ fields, min, max, ranges }: Ranged): FieldRange[] {
  return fields.map(field => ranges?.find(own => own.field === field) ?? { field, min, max })
}

/** `thrust limit, 40 to 60 %`: one line a field. */
export function rangeWords(plan: Ranged, axisKind: AxisKind): string[] {
  return rangesOf(plan).map(({ field, min, max }) => {
    const { label, unit } = named(field, axisKind)
    const range = min !== null && max !== null ? `${plain(min)} to ${quantity(max, unit)}` : min !== null ? `at least ${quantity(min, unit)}` : max !== null ? `at most ${quantity(max, unit)}` : 'any value'
    return `${label}, ${range}`
  })
}

function named(name: string, axisKind: AxisKind): { label: string, unit: string } {
  const [section, field = ''] = name.split('.', 2)
  if (section !== 'move' && section !== 'zone') return { label: setupField(name)?.label ?? name, unit: name.startsWith('extra:') ? '' : unitAt({ section: 'setup', field: name }, axisKind) }
  const rows: Readonly<Record<string, RowField>> = section === 'move' ? moveFields : zoneFields
  return { label: `${section} ${rows[field]?.label ?? field}`, unit: unitAt({ section, field }, axisKind) }
}
