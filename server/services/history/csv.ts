import Papa from 'papaparse'
import type { HistoryItem } from '#shared/api/history'
import { guard } from '#shared/settings/spreadsheet-guard'
import type { FileHead } from './file'

/** Columns of the file, in order. Times are UTC, values plain, so that programs read them as they stand. */
const columns: readonly (readonly [string, (item: HistoryItem) => string | number | boolean | null])[] = [
  ['received at', item => item.at], ['captured at', item => item.capturedAt], ['version before captured at', item => item.baseAt], ['time zone', item => item.timeZone],
  ['axis', item => item.tag], ['unit serial', item => item.serial], ['section', item => item.section], ['row', item => item.row], ['field', item => item.field],
  ['before', item => plain(item.before)], ['after', item => plain(item.after)], ['unit', item => item.unit ?? ownUnit(item)], ['force before', item => item.newtons?.before ?? null], ['force after', item => item.newtons?.after ?? null], ['difference', item => item.delta], ['points', item => item.points],
  ['weight', item => item.weight], ['changed by', item => item.changedBy], ['stored by', item => item.storedBy], ['reason', item => item.reason], ['work order', item => item.workOrder],
  ['allowed by', item => item.allowedBy], ['finding', item => item.findingId], ['finding state', item => item.findingState], ['explanation', item => item.explanation], ['explained by', item => item.explainedBy],
  ['version before', item => item.baseNumber], ['version', item => item.number], ['version id', item => item.versionId], ['occasion', item => item.occasion], ['late', item => item.late], ['void', item => item.void],
]

const plain = (value: HistoryItem['before']) => (typeof value === 'object' && value !== null ? value.value : value)
function ownUnit({ before, after }: HistoryItem): string | null {
  const found = [after, before].find(value => typeof value === 'object' && value !== null)
  return typeof found === 'object' && found !== null ? found.unit : null
}

const cell = (value: string | number | boolean | null) => (typeof value === 'string' ? guard(value) : value)
const lines = (rows: readonly (readonly (string | number | boolean | null)[])[]) => `${Papa.unparse(rows.map(row => row.map(cell)), { newline: '\r\n' })}\r\n`

/**
 * The whole result as CSV (RFC 4180, UTF-8 with its mark, so that spreadsheets read the letters), chunk by chunk. Behind the last
 * change stand an empty line, the question, the count of lines and the checkpoint: a file without them was cut off.
 */
export function* historyCsv(pages: Iterable<readonly HistoryItem[]>, { question, zone, madeAt, rests, checkpoint }: FileHead): Generator<Buffer> {
  yield Buffer.from(`\uFEFF${lines([columns.map(([name]) => name)])}`, 'utf8')
  let count = 0
  for (const items of pages) {
    if (items.length === 0) continue
    count += items.length
    yield Buffer.from(lines(items.map(item => columns.map(([, of]) => of(item)))), 'utf8')
  }
  yield Buffer.from(`\r\n${lines([['# question', question], ['# lines', count], ['# zone of the question', zone], ['# made at', madeAt], ['# rests on', rests], ['# checkpoint of the log', checkpoint]])}`, 'utf8')
}
