import type { AxisFlag } from '../settings/types'
import { pressPath, startOfPress } from './press-path'
import { ruleOf } from './table'
import type { CheckResult, Judgement } from './types'

/**
 * What keeps a version from being marked known-good without a waiver: every stop, and on an axis flagged gravity or press
 * also what a stop rule could not judge. Where a press starts may stay unknown: no value of the file could tell.
 */
export function blocksKnownGood(judgement: Judgement, flags: readonly AxisFlag[]): CheckResult[] {
  const strict = flags.includes('gravity') || flags.includes('press')
  return judgement.results.filter(result => result.level === 'stop'
    || (strict && result.level === 'unknown' && canStop(result) && !isStartOfPress(result)))
}

/** A rule that is no longer in the table is taken for one that can stop. */
function canStop(result: CheckResult): boolean {
  return ruleOf(result.rule)?.levels.includes('stop') ?? true
}

function isStartOfPress({ rule, missing = [] }: CheckResult): boolean {
  return rule === pressPath.id && missing.length === 1 && missing[0] === startOfPress
}
