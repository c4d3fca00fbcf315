import { setupField, setupFieldNames, setupGroups, type SetupField, type SetupGroup } from '#shared/settings/fields'
import { moveFieldNames, moveFields, zoneFieldNames, zoneFields, type RowField } from '#shared/settings/move-fields'
import type { FormatErrorCode, Weight } from '#shared/settings/types'
import { unitsFor } from '#shared/units/units'

/** One field of the format as its table shows it. */
export interface FieldLine {
  readonly name: string
  readonly label: string
  readonly kind: string
  /** Canonical unit, both kinds of axis; '' for words and bare numbers. */
  readonly unit: string
  /** What else is read and converted. */
  readonly also: string
  readonly weight: Weight
  readonly watched: boolean
  readonly carry: string
  readonly cia402: string
  readonly help: string
}

interface Units { readonly linear: string | null, readonly rotary: string | null }
const unitWords = (unit: Units | undefined) => [...new Set([unit?.linear, unit?.rotary].filter(word => word))].join(' / ')
const alsoWords = (unit: Units | undefined) => [...new Set([unit?.linear, unit?.rotary].flatMap(word => word ? unitsFor(word).slice(1).map(each => each.name) : []))].join(', ')

const onlyOn = (unit: Units) => unit.linear === null ? 'rotary only' : unit.rotary === null ? 'linear only' : ''
function range(field: SetupField & { type: 'number' }): string {
  const { min, max, above, whole } = field
  const bounds = min !== undefined && max !== undefined ? `${min} to ${max}` : min !== undefined ? `${min} or more` : above !== undefined ? `above ${above}` : ''
  return [whole ? 'whole number' : 'number', bounds, onlyOn(field.unit)].filter(text => text !== '').join(', ')
}
function kindOf(field: SetupField): string {
  if (field.type === 'flag') return 'true or false'
  if (field.type === 'number') return range(field)
  const { linear, rotary } = field.choices
  return linear === rotary ? linear.join(', ') : `${linear.join(', ')} / ${rotary.join(', ')}`
}

function setupLine(name: string, field: SetupField): FieldLine {
  const unit = field.type === 'number' ? field.unit : undefined
  return {
    name, label: field.label, kind: kindOf(field), unit: unitWords(unit), also: alsoWords(unit), weight: field.weight, watched: field.watched,
    carry: name === 'homeOffset' ? 'by the homing method' : field.carry, cia402: field.cia402 ?? '', help: field.help,
  }
}
const rowKinds: Readonly<Record<RowField['type'], string>> = { number: 'number', text: 'text', choice: 'word', row: 'number of a move' }
function rowLine(name: string, field: RowField): FieldLine {
  return {
    name, label: field.label, kind: `${rowKinds[field.type]}${field.needed ? ', needed' : ''}`, unit: unitWords(field.unit), also: alsoWords(field.unit),
    weight: field.weight, watched: field.watched, carry: 'copy', cia402: '', help: field.help,
  }
}

export const groupTitles: Readonly<Record<SetupGroup, string>> = { travel: 'Travel', homing: 'Homing', motion: 'Motion', force: 'Force', load: 'Load', tuning: 'Tuning', io: 'Inputs and outputs', bus: 'Bus' }

export interface FieldGroup { readonly title: string, readonly section: string, readonly lines: readonly FieldLine[] }

/** All fields of the format, group by group in the order of the tables. */
export const fieldGroups: readonly FieldGroup[] = [
  ...setupGroups.map(group => ({
    title: groupTitles[group], section: 'setup',
    lines: setupFieldNames.flatMap((name) => {
      const field = setupField(name)
      return field?.group === group ? [setupLine(name, field)] : []
    }),
  })),
  { title: 'Moves', section: 'move', lines: moveFieldNames.map(name => rowLine(name, moveFields[name])) },
  { title: 'Zones', section: 'zone', lines: zoneFieldNames.map(name => rowLine(name, zoneFields[name])) },
]

/** What each error of the reader means, and what to do. */
export const errorWords: Readonly<Record<FormatErrorCode, string>> = {
  'json-syntax': 'The text is no JSON. Look at the line named, often a comma too many or a quote too few.',
  'csv-syntax': 'A record has too many or too few cells, or a quote stands inside a bare cell.',
  'encoding': 'The bytes are no text of a known encoding. Save it as UTF-8.',
  'header': 'The first line must be section,row,field,value,unit.',
  'decimal-mixed': 'Some numbers have a point, others a comma as decimal sign. Use one.',
  'number-unclear': '1,250 may be 1.25 or 1250. Say which sign stands before the decimals.',
  'number-syntax': 'This is no number.',
  'number-range': 'The number lies outside what the field allows, or beyond a thousand million.',
  'number-digits': 'The number has more digits than can be kept. Write it as a text.',
  'unit-unknown': 'The unit is not known. Those that fit are listed.',
  'unit-unfit': 'The unit is of another quantity. Those that fit are listed.',
  'key-unknown': 'There is no such field here. The one that was probably meant is named.',
  'key-duplicate': 'The same key stands twice in one object.',
  'value-duplicate': 'The same value is given twice.',
  'missing': 'A field that is always needed is not there.',
  'not-allowed-here': 'The field does not belong to this kind of axis or move.',
  'enum': 'The word is none of those allowed.',
  'text-length': 'The text is too long, or empty where it must not be.',
  'text-character': 'The text holds a character that cannot be seen or turns the reading direction.',
  'row-number': 'The number of a move or zone is out of range or no whole number.',
  'row-duplicate': 'Two moves or two zones have one number.',
  'order': 'Two values stand in the wrong order, like a zone that ends before it begins.',
  'limit': 'The file or a list in it is longer than allowed.',
  'nesting': 'Values are nested deeper than 8.',
  'schema-version': 'The file names another version of the format.',
}

/** A script in two lines; the token comes from an administrator. */
export const curlExample = (origin: string) => [
  `curl --fail-with-body -H "Authorization: Bearer $WITNESSMARK_TOKEN" \\`,
  `  -H "Content-Type: application/json" -H "Idempotency-Key: $(sha256sum lid-02-z.json | cut -c1-32)" \\`,
  `  --data-binary @lid-02-z.json "${origin}/api/uploads?occasion=routine&name=lid-02-z.json"`,
].join('\n')
