import { moveFieldNames, moveFields, zoneFieldNames, zoneFields } from '#shared/settings/move-fields'
import { addressOf } from '#shared/settings/entry-table/address'
import { findUnit } from '#shared/units/units'
import type { AxisKind } from '#shared/settings/types'
import { guessField } from './entry-paste'
import { emptyRow, newEntryDraft, type EntryDraft, type EntryRow } from './entry-table'

/*
 * A first entry table from a sample of the drive's own list: what can be seen is taken, what can be guessed is proposed, and
 * the rest is kept under the drive's own number. A person looks it through afterwards.
 */

/** A list of the drive, as somebody has one at hand. */
export interface Sample { readonly name: string, readonly bytes: Uint8Array }

type Cells = readonly string[]
const isNumber = (text: string) => /^[-+]?\d+([.,]\d+)?$/.test(text)
const hasWords = (cells: Cells) => cells.length > 1 && cells.every(cell => !isNumber(cell)) && cells.filter(cell => cell !== '').length > 1

const synonyms: readonly (readonly [RegExp, string])[] = [
  [/^(pos|position|counts?|goal|end)\b/, 'target'], [/^(vel|velocity|v)\b/, 'speed'], [/^(acc|accel|ramp|up|ramp up)\b/, 'acceleration'], [/^(dec|decel|down|ramp down)\b/, 'deceleration'],
  [/^(mode|type|kind)\b/, 'kind'], [/^(name|text|label)\b/, 'label'], [/^(force|torque|thrust)\b/, 'forceLimit'], [/^(then|next|follow)/, 'next'], [/^(dwell|wait|pause|after)\b/, 'dwell'],
  [/^(win|window)\b/, 'window'], [/^(slow|approach)/, 'approach'], [/^press/, 'pressSpeed'], [/^(on )?(from|begin)/, 'from'], [/^(on )?(to|end)\b/, 'to'],
]
const named: Readonly<Record<string, string>> = { serial: 'unit:serial', firmware: 'unit:firmware' }

const plain = (text: string) => text.toLowerCase().replaceAll(/[^a-z0-9]+/g, ' ').trim()

/** Which sign parts the cells: that which most lines have. */
function signOf(lines: readonly string[]): EntryDraft['delimiter'] {
  const count = (sign: string) => lines.filter(line => line.includes(sign)).length
  return (['\t', ';', ','] as const).toSorted((a, b) => count(b) - count(a))[0] ?? ';'
}

/** The line of headings that stands right above the first value: the last one of words only before a number comes. */
function headingAt(rows: readonly Cells[]): number {
  const first = rows.findIndex(cells => cells.slice(1).some(isNumber))
  const above = rows.slice(0, Math.max(0, first)).map((cells, index) => hasWords(cells) && /\b(no|nr|num|number|par|id|value|val|data)\b/.test(plain(cells.join(' '))) ? index : -1)
  return Math.max(-1, ...above)
}

/** Columns by their headings; where those do not tell, number first, then name, value, unit. */
function columnsOf(headings: Cells): EntryDraft['columns'] {
  const at = (pattern: RegExp) => headings.findIndex(heading => pattern.test(plain(heading))) + 1
  const value = at(/^(value|val|setting|data|content)\b/)
  const number = at(/^(no|nr|num|number|par|id|index|code|address)\b/)
  return {
    number: String(number || 1), name: String(at(/^(name|text|parameter|description|meaning|designation)\b/)),
    value: String(value || Math.min(3, Math.max(2, headings.length))), unit: String(at(/^(unit|units|dim|dimension)\b/)),
  }
}

function parameterOf(cells: Cells, columns: EntryDraft['columns'], axisKind: AxisKind): EntryRow {
  const cell = (column: string) => cells[Number(column) - 1] ?? ''
  const [number, name, unit] = [cell(columns.number), cell(columns.name), cell(columns.unit)]
  const known = Object.keys(named).find(word => plain(name).startsWith(word))
  const field = (known && named[known]) || guessField(name, axisKind) || `extra:${number}`
  const kind = addressOf(field, axisKind)?.kind
  const fits = kind?.type === 'number' && unit !== '' && typeof findUnit(unit, kind.unit) !== 'string'
  return { ...emptyRow(), number, name, field: kind?.type === 'number' && unit !== '' && !fits ? `extra:${number}` : field, unit: fits ? unit : '' }
}

/** Columns of a table below: zones where it says from and to, else moves. What cannot be told is left out. */
function tableOf(headings: Cells): { readonly part: 'zones' | 'moves', readonly rows: EntryRow[] } {
  const part = headings.some(name => /\b(from|begin)/.test(plain(name))) ? 'zones' : 'moves'
  const fields: Readonly<Record<string, { readonly label: string }>> = part === 'zones' ? zoneFields : moveFields
  const names: readonly string[] = part === 'zones' ? zoneFieldNames : moveFieldNames
  const fieldOf = (name: string, index: number) => {
    if (index === 0) return part === 'zones' ? 'zone' : 'move'
    const own = names.find(field => plain(field) === plain(name) || plain(fields[field]?.label ?? '') === plain(name))
    return own ?? synonyms.find(([pattern, field]) => names.includes(field) && pattern.test(plain(name)))?.[1]
  }
  const taken = new Set<string>()
  return {
    part, rows: headings.flatMap((name, index) => {
      const field = fieldOf(name, index)
      if (field === undefined || name === '' || taken.has(field)) return []
      taken.add(field)
      return [{ ...emptyRow(), name, field }]
    }),
  }
}

/** What a sample shows of its layout; undefined where it is no list of lines with cells. */
export function draftFromSample(text: string, axisKind: AxisKind): EntryDraft | undefined {
  const lines = text.replace(/^\uFEFF/, '').split(/\r\n?|\n/)
  const delimiter = signOf(lines)
  const rows = lines.map(line => line.split(delimiter).map(cell => cell.trim().replace(/^"(.*)"$/, '$1')))
  if (rows.every(cells => cells.length < 2)) return undefined
  const heading = headingAt(rows)
  const columns = columnsOf(rows[heading] ?? [])
  const draft: EntryDraft = { ...newEntryDraft(), delimiter, decimal: delimiter !== ',' && rows.some(cells => cells.some(cell => /^[-+]?\d+,\d+$/.test(cell))) ? 'comma' : 'point', header: lines.slice(0, heading + 1).join('\n'), columns, parameters: [], zones: [], moves: [] }
  let inTable = false
  for (const [index, cells] of rows.entries()) {
    if (index <= heading || cells.every(cell => cell === '')) continue
    const next = rows[index + 1]
    if (hasWords(cells) && cells.length > 2 && next !== undefined && isNumber(next[0] ?? '') && next.length === cells.length && !isNumber(cells[0] ?? '')) {
      const { part, rows: found } = tableOf(cells)
      if (draft[part].length === 0) draft[part] = found
      inTable = true
    }
    else if (!inTable) draft.parameters.push(parameterOf(cells, columns, axisKind))
  }
  return withoutTwice(draft)
}

/** A field that two numbers seem to mean is the first one's; the other stays the drive's own. */
function withoutTwice(draft: EntryDraft): EntryDraft {
  const taken = new Set<string>()
  return {
    ...draft, parameters: draft.parameters.map((row) => {
      const twice = taken.has(row.field)
      taken.add(row.field)
      return twice ? { ...row, field: `extra:${row.number}`, unit: '' } : row
    }),
  }
}
