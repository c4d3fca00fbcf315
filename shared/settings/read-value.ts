import type { FormatErrorCode } from './types'
import type { RawCell, RawNode } from './raw'
import type { Reading } from './reading'
import { toCanonical } from '../units/convert'
import type { Exact } from '../units/exact'
import { type NumberProblem, largestNumber, parseDecimalText, parseOwnNumber, plainNumber, roundToMillionths } from '../units/number'
import { type Unit, findUnit, unitNames, unitsFor } from '../units/units'
import { nearestKey } from './nearest-key'
import { cutText } from './problems'
import { type TextRule, checkText } from './text-rules'

/*
 * One value each: a tree node becomes a number, text, flag or choice, or a reported problem and undefined. Every message
 * says what the value would have to be.
 */

const unitCell = 4

const shown = (reading: Reading, node: RawNode) => cutText(reading.source.shown(node))

/** A number in the canonical unit, rounded to millionths. `canonical` is undefined where the axis kind is not known: then units are not judged. */
export function readNumber(reading: Reading, node: RawNode, at: string, canonical: string | undefined): number | undefined {
  if (node.kind === 'number' && Math.abs(node.value) <= largestNumber) return node.value
  const unit = node.kind === 'cell' ? unitOf(reading, node, at, canonical) : undefined
  if (unit === null) return undefined
  const easy = node.kind === 'cell' && (unit === undefined || unit.name === canonical) ? plainNumber(node.text) : undefined
  if (easy !== undefined) return easy
  const exact = exactOf(reading, node, at)
  if (exact === undefined) return undefined
  const rounded = roundToMillionths(unit ? toCanonical(exact, unit) : exact)
  if (rounded === 'number-range') {
    reading.problems.addValue('number-range', at, node, `${shown(reading, node)} is out of reach: at most 1,000,000,000 either way${canonical ? ` in ${canonical}` : ''}.`)
    return undefined
  }
  if (rounded.rounded) reading.rounded += 1
  if (unit && unit.name !== canonical) reading.converted += 1
  return rounded.value
}

/** The unit beside a cell; undefined for the canonical one left empty, null where it was refused. */
function unitOf(reading: Reading, cell: RawCell, at: string, canonical: string | undefined): Unit | undefined | null {
  if (cell.unit === '' || canonical === undefined) return undefined
  const found = findUnit(cell.unit, canonical)
  if (typeof found !== 'string') return found
  const fitting = unitsFor(canonical).map(each => each.name).join(', ')
  const right = fitting === '' ? 'this value takes no unit; leave the cell empty' : `here fit ${fitting}`
  const fault = found === 'unit-unknown' ? 'is not a unit that is read' : 'does not fit this value'
  const meant = found === 'unit-unknown' && !reading.problems.full ? nearestKey(cell.unit, fitting === '' ? unitNames() : fitting.split(', ')) : undefined
  reading.problems.add(found, at, { ...cell, cell: unitCell }, `Unit "${cutText(cell.unit)}" ${fault}: ${right}.`,
    meant === undefined ? { value: cell.unit } : { value: cell.unit, meant })
  return null
}

const numberFaults: Readonly<Record<NumberProblem, string>> = {
  'number-syntax': 'is no number; write it like -12.5, without a unit or blanks',
  'number-digits': 'has more digits than can be kept; write it shorter, or as text under extra',
  'number-range': 'has an exponent beyond ±40',
}

function exactOf(reading: Reading, node: RawNode, at: string): Exact | undefined {
  return parsedBy(reading, node, at, parseDecimalText)
}

function parsedBy<Parsed extends number | Exact>(
  reading: Reading, node: RawNode, at: string, parse: (text: string) => Parsed | NumberProblem,
): Parsed | undefined {
  if (node.kind === 'refused') return undefined
  const parsed = node.kind === 'number' ? parse(reading.source.shown(node)) : node.kind === 'cell' ? parse(node.text) : 'number-syntax'
  if (typeof parsed !== 'string') return parsed
  reading.problems.addValue(parsed, at, node, `${shown(reading, node)} ${numberFaults[parsed]}.`)
  return undefined
}

