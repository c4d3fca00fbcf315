import type { ExtraValue, SettingsFile } from '../types'
import type { Nameplate } from '../nameplate'
import { CodedError } from '../../errors/coded'
import { guard } from '../spreadsheet-guard'
import { type Address, addressOf, rowKind } from './address'
import { writeDriveCell } from './cell'
import type { EntryColumn, EntryParameter, EntryTable, EntryValue } from './schema'

/**
 * The file in the drive's own order, numbers and units, lines ended by CR LF. `readEntryFile` of it is the same file for values
 * on the table's steps; what the table has no place for is not written. Throws 'no-entry-table' where the nameplate has none.
 */
export function writeEntryCsv(file: SettingsFile, nameplate: Pick<Nameplate, 'model' | 'entryTable'>): string {
  const { entryTable: table, model } = nameplate
  if (table === undefined) throw new CodedError('no-entry-table', `The nameplate of ${model} has no entry table.`, { model })
  const records = [
    ...table.parameters.flatMap(entry => parameter(file, entry, table)),
    ...unnamed(file, table),
    ...rows(file, 'zone', table.zones, file.zones, table),
    ...rows(file, 'move', table.moves, file.moves, table),
  ]
  const lines = [...table.header, ...records.map(cells => cells.map(cell => quoted(cell, table.delimiter)).join(table.delimiter))]
  return lines.map(line => `${line}\r\n`).join('')
}

function quoted(cell: string, delimiter: string): string {
  return cell.includes(delimiter) || /["\r\n]|^\s|\s$/.test(cell) ? `"${cell.replaceAll('"', '""')}"` : cell
}

function parameter(file: SettingsFile, entry: EntryParameter, table: EntryTable): string[][] {
  const address = addressOf(entry.field, file.axisKind)
  const value = address && valueAt(file, address)
  if (address === undefined || (value === undefined && entry.none === undefined)) return []
  const canonical = address.kind.type === 'number' ? address.kind.unit : ''
  return [line(entry, value, writeDriveCell(value, entry, address.kind, table.decimal), entry.unit ?? canonical, table)]
}

function line({ number, name = '' }: { number: string, name?: string }, value: ExtraValue | undefined, cell: string, unit: string, { columns }: EntryTable): string[] {
  const beside = typeof value === 'object' ? value.unit : unit
  const byColumn = new Map([[columns.number, number], [columns.value, cell], [columns.name, guard(name)], [columns.unit, beside]])
  const width = Math.max(...Object.values(columns))
  return Array.from({ length: width }, (_, index) => byColumn.get(index + 1) ?? '')
}

function valueAt(file: SettingsFile, { section, row, field }: Address): ExtraValue | undefined {
  switch (section) {
    case 'setup': return own(file.setup, field)
    case 'extra': return own(file.extra, field)
    case 'unit': return own(file.unit, field)
    case 'file': return own({ exportedAt: file.exportedAt, exportedBy: file.exportedBy, note: file.note }, field)
    case 'zone': return own(file.zones.find(({ zone }) => zone === Number(row)) ?? {}, field)
    case 'move': return own(file.moves.find(({ move }) => move === Number(row)) ?? {}, field)
  }
}

/** The caller's field names are those of the record's own table, so the values are those of the format. */
function own(record: object, field: string): ExtraValue | undefined {
  return Object.hasOwn(record, field) ? (record as Readonly<Record<string, ExtraValue | undefined>>)[field] : undefined
}

/** The drive's own keys that the table does not name stand under their own number, as the reader takes them. */
function unnamed(file: SettingsFile, table: EntryTable): string[][] {
  const taken = new Set([...table.parameters.flatMap(({ number, field }) => [number, ...(field.startsWith('extra:') ? [field.slice('extra:'.length)] : [])]), table.zones[0]?.name, table.moves[0]?.name])
  return Object.entries(file.extra).filter(([key]) => !taken.has(key)).map(([key, value]) => {
    const entry: EntryValue = { field: `extra:${key}` }
    return line({ number: guard(key) }, value, writeDriveCell(value, entry, { type: 'extra' }, table.decimal), '', table)
  })
}

function rows(file: SettingsFile, section: 'zone' | 'move', columns: readonly EntryColumn[], all: readonly object[], { decimal }: EntryTable): string[][] {
  if (columns.length === 0) return []
  const cells = (row: object) => columns.map((column) => {
    const kind = rowKind(section, column.field, file.axisKind)
    return kind ? writeDriveCell(own(row, column.field), column, kind, decimal) : ''
  })
  return [columns.map(({ name }) => name), ...all.map(cells)]
}
