import { setupField, type SetupFieldName } from './fields'
import { moveFields, zoneFields, type MoveFieldName, type RowField, type ZoneFieldName } from './move-fields'
import type { AxisKind, Content, ExtraValue } from './types'

/** The parts of a content that hold single values. */
export const valueSections = ['setup', 'move', 'zone', 'extra'] as const
export type ValueSection = (typeof valueSections)[number]

/** One value of a settings file. `row`: number of the move or zone, absent in the other sections. */
export interface ValuePlace { readonly section: ValueSection, readonly field: string, readonly row?: number }

/** Whether the format has such a place on any axis: a known field with a row where its section has rows, any key in extra. */
export function isValuePlace({ section, field, row }: ValuePlace): boolean {
  if (section === 'setup') return row === undefined && setupField(field) !== undefined
  if (section === 'extra') return row === undefined && /^.{1,64}$/su.test(field)
  return row !== undefined && Object.hasOwn(section === 'move' ? moveFields : zoneFields, field)
}

/** The value that a content holds there, rows found by their number; undefined where it is not set or the row is not there. */
export function valueAt(content: Content, { section, field, row }: ValuePlace): ExtraValue | undefined {
  if (section === 'setup') return content.setup[field as SetupFieldName]
  if (section === 'extra') return Object.hasOwn(content.extra, field) ? content.extra[field] : undefined
  if (section === 'zone') return content.zones.find(({ zone }) => zone === row)?.[field as ZoneFieldName]
  return content.moves.find(({ move }) => move === row)?.[field as MoveFieldName]
}

/** The canonical unit of a place on an axis of this kind; '' for words, bare numbers and extra values, which bring their own. */
export function unitAt({ section, field }: ValuePlace, axisKind: AxisKind): string {
  if (section === 'extra') return ''
  if (section === 'setup') {
    const entry = setupField(field)
    return entry?.type === 'number' ? entry.unit[axisKind] ?? '' : ''
  }
  const rows: Readonly<Record<string, RowField>> = section === 'move' ? moveFields : zoneFields
  return rows[field]?.unit?.[axisKind] ?? ''
}

/** The name by which site rules know a place: `thrustLimit`, `move.speed`, `zone.from`, `extra:K-017`; the same for all rows. */
export function ruleNameOf({ section, field }: ValuePlace): string {
  if (section === 'setup') return field
  return section === 'extra' ? `extra:${field}` : `${section}.${field}`
}
