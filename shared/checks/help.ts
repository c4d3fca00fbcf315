import { moveHelp } from './help/moves'
import { pressHelp } from './help/presses'
import { thrustHelp } from './help/thrust'
import { travelHelp } from './help/travel'
import type { HelpTexts, RuleHelp } from './help/types'
import { unitHelp } from './help/unit'

/** Worked examples by rule, in the order of their subjects. */
export const ruleHelp: HelpTexts = { ...travelHelp, ...pressHelp, ...thrustHelp, ...moveHelp, ...unitHelp }

/** The example of a rule; undefined for an id of another rule set. */
export function helpOf(rule: string): RuleHelp | undefined {
  return Object.hasOwn(ruleHelp, rule) ? ruleHelp[rule] : undefined
}
