import { accelerationLimit } from './acceleration-limit'
import { chainEndless } from './chain-endless'
import { chainTarget } from './chain-target'
import { extraRange } from './extra-range'
import { pressForce } from './press-force'
import { pressPath } from './press-path'
import { pressSpeed } from './press-speed'
import { relativeStep } from './relative-step'
import { selectReach } from './select-reach'
import { siteRule } from './site-rule'
import { speedLimit } from './speed-limit'
import { targetInside } from './target-inside'
import { travelSpan } from './travel-span'
import type { Rule } from './types'
import { unitMatches } from './unit-matches'
import { unusedRows } from './unused-rows'

/** Kept beside stored results. Raise it with every change that can give one content another answer. */
export const ruleSetVersion = '1'

/** All rules, in the order in which results of one level are told. */
export const rules: readonly Rule[] = [
  travelSpan, targetInside, relativeStep, pressPath, pressForce, pressSpeed, speedLimit, accelerationLimit,
  chainTarget, chainEndless, selectReach, unusedRows, unitMatches, siteRule, extraRange,
]

const byId = new Map(rules.map(rule => [rule.id, rule]))

/** The rule of an id; undefined for an id of another rule set, as stored results may carry. */
export function ruleOf(id: string): Rule | undefined {
  return byId.get(id)
}
