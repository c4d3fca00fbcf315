import type { FormatErrorCode } from './types'
import type { RawNode } from './raw'
import type { Reading } from './reading'
import { toCanonical } from '../units/convert'
import type { Exact } from '../units/exact'
import { type NumberProblem, largestNumber, parseDecimalText, parseOwnNumber, plainNumber, roundToMillionths } from '../units/number'
import { refusesUnit, unitOf } from './cell-unit'
import { shownIn } from './reading'

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
    reading.problems.addValue('number-range', at, node, `${shownIn(reading, node)} is out of reach: at most 1,000,000,000 either way${canonical ? ` in ${canonical}` : ''}.`)
    return undefined
  }
  if (rounded.rounded) reading.rounded += 1
  if (unit && unit.name !== canonical) reading.converted += 1
  return rounded.value
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
  reading.problems.addValue(parsed, at, node, `${shownIn(reading, node)} ${numberFaults[parsed]}.`)
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
  reading.problems.addValue(code, at, node, `${shownIn(reading, node)} will not do: a whole number from ${min} to ${max} belongs here.`)
  return undefined
}

function wholeOf(node: RawNode, reading: Reading): number | undefined {
  if (node.kind === 'number' && !Number.isNaN(node.value)) return Number.isInteger(node.value) ? node.value : undefined
  if (node.kind !== 'number' && node.kind !== 'cell') return undefined
  const exact = parseDecimalText(node.kind === 'cell' ? node.text : reading.source.shown(node))
  return typeof exact !== 'string' && exact.isInteger() ? exact.toNumber() + 0 : undefined
}
