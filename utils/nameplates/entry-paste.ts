import { setupFieldNames, setupFields } from '#shared/settings/fields'
import { nearestKey } from '#shared/settings/nearest-key'
import type { AxisKind } from '#shared/settings/types'
import { addressOf } from '#shared/settings/entry-table/address'
import { emptyRow, type EntryRow } from './entry-table'

/** The order in which a pasted line is cut: as the table of the form has it. */
export const pasteColumns = ['number', 'name', 'field', 'unit', 'factor', 'step', 'digits', 'words', 'none'] as const

const plain = (text: string) => text.toLowerCase().replaceAll(/[^a-z0-9]+/g, ' ').trim()

/** The neutral field that a drive's own name means, by its words or their spelling; '' where none is near. */
export function guessField(name: string, axisKind: AxisKind): string {
  const fields = setupFieldNames.filter(field => addressOf(field, axisKind))
  const words = new Map<string, string>(fields.flatMap((field) => {
    const { group, label } = setupFields[field]
    return [[plain(label), field], [plain(`${group} ${label}`), field], [plain(field.replaceAll(/([A-Z])/g, ' $1')), field]] as [string, string][]
  }))
  const wanted = plain(name)
  if (wanted === '') return ''
  return words.get(wanted) ?? words.get(nearestKey(wanted, words.keys()) ?? '') ?? ''
}

/**
 * Rows of a list that was copied from a manual or a spreadsheet: cut by tabs, else semicolons, else commas. A field that is left
 * empty is guessed from the name. A line of headings (number, …) is passed over.
 */
export function pastedRows(text: string, axisKind: AxisKind): EntryRow[] {
  const lines = text.split(/\r?\n/).filter(line => line.trim() !== '')
  const sign = ['\t', ';', ','].find(each => text.includes(each)) ?? ';'
  return lines.filter(line => !/^\s*(number|no\.?)\s*[\t;,]/i.test(line)).map((line) => {
    const cells = line.split(sign).map(cell => cell.trim())
    const row = { ...emptyRow(), ...Object.fromEntries(pasteColumns.map((column, index) => [column, cells[index] ?? ''])) }
    return row.field === '' ? { ...row, field: guessField(row.name, axisKind) } : row
  })
}
