import Papa from 'papaparse'

/*
 * Records of RFC 4180. The text has LF alone at its line ends (the caller sees to it), since papaparse joins records where
 * ends are mixed. Quotes are checked here: papaparse lets a quote inside a bare cell pass.
 */

export interface CsvRecord { readonly cells: readonly string[], readonly offset: number }

export type CsvRecords
  = | { readonly ok: true, readonly records: readonly CsvRecord[] }
    | { readonly ok: false, readonly offset: number, readonly message: string }

const quote = '"'

/** The records from an offset on, with the offset of each; or the first quote that is out of place. */
export function csvRecords(text: string, delimiter: string, from: number): CsvRecords {
  const starts = text.includes(quote, from) ? quotedStarts(text, delimiter, from) : lineStarts(text, from)
  if (!Array.isArray(starts)) return starts
  const { data } = Papa.parse<string[]>(text.slice(from), { delimiter, newline: '\n', quoteChar: quote, header: false, dynamicTyping: false })
  return { ok: true, records: data.map((cells, index) => ({ cells, offset: starts[index] ?? text.length })) }
}

function lineStarts(text: string, from: number): number[] {
  const starts = [from]
  for (let end = text.indexOf('\n', from); end !== -1; end = text.indexOf('\n', end + 1)) starts.push(end + 1)
  return starts
}

type Fault = Extract<CsvRecords, { ok: false }>

function quotedStarts(text: string, delimiter: string, from: number): number[] | Fault {
  const starts = [from]
  let at = from
  while (at < text.length) {
    const end = cellEnd(text, delimiter, at)
    if (typeof end !== 'number') return end
    if (text[end] === '\n') starts.push(end + 1)
    at = end + 1
  }
  return starts
}

/** Where the cell that begins here ends: at a delimiter, a line feed or the end. */
function cellEnd(text: string, delimiter: string, start: number): number | Fault {
  if (text[start] !== quote) {
    let end = start
    while (end < text.length && text[end] !== delimiter && text[end] !== '\n') {
      if (text[end] === quote) return { ok: false, offset: end, message: 'A quote inside a cell that does not begin with one: put the cell in quotes and double this quote.' }
      end += 1
    }
    return end
  }
  let end = text.indexOf(quote, start + 1)
  while (end !== -1 && text[end + 1] === quote) end = text.indexOf(quote, end + 2)
  if (end === -1) return { ok: false, offset: start, message: 'The cell is not closed: its second quote is missing.' }
  const next = text[end + 1]
  if (next === undefined || next === delimiter || next === '\n') return end + 1
  return { ok: false, offset: end + 1, message: 'Text after a closing quote: a delimiter or a new line belongs here. A quote in a text is doubled.' }
}

/** First and last offset of a cell by its place in the record; the end of the record where it has fewer cells. */
export function cellRange(text: string, delimiter: string, record: number, cell: number): { readonly start: number, readonly end: number } {
  let start = record
  for (let index = 0; ; index += 1) {
    const end = cellEnd(text, delimiter, start)
    const last = typeof end === 'number' ? end : text.length
    if (index === cell || last >= text.length || text[last] === '\n') return { start, end: last }
    start = last + 1
  }
}

/** The text of a cell as it stands in the file, without its quotes. */
export function bareCell(text: string): string {
  return text.startsWith(quote) ? text.slice(1, -1).replaceAll('""', quote) : text
}
