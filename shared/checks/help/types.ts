import type { Level } from '../types'

/** What the help page says of a rule besides its reason and formula: one example with numbers, and what to do. */
export interface RuleHelp {
  /** The inputs in words. */
  readonly given: string
  /** The formula with these numbers in it. */
  readonly reckoned: string
  readonly level: Level
  /** The sentence that the rule answers. */
  readonly result: string
  /** One sentence: what to do about it. */
  readonly remedy: string
}

export type HelpTexts = Readonly<Record<string, RuleHelp>>
