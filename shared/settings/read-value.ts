import type { RawNode } from './raw'
import { type Reading, shownIn } from './reading'
import { refusesUnit } from './cell-unit'
import { nearestKey } from './nearest-key'
import { type TextRule, checkText } from './text-rules'

/*
 * One value each: a tree node becomes a text, flag or choice, or a reported problem and undefined (numbers: read-number).
 * Every message says what the value would have to be.
 */

/** A text by its rule, in NFC. A number or flag where a text belongs is refused: 007 and 7 are not the same text. */
export function readText(reading: Reading, node: RawNode, at: string, rule: TextRule): string | undefined {
  if (node.kind === 'refused' || refusesUnit(reading, node, at)) return undefined
  if (node.kind !== 'text' && node.kind !== 'cell') {
    reading.problems.addValue('json-syntax', at, node, `A text in quotes belongs here, not ${shownIn(reading, node)}.`)
    return undefined
  }
  const checked = checkText(node.text, rule)
  if (typeof checked === 'string') return checked
  reading.problems.addValue(checked.code, at, node, checked.message)
  return undefined
}

/** One of the words, spelt exactly. */
export function readChoice<Choice extends string>(reading: Reading, node: RawNode, at: string, choices: readonly Choice[]): Choice | undefined {
  if (node.kind === 'refused' || refusesUnit(reading, node, at)) return undefined
  const text = node.kind === 'text' || node.kind === 'cell' ? node.text : undefined
  const choice = choices.find(each => each === text)
  if (choice !== undefined) return choice
  const meant = text === undefined || reading.problems.full ? undefined : nearestKey(text, choices)
  reading.problems.addValue('enum', at, node, `${shownIn(reading, node)} is not one of ${choices.join(', ')}.`, meant)
  return undefined
}

/** true or false; spreadsheets write a cell in capitals, which is let pass. */
export function readFlag(reading: Reading, node: RawNode, at: string): boolean | undefined {
  if (node.kind === 'flag') return node.value
  if (node.kind === 'refused' || refusesUnit(reading, node, at)) return undefined
  const flag = node.kind === 'cell' ? flagOf(node.text) : undefined
  if (flag === undefined) reading.problems.addValue('enum', at, node, `${shownIn(reading, node)} is not one of true, false.`)
  return flag
}

/** The flag that a cell says, in small letters or capitals; undefined for any other text. */
export function flagOf(text: string): boolean | undefined {
  if (text === 'true' || text === 'TRUE') return true
  return text === 'false' || text === 'FALSE' ? false : undefined
}
