import type { ExtraValue } from './types'
import type { RawCell, RawNode, RawObject } from './raw'
import { type Reading, keyTable, reportDuplicate, sortIntoSlots, step } from './reading'
import { isNumberText } from '../units/number'
import { unitCell } from './cell-unit'
import { readOwnNumber } from './read-number'
import { flagOf, readText } from './read-value'
import { cutText } from './problems'
import { type TextRule, checkText, textRules } from './text-rules'

/*
 * `extra` and `readings`: keys of the drive's own, with a number, true or false, a text, or a number with the drive's own
 * unit. In the CSV form the word `text` in the unit column marks a text, so it cannot be a unit.
 */

export const maxExtra = 5000
export const maxReadings = 500
export const textMark = 'text'

const valueTable = keyTable(['unit', 'value'])

/** The values by key; what is null is left out, an empty text stays. A section beyond its limit is not read. */
export function readExtra(reading: Reading, node: RawObject, at: string, limit: number): Record<string, ExtraValue> {
  const values: Record<string, ExtraValue> = {}
  if (node.keys.length > limit) {
    reading.problems.add('limit', at, node, `${node.keys.length} values; at most ${limit} are read.`, { value: String(node.keys.length) })
    return values
  }
  for (let index = 0; index < node.keys.length; index += 1) {
    const key = readKey(reading, node, index, at)
    if (key === undefined) continue
    if (Object.hasOwn(values, key)) {
      reportDuplicate(reading, node, index, at)
      continue
    }
    const value = readExtraValue(reading, node.values[index] as RawNode, at + step(key))
    if (value !== undefined) values[key] = value
  }
  return values
}

function readKey(reading: Reading, node: RawObject, index: number, at: string): string | undefined {
  const sent = node.keys[index] as string
  const checked = checkText(sent, textRules.extraKey)
  const offset = node.keyOffsets[index] as number
  const spot = node.cell === undefined ? { offset, end: offset } : { offset, end: offset, cell: 2 }
  const report = (code: 'text-length' | 'text-character' | 'not-allowed-here', message: string) => {
    reading.problems.add(code, at + step(sent), spot, message, { value: sent })
    return undefined
  }
  if (typeof checked !== 'string') return report(checked.code, `Key: ${checked.message}`)
  if (checked !== checked.trim()) return report('text-character', `The key "${cutText(checked)}" has a blank at its beginning or end; take it out.`)
  return checked === '__proto__' ? report('not-allowed-here', 'The key __proto__ cannot be kept; give it another name.') : checked
}

function readExtraValue(reading: Reading, node: RawNode, at: string): ExtraValue | undefined {
  switch (node.kind) {
    case 'number': return readOwnNumber(reading, node, at)
    case 'flag': return node.value
    case 'text': return readText(reading, node, at, textRules.extraText)
    case 'object': return readWithUnit(reading, node, at)
    case 'cell': return readCell(reading, node, at)
    case 'list':
      reading.problems.addValue('json-syntax', at, node, 'A list cannot be kept here; write a number, true or false, a text, or { value, unit }.')
      return undefined
    default: return undefined
  }
}

function readWithUnit(reading: Reading, node: RawObject, at: string): ExtraValue | undefined {
  const slots = sortIntoSlots(reading, node, valueTable, at)
  const [unitNode, valueNode] = slots
  for (const name of valueTable.names) {
    if (slots[valueTable.index.get(name) as number] === undefined) reading.problems.add('missing', `${at}/${name}`, node, `${name} is missing: { value, unit } needs both.`)
  }
  const unit = unitNode && readUnit(reading, unitNode, `${at}/unit`)
  const value = valueNode && readOwnNumber(reading, valueNode, `${at}/value`)
  return unit === undefined || value === undefined ? undefined : { unit, value }
}

function readUnit(reading: Reading, node: RawNode, at: string): string | undefined {
  const unit = readText(reading, node, at, textRules.extraUnit)
  if (unit !== textMark) return unit
  reading.problems.addValue('not-allowed-here', at, node, 'text is no unit: it marks a text in the CSV form. Name the unit otherwise.')
  return undefined
}

function readCell(reading: Reading, cell: RawCell, at: string): ExtraValue | undefined {
  const bare: RawCell = { ...cell, unit: '' }
  if (cell.unit === textMark) return readText(reading, bare, at, textRules.extraText)
  if (cell.unit !== '') {
    if (cell.text === '') return undefined
    const unit = checkedUnit(reading, cell, at, textRules.extraUnit)
    const value = readOwnNumber(reading, bare, at)
    return unit === undefined || value === undefined ? undefined : { unit, value }
  }
  if (isNumberText(cell.text)) return readOwnNumber(reading, cell, at)
  return flagOf(cell.text) ?? readText(reading, cell, at, textRules.extraText)
}

function checkedUnit(reading: Reading, cell: RawCell, at: string, rule: TextRule): string | undefined {
  const checked = checkText(cell.unit, rule)
  if (typeof checked === 'string') return checked
  reading.problems.add(checked.code, `${at}/unit`, { ...cell, cell: unitCell }, `Unit: ${checked.message}`, { value: cell.unit })
  return undefined
}
