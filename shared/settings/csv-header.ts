import { bareCell } from './csv-records'
import { csvHeader } from './write-csv'

export type Delimiter = ',' | ';' | '\t'
const delimiters: readonly Delimiter[] = [',', ';', '\t']

/** Which sign parts the cells and where the first record after the header begins. */
export interface HeaderFound { readonly delimiter: Delimiter, readonly header: number, readonly body: number }

/**
 * Finds the header: an optional `sep=x` line, then the five names parted by comma, semicolon or tab, whatever their case and
 * outer spaces. Answers undefined where the first lines are anything else.
 */
export function findHeader(text: string): HeaderFound | undefined {
  const first = lineAt(text, 0)
  const sep = /^"?sep=(.)"?[,;\t]*$/i.exec(first.line)?.[1]
  const { start, line, next } = sep === undefined ? first : lineAt(text, first.next)
  const delimiter = delimiters.find(each => (sep === undefined || sep === each) && isHeader(line.split(each)))
  return delimiter && { delimiter, header: start, body: next }
}

/** The first line with something on it. */
function lineAt(text: string, from: number): { readonly start: number, readonly line: string, readonly next: number } {
  let start = from
  while (text[start] === '\n') start += 1
  const end = text.indexOf('\n', start)
  const stop = end === -1 ? text.length : end
  return { start, line: text.slice(start, stop), next: Math.min(stop + 1, text.length) }
}

function isHeader(cells: readonly string[]): boolean {
  const names = cells.map(cell => bareCell(cell.trim()).trim().toLowerCase())
  return csvHeader.every((name, index) => names[index] === name) && names.slice(csvHeader.length).every(name => name === '')
}
