import type { Normalised, ReadOutcome } from './types'
import type { RawObject, Source } from './raw'
import { type CsvRecord, bareCell, cellRange, csvRecords } from './csv-records'
import { type Delimiter, type HeaderFound, findHeader } from './csv-header'
import { CsvTree, cellsOfRecord } from './csv-tree'
import { cellMaker, decimalOf } from './csv-cells'
import { csvHeader } from './write-csv'
import { placeOf } from './place'
import { Problems } from './problems'
import { readFile } from './read-file'
import { unguard } from './spreadsheet-guard'

export interface CsvOptions {
  /** The decimal sign of a semicolon or tab file whose numbers do not show it. */
  readonly decimal?: 'point' | 'comma'
  /** How the text was decoded, for the receipt. */
  readonly encoding?: Normalised['encoding']
}

/** Reads the CSV form from its text (without byte-order mark): the file, or everything that is wrong with it. */
export function readCsv(sent: string, options: CsvOptions = {}): ReadOutcome {
  const text = sent.replace(/\r\n?/g, '\n')
  const header = findHeader(text)
  const problems = new Problems(sourceOf(text, header?.delimiter ?? ','))
  if (header === undefined) {
    problems.add('header', '', { offset: 0, end: 0 }, `The file begins with neither { nor the header ${csvHeader.join(',')}. Put one of them first.`, { value: text.slice(0, 80).split('\n')[0] ?? '' })
    return problems.outcome()
  }
  const records = recordsOf(text, header, problems)
  if (records === undefined) return problems.outcome()
  const decimal = decimalOf(header.delimiter, records, options.decimal, problems)
  const root = treeOf(records, header, decimal, problems)
  const reading = { source: sourceOf(text, header.delimiter), problems, rounded: 0, converted: 0 }
  const read = readFile(reading, root)
  if (read === undefined || decimal === 'mixed') return problems.outcome()
  const { rounded, converted } = reading
  const { encoding = 'utf-8' } = options
  const normalised: Normalised = {
    form: 'csv', rounded, converted, encoding, decodedTexts: encoding === 'windows-1252' ? nonAsciiTexts(records) : [],
    delimiter: header.delimiter, ...(decimal === undefined ? {} : { decimal }),
  }
  return { ok: true, value: { ...read, normalised } }
}

function sourceOf(text: string, delimiter: Delimiter): Source {
  const startOf = (offset: number, cell: number | undefined) => cell === undefined ? offset : cellRange(text, delimiter, offset, cell).start
  return {
    place: ({ offset, cell }) => placeOf(text, startOf(offset, cell)),
    shown: ({ offset, cell = 0 }) => {
      const { start, end } = cellRange(text, delimiter, offset, cell)
      return bareCell(text.slice(start, end))
    },
  }
}

/** The records with something in them, five cells each, apostrophes against formulas taken off; undefined where quotes are out of place. */
function recordsOf(text: string, { delimiter, body }: HeaderFound, problems: Problems): CsvRecord[] | undefined {
  const found = csvRecords(text, delimiter, body)
  if (!found.ok) {
    problems.add('csv-syntax', '', { offset: found.offset, end: found.offset }, found.message)
    return undefined
  }
  return found.records.flatMap(({ cells, offset }) => {
    if (cells.every(cell => cell === '')) return []
    const tooMany = cells.slice(cellsOfRecord).some(cell => cell !== '')
    if (cells.length >= cellsOfRecord - 1 && !tooMany) return [{ cells: cells.slice(0, cellsOfRecord).map(unguard), offset }]
    problems.add('csv-syntax', '', { offset, end: offset }, `${cells.length} cells; a line has ${cellsOfRecord}: ${csvHeader.join(', ')}. A cell with a "${delimiter === '\t' ? 'tab' : delimiter}" in it stands in quotes.`)
    return []
  })
}

function treeOf(records: readonly CsvRecord[], header: HeaderFound, decimal: ReturnType<typeof decimalOf>, problems: Problems): RawObject {
  const tree = new CsvTree(problems, header.header)
  const make = cellMaker(header.delimiter, decimal, problems)
  for (const record of records) tree.add(record, make)
  return tree.root
}

function nonAsciiTexts(records: readonly CsvRecord[]): string[] {
  return [...new Set(records.flatMap(record => record.cells.filter(cell => /\P{ASCII}/u.test(cell))))]
}