/** A number that is the drive's own: kept as the double with the same decimal value, never converted or rounded. */
export function readOwnNumber(reading: Reading, node: RawNode, at: string): number | undefined {
  if (node.kind === 'number' && !Number.isNaN(node.value)) return node.value
  return refusesUnit(reading, node, at) ? undefined : parsedBy(reading, node, at, parseOwnNumber)
}

/** A whole number from `min` to `max`; the code names what it is for: a row number or a value. */
export function readWhole(
  reading: Reading, node: RawNode, at: string, min: number, max: number, code: FormatErrorCode,
): number | undefined {
  if (node.kind === 'refused' || refusesUnit(reading, node, at)) return undefined
  const value = wholeOf(node, reading)
  if (value !== undefined && value >= min && value <= max) return value
  reading.problems.addValue(code, at, node, `${shown(reading, node)} will not do: a whole number from ${min} to ${max} belongs here.`)
  return undefined
}

function wholeOf(node: RawNode, reading: Reading): number | undefined {
  if (node.kind === 'number' && !Number.isNaN(node.value)) return Number.isInteger(node.value) ? node.value : undefined
  if (node.kind !== 'number' && node.kind !== 'cell') return undefined
  const exact = parseDecimalText(node.kind === 'cell' ? node.text : reading.source.shown(node))
  return typeof exact !== 'string' && exact.isInteger() ? exact.toNumber() + 0 : undefined
}

/** A text by its rule, in NFC. A number or flag where a text belongs is refused: 007 and 7 are not the same text. */
export function readText(reading: Reading, node: RawNode, at: string, rule: TextRule): string | undefined {
  if (node.kind === 'refused' || refusesUnit(reading, node, at)) return undefined
  if (node.kind !== 'text' && node.kind !== 'cell') {
    reading.problems.addValue('json-syntax', at, node, `A text in quotes belongs here, not ${shown(reading, node)}.`)
    return undefined
  }
  const checked = checkText(node.text, rule)
  if (typeof checked === 'string') return checked
  reading.problems.addValue(checked.code, at, node, checked.message)
  return undefined
}

/** Whether a cell has a unit where none belongs; reports it. */
function refusesUnit(reading: Reading, node: RawNode, at: string): boolean {
  if (node.kind !== 'cell' || node.unit === '') return false
  reading.problems.add('unit-unfit', at, { ...node, cell: unitCell }, `This value takes no unit; leave the cell with "${cutText(node.unit)}" empty.`, { value: node.unit })
  return true
}

/** One of the words, spelt exactly. */
export function readChoice<Choice extends string>(reading: Reading, node: RawNode, at: string, choices: readonly Choice[]): Choice | undefined {
  if (node.kind === 'refused' || refusesUnit(reading, node, at)) return undefined
  const text = node.kind === 'text' || node.kind === 'cell' ? node.text : undefined
  const choice = choices.find(each => each === text)
  if (choice !== undefined) return choice
  const meant = text === undefined || reading.problems.full ? undefined : nearestKey(text, choices)
  reading.problems.addValue('enum', at, node, `${shown(reading, node)} is not one of ${choices.join(', ')}.`, meant)
  return undefined
}

/** true or false; spreadsheets write a cell in capitals, which is let pass. */
export function readFlag(reading: Reading, node: RawNode, at: string): boolean | undefined {
  if (node.kind === 'flag') return node.value
  if (node.kind === 'refused' || refusesUnit(reading, node, at)) return undefined
  const flag = node.kind === 'cell' ? flagOf(node.text) : undefined
  if (flag === undefined) reading.problems.addValue('enum', at, node, `${shown(reading, node)} is not one of true, false.`)
  return flag
}

/** The flag that a cell says, in small letters or capitals; undefined for any other text. */
export function flagOf(text: string): boolean | undefined {
  if (text === 'true' || text === 'TRUE') return true
  return text === 'false' || text === 'FALSE' ? false : undefined
}
