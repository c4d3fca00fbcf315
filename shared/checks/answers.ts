import { inWords } from './format'
import type { CheckResult, CheckValue, Level } from './types'

type Values = Readonly<Record<string, CheckValue>>
type Say = (at: readonly string[], message: string, values: Values) => CheckResult

export interface Answers {
  readonly stop: Say
  readonly warn: Say
  readonly note: Say
  /** "Travel cannot be judged without nameplate.stroke." */
  readonly unknown: (subject: string, missing: readonly string[], at: readonly string[], values?: Values) => CheckResult
}

/** Makers of results that carry the rule's id, so that no rule can sign with another's. */
export function answers(rule: string): Answers {
  const say = (level: Level): Say => (at, message, values) => ({ rule, level, at, message, values })
  return {
    stop: say('stop'),
    warn: say('warn'),
    note: say('note'),
    unknown: (subject, missing, at, values = {}) => ({
      rule, level: 'unknown', at, values, missing, message: `${subject} cannot be judged without ${inWords(missing)}.`,
    }),
  }
}
