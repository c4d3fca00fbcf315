import type { ExtraValue, SettingsFile } from './types'
import { setupFieldNames, setupField } from './fields'
import { moveFieldNames, moveFields, zoneFieldNames, zoneFields } from './move-fields'
import { textMark } from './read-extra'
import { unitKeys } from './read-file'
import { guard } from './spreadsheet-guard'
import { formatNumber } from '../units/number'

export const csvHeader = ['section', 'row', 'field', 'value', 'unit'] as const

/**
 * The CSV form: RFC 4180, CR LF, comma, decimal point, units written out. `readCsv` of it is the same file; every text that a
 * spreadsheet would take for a formula has an apostrophe before it.
 */
export function writeCsv(file: SettingsFile): string {
  const records = [csvHeader, ...identity(file), ...setup(file), ...zones(file), ...moves(file), ...own('extra', file.extra), ...own('reading', file.readings)]
  return records.map(record => `${record.map(cellText).join(',')}\r\n`).join('')
}

type Cell = string | number | boolean
type Row = readonly [section: string, row: Cell, field: string, value: Cell, unit: string]

function cellText(cell: Cell): string {
  if (typeof cell !== 'string') return typeof cell === 'number' ? formatNumber(cell) : String(cell)
  const text = guard(cell)
  return /[",\r\n]|^\s|\s$/.test(text) ? `"${text.replaceAll('"', '""')}"` : text
}

function identity(file: SettingsFile): Row[] {
  const { schema, exportedAt, exportedBy, note, axisKind } = file
  const inFile = Object.entries({ schema, exportedAt, exportedBy, note, axisKind })
  const inUnit = unitKeys.map(key => [key, file.unit[key]] as const)
  return [...inFile.flatMap(pair => given('file', '', pair)), ...inUnit.flatMap(pair => given('unit', '', pair))]
}

function given(section: string, row: Cell, [field, value]: readonly [string, Cell | undefined], unit = ''): Row[] {
  return value === undefined ? [] : [[section, row, field, value, unit]]
}

function setup({ axisKind, setup: values }: SettingsFile): Row[] {
  return setupFieldNames.flatMap((name) => {
    const field = setupField(name)
    return given('setup', '', [name, values[name]], field?.type === 'number' ? field.unit[axisKind] ?? '' : '')
  })
}

function zones({ axisKind, zones: rows }: SettingsFile): Row[] {
  return rows.flatMap(row => zoneFieldNames.flatMap(name => given('zone', row.zone, [name, row[name]], zoneFields[name].unit[axisKind] ?? '')))
}

function moves({ axisKind, moves: rows }: SettingsFile): Row[] {
  return rows.flatMap(row => moveFieldNames.flatMap((name) => {
    const field = moveFields[name]
    return given('move', row.move, [name, row[name]], 'unit' in field ? field.unit[axisKind] ?? '' : '')
  }))
}

function own(section: string, values: Readonly<Record<string, ExtraValue>>): Row[] {
  return Object.entries(values).map(([key, value]): Row => {
    if (typeof value === 'object') return [section, '', key, value.value, value.unit]
    return [section, '', key, value, typeof value === 'string' ? textMark : '']
  })
}
