import type { DictionaryEntry } from '../settings/nameplate'
import type { ExtraValue } from '../settings/types'
import { answers } from './answers'
import { anyValue, inWords, quantity } from './format'
import { atExtra } from './pointers'
import type { CheckResult, JudgeInput, Rule } from './types'

const { stop, unknown } = answers('extra-range')

export const extraRange: Rule = {
  id: 'extra-range',
  title: 'The drive’s own parameters',
  reason: 'A parameter outside its own range is refused by the drive, or taken for something else.',
  formula: 'minimum <= value <= maximum, value among the allowed ones, as the dictionary of the model says',
  levels: ['stop', 'unknown'],
  applies: ({ content, nameplate }) => Object.keys(content.extra)
    .some(key => !nameplate || entryOf(nameplate.dictionary, key) !== undefined),
  judge,
}

function judge({ content, nameplate }: JudgeInput): CheckResult[] {
  if (!nameplate) return [unknown('The drive’s own parameters', ['nameplate.dictionary'], Object.keys(content.extra).map(atExtra))]
  return Object.entries(content.extra).flatMap(([key, held]) => {
    const entry = entryOf(nameplate.dictionary, key)
    return entry ? judgeKey(key, held, entry) : []
  })
}

/** Readings leave the content with the next upload and are no settings to judge. */
function entryOf(dictionary: Readonly<Record<string, DictionaryEntry>> | undefined, key: string): DictionaryEntry | undefined {
  const entry = dictionary && Object.hasOwn(dictionary, key) ? dictionary[key] : undefined
  return entry?.reading ? undefined : entry
}

function judgeKey(key: string, held: ExtraValue, entry: DictionaryEntry): CheckResult[] {
  const { value, unit = entry.unit ?? '' } = typeof held === 'object' ? held : { value: held }
  const name = entry.name === undefined ? key : `${key} (${entry.name})`
  const at = [atExtra(key)]
  if (entry.unit !== undefined && unit !== entry.unit) {
    return [unknown(`${name} in ${unit}`, [`${key} in ${entry.unit}`], at, { key, unit, dictionaryUnit: entry.unit })]
  }
  const say = (text: string, bound: Record<string, number | readonly string[]>) =>
    stop(at, `${name} ${anyValue(value, unit)} ${text}.`, { key, value: typeof value === 'boolean' ? String(value) : value, ...bound })
  if (entry.allowed && !entry.allowed.includes(value)) {
    return [say(`is none of the allowed ${inWords(entry.allowed.map(one => anyValue(one, unit)))}`, { allowed: entry.allowed.map(String) })]
  }
  const { min, max } = entry
  if (min === undefined && max === undefined) return []
  if (typeof value !== 'number') return [say('is no number, as it has to be', {})]
  if (min !== undefined && value < min) return [say(`is below the minimum of ${quantity(min, unit)}`, { min })]
  if (max !== undefined && value > max) return [say(`is above the maximum of ${quantity(max, unit)}`, { max })]
  return []
}
