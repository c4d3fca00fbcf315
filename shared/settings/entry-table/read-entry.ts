import type { Normalised, ReadOutcome } from '../types'
import { schemaName } from '../types'
import { type CsvRecord, bareCell, cellRange, csvRecords } from '../csv-records'
import type { Nameplate } from '../nameplate'
import { placeOf } from '../place'
import { Problems, cutText } from '../problems'
import type { Source } from '../raw'
import { decode } from '../read'
import { readFile } from '../read-file'
import { EntryTree } from './entry-tree'
import type { EntryTable } from './schema'

/** What is said beside a file that does not hold it; what the file holds itself goes before. */
export interface Known { readonly serial?: string, readonly firmware?: string, readonly exportedAt?: string }

/** Reads a file laid out by the entry table of its model: the file in the neutral form, or everything that is wrong, by the file's own lines. */
export function readEntryFile(bytes: Uint8Array, nameplate: Pick<Nameplate, 'model' | 'axisKind' | 'entryTable'>, known: Known): ReadOutcome {
  const decoded = decode(bytes, 'csv')
  if ('errors' in decoded) return decoded
  const { entryTable: table, model, axisKind } = nameplate
  const text = decoded.text.replace(/\r\n?/g, '\n')
  const source = sourceOf(text, table?.delimiter ?? ';')
  const problems = new Problems(source)
  const start = { offset: 0, end: 0 }
  if (table === undefined) {
    problems.add('header', '', start, `The nameplate of ${model} has no entry table: a list of this drive cannot be read. Make one there, or send the neutral form.`)
    return problems.outcome()
  }
  const found = bodyOf(text, table, model, problems)
  const records = found === undefined ? undefined : recordsOf(text, table, found, problems)
  if (records === undefined) return problems.outcome()
  const tree = new EntryTree(table, axisKind, problems, (record, cell) => cellRange(text, table.delimiter, record.offset, cell).start)
  tree.addKnown('file', 'schema', schemaName)
  tree.addKnown('file', 'axisKind', axisKind)
  for (const record of records) tree.add(record)
  tree.close(text.length)
  tree.addKnown('unit', 'model', model)
  tree.addKnown('unit', 'serial', known.serial)
  tree.addKnown('unit', 'firmware', known.firmware)
  tree.addKnown('file', 'exportedAt', known.exportedAt)
  const reading = { source, problems, rounded: 0, converted: 0 }
  const read = readFile(reading, tree.root)
  if (read === undefined) return problems.outcome()
  const { rounded, converted } = reading
  return { ok: true, value: { ...read, normalised: receipt(table, decoded.encoding, records, rounded, converted) } }
}

/** Spots begin at a cell, whatever record it belongs to. */
function sourceOf(text: string, delimiter: string): Source {
  return {
    place: ({ offset }) => placeOf(text, offset),
    shown: ({ offset }) => {
      const { start, end } = cellRange(text, delimiter, offset, 0)
      return bareCell(text.slice(start, end))
    },
  }
}

/** Where the first parameter stands; reports a header that is another one, as of a drive tool that has changed its columns. */
function bodyOf(text: string, { header }: EntryTable, model: string, problems: Problems): number | undefined {
  let from = 0
  for (const [index, expected] of header.entries()) {
    const end = text.indexOf('\n', from)
    const line = text.slice(from, end === -1 ? text.length : end)
    if (index === header.length - 1 && line.trim().toLowerCase() !== expected.trim().toLowerCase()) {
      problems.add('header', '', { offset: from, end: from }, `Line ${index + 1} is "${cutText(line)}"; by the entry table of ${model} it is "${cutText(expected)}". Take the right model, or correct its entry table.`, { value: line })
      return undefined
    }
    from = end === -1 ? text.length : end + 1
  }
  return from
}

function recordsOf(text: string, { delimiter }: EntryTable, from: number, problems: Problems): CsvRecord[] | undefined {
  const found = csvRecords(text, delimiter, from)
  if (found.ok) return found.records.filter(({ cells }) => cells.some(cell => cell.trim() !== ''))
  problems.add('csv-syntax', '', { offset: found.offset, end: found.offset }, found.message)
  return undefined
}

function receipt({ delimiter, decimal }: EntryTable, encoding: Normalised['encoding'], records: readonly CsvRecord[], rounded: number, converted: number): Normalised {
  const strange = encoding === 'windows-1252' ? records.flatMap(({ cells }) => cells.filter(cell => /\P{ASCII}/u.test(cell))) : []
  return { form: 'csv', rounded, converted, encoding, decodedTexts: [...new Set(strange)], delimiter, decimal }
}
