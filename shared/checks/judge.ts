import { rules, ruleSetVersion } from './table'
import { levels, type CheckResult, type JudgeInput, type Judgement } from './types'

/** Judges a content by every rule: all results at once, never an exception for what is missing. */
export function judge(input: JudgeInput): Judgement {
  const judged = rules.filter(rule => rule.applies(input))
  const results = judged.flatMap(rule => rule.judge(input))
  return {
    ruleSet: ruleSetVersion,
    results: bySeverity(results),
    judged: judged.map(rule => rule.id),
    notApplicable: rules.filter(rule => !judged.includes(rule)).map(rule => rule.id),
  }
}

/** Stop, warn, note, unknown; within a level the order stays that of the table and of the rows. */
function bySeverity(results: readonly CheckResult[]): CheckResult[] {
  return levels.flatMap(level => results.filter(result => result.level === level))
}
