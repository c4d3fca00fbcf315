import { setupFieldNames, setupFields } from '#shared/settings/fields'
import { moveFieldNames, zoneFieldNames } from '#shared/settings/move-fields'
import type { FieldChange } from '#shared/diff/types'
import type { Content } from '#shared/settings/types'
import type { ValuePlace, ValueSection } from '#shared/settings/value-place'
import { placeFieldWords } from './words/values'
import type { WordContext } from './words/fields'

/* What can be looked at over time: first where, then which value. */

export interface Choice { readonly value: string, readonly label: string }

/** 'setup', 'move 5', 'zone 1', 'extra': the part of a place that is chosen first. */
export const whereKey = ({ section, row }: Pick<ValuePlace, 'section' | 'row'>): string => row === undefined ? section : `${section} ${row}`

export function whereOf(key: string): { readonly section: ValueSection, readonly row?: number } {
  const [section, row] = key.split(' ')
  return { section: section as ValueSection, ...(row !== undefined && { row: Number(row) }) }
}

/** Where values stand in a content. */
export function whereChoices({ moves, zones, extra }: Content): Choice[] {
  return [
    { value: 'setup', label: 'setup' },
    ...moves.map(({ move, label }) => ({ value: `move ${move}`, label: `move ${move}${label ? `, ${label}` : ''}` })),
    ...zones.map(({ zone }) => ({ value: `zone ${zone}`, label: `zone ${zone}` })),
    ...(Object.keys(extra).length ? [{ value: 'extra', label: 'the drive’s own values' }] : []),
  ]
}

/** The values there; of the setup all that this kind of axis has, since one that is not set today may have been. */
export function valueChoices(key: string, content: Content, context: WordContext): Choice[] {
  const { section, row } = whereOf(key)
  const fields: readonly string[] = section === 'setup'
    ? setupFieldNames.filter((name) => {
        const field = setupFields[name]
        return field.type !== 'number' || field.unit[content.axisKind] !== null
      })
    : section === 'move' ? moveFieldNames.filter(name => name !== 'comment') : section === 'zone' ? zoneFieldNames : Object.keys(content.extra).sort()
  const group = (field: string) => section === 'setup' ? `${setupFields[field as keyof typeof setupFields].group}: ` : ''
  return fields.map(field => ({ value: field, label: `${group(field)}${placeFieldWords({ section, field, ...(row !== undefined && { row }) }, context).label}` }))
}

/** What is shown first: the heaviest change against the known-good, else the thrust limit. */
export function firstPlace(changes: readonly FieldChange[]): ValuePlace {
  const change = changes.find(({ section, before, after }) => section !== 'file' && before !== undefined && after !== undefined)
  if (!change || change.section === 'file') return { section: 'setup', field: 'thrustLimit' }
  return { section: change.section, field: change.field, ...(change.row !== undefined && { row: change.row }) }
}
