import type { CheckResult, JudgeInput, Rule } from '../../shared/checks/types'
import type { Nameplate } from '../../shared/settings/nameplate'
import type { Content, Move, Setup } from '../../shared/settings/types'

/*
 * Small inputs for the tests of the rules, so that a test shows only the values that it is about.
 */

type Rest = Partial<Omit<Move, 'move' | 'kind' | 'target'>>

/** 250 mm/s and 2000 mm/s² unless said. */
export function absolute(move: number, target: number, rest: Rest = {}): Move {
  return { move, kind: 'absolute', target, speed: 250, acceleration: 2000, ...rest }
}

export function relative(move: number, target: number, rest: Rest = {}): Move {
  return { move, kind: 'relative', target, speed: 250, acceleration: 2000, ...rest }
}

/** 30 % at 10 mm/s unless said. */
export function press(move: number, approach: number, target: number, rest: Rest = {}): Move {
  return { move, kind: 'press', target, approach, speed: 250, acceleration: 2000, forceLimit: 30, pressSpeed: 10, ...rest }
}

export function unused(move: number): Move {
  return { move, kind: 'absolute', target: 0, speed: 0, acceleration: 0 }
}

/** Soft limits 0 to 198 mm. */
export const limits = { softLimitMin: 0, softLimitMax: 198 } as const satisfies Setup

export function linear(setup: Setup = {}, moves: readonly Move[] = [], rest: Partial<Content> = {}): Content {
  return { axisKind: 'linear', extra: {}, moves, setup, zones: [], ...rest }
}

export function rotary(setup: Setup = {}, moves: readonly Move[] = [], rest: Partial<Content> = {}): Content {
  return { ...linear(setup, moves, rest), axisKind: 'rotary' }
}

/** A plate with the three fields that every plate has, and those given. */
export function plate(rest: Partial<Nameplate> = {}): Nameplate {
  return { model: 'HL40-200V', axisKind: 'linear', stroke: 200, ...rest }
}

/** An axis without flags, rules and known-good, its unit registered as the file says. */
export function judgeInput(content: Content, rest: Partial<JudgeInput> = {}): JudgeInput {
  return {
    content,
    axis: { axisKind: content.axisKind, flags: [] },
    unit: { model: 'HL40-200V' },
    registered: { model: 'HL40-200V' },
    rules: [],
    ...rest,
  }
}

/** "level: sentence" for each result of a rule, or the one line "not applicable". */
export function told(rule: Rule, input: JudgeInput): string[] {
  return rule.applies(input) ? rule.judge(input).map(tell) : ['not applicable']
}

export function tell(result: CheckResult): string {
  return `${result.level}: ${result.message}`
}
