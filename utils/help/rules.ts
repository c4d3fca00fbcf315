import { helpOf } from '#shared/checks/help'
import type { RuleHelp } from '#shared/checks/help/types'
import { addressTwice } from '#shared/checks/live/address-twice'
import { sisterOutlier } from '#shared/checks/live/sister-outlier'
import { rules } from '#shared/checks/table'
import type { Level } from '#shared/checks/types'
import { ruleTests, type RuleTests } from './tests'

/** One rule as the help page tells it. */
export interface RuleEntry {
  readonly id: string
  readonly title: string
  readonly reason: string
  readonly formula: string
  readonly levels: readonly Level[]
  /** Over several axes as they stand now, never kept with a version. */
  readonly live: boolean
  /** Worked with numbers; undefined where none was written yet. */
  readonly example: RuleHelp | undefined
  /** Where it is tested, by its path in the repository. */
  readonly test: string
  /** The four of those tests that no rule is done without. */
  readonly tests: RuleTests | undefined
}

type Told = Pick<RuleEntry, 'id' | 'title' | 'reason' | 'formula' | 'levels'>

function entryOf({ id, title, reason, formula, levels }: Told, live: boolean): RuleEntry {
  const test = `tests/unit/shared/checks/${live ? 'live/' : ''}${id}.test.ts`
  return { id, title, reason, formula, levels, live, example: helpOf(id), test, tests: ruleTests[id] }
}

/** Every rule there is: those that judge a version, then those that hold axes against each other. */
export const ruleEntries: readonly RuleEntry[] = [
  ...rules.map(rule => entryOf(rule, false)),
  ...[sisterOutlier, addressTwice].map(rule => entryOf(rule, true)),
]

/** Entries that have all of the words somewhere in id, title, reason or formula. */
export function findRules(entries: readonly RuleEntry[], wanted: string): readonly RuleEntry[] {
  const words = wanted.toLowerCase().split(/\s+/).filter(word => word !== '')
  return entries.filter(({ id, title, reason, formula }) => {
    const text = `${id} ${title} ${reason} ${formula}`.toLowerCase()
    return words.every(word => text.includes(word))
  })
}

const known = new Set(ruleEntries.map(entry => entry.id))

/** Whether the help page tells of a rule; stored results may name one of an older rule set. */
export const isTold = (rule: string) => known.has(rule)
