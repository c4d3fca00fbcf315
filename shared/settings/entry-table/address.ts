import { type AxisKind, moveKinds, turns } from '../types'
import { setupField } from '../fields'
import { type RowField, moveFields, zoneFields } from '../move-fields'
import { unitKeys } from '../read-file'

/** What a value is, as far as a drive's list has to know. */
export type ValueKind
  = | { readonly type: 'number', readonly unit: string }
    | { readonly type: 'own' | 'flag' | 'text' | 'extra' }
    | { readonly type: 'choice', readonly choices: readonly string[] }

/** Where a value stands in the neutral form, in the words of its CSV: section, row, field. */
export interface Address {
  readonly section: 'file' | 'unit' | 'setup' | 'zone' | 'move' | 'extra'
  readonly row: string
  readonly field: string
  readonly kind: ValueKind
}

const fileTexts = ['exportedAt', 'exportedBy', 'note']
const own = { type: 'own' } as const
const text = { type: 'text' } as const

/** The place that an entry's `field` names on an axis of this kind; undefined where it names none, or one that is refused there. */
export function addressOf(name: string, axisKind: AxisKind): Address | undefined {
  const parts = /^(?:(file|unit|extra):(.+)|(zone|move):(0|[1-9]\d{0,3}):(\w+))$/s.exec(name)
  if (parts === null) return setupAddress(name, axisKind)
  const [, section, field = '', table, row = '', rowField = ''] = parts
  if (section === 'extra') return { section, row: '', field, kind: { type: 'extra' } }
  if (section === 'file') return fileTexts.includes(field) ? { section, row: '', field, kind: text } : undefined
  if (section === 'unit') return unitKeys.some(key => key === field) ? { section, row: '', field, kind: field === 'channel' ? own : text } : undefined
  const kind = rowKind(table === 'zone' ? 'zone' : 'move', rowField, axisKind)
  return kind && rowField !== table ? { section: table === 'zone' ? 'zone' : 'move', row, field: rowField, kind } : undefined
}

/** What a field of a zone or move is, its own number included; undefined where the table has no such field. */
export function rowKind(section: 'zone' | 'move', field: string, axisKind: AxisKind): ValueKind | undefined {
  if (field === section) return own
  const fields: Readonly<Record<string, RowField>> = section === 'zone' ? zoneFields : moveFields
  const known = Object.hasOwn(fields, field) ? fields[field] : undefined
  switch (known?.type) {
    case 'choice': return { type: 'choice', choices: field === 'kind' ? moveKinds : turns }
    case 'row': return own
    case 'text': return text
    case 'number': return { type: 'number', unit: known.unit?.[axisKind] ?? '' }
    default: return undefined
  }
}

function setupAddress(name: string, axisKind: AxisKind): Address | undefined {
  const field = setupField(name)
  if (field === undefined) return undefined
  const at = (kind: ValueKind): Address => ({ section: 'setup', row: '', field: name, kind })
  if (field.type === 'flag') return at({ type: 'flag' })
  if (field.type === 'choice') return at({ type: 'choice', choices: field.choices[axisKind] })
  const unit = field.unit[axisKind]
  if (unit === null) return undefined
  return at(field.driveOwn || field.whole ? own : { type: 'number', unit })
}

/** The words that a value may be, to be told apart in the drive's list; none for numbers and texts. */
export function wordsOf(kind: ValueKind): readonly string[] {
  return kind.type === 'choice' ? kind.choices : kind.type === 'flag' ? ['true', 'false'] : []
}
