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

/** A level axis with all that the rules ask for, and nothing against any of it on `soundPlate`. */
export const soundSetup = {
  ...limits, positiveDirection: 'extend', homingMethod: 'hard-stop', homingDirection: 'negative', homeOffset: 1, homingSpeed: 20, homingCreepSpeed: 5, homingForceLimit: 30,
  speedLimit: 600, quickStopDeceleration: 5000, inPositionWindow: 0.05, followingErrorWindow: 0.8, positionGain: 50, velocityFeedForward: 100, thrustLimit: 80, payloadMass: 4, mountingAngle: 0,
  frictionForce: 5, selectInputs: 3, selectSettleTime: 6, startPulseTime: 8, onEnableLoss: 'stop-and-hold', brakeFitted: false,
} as const satisfies Setup

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

/** A plate with every field that a rule asks for. */
export const soundPlate = plate({
  hardMargin: 1, maxSpeed: 800, maxAcceleration: 5000, pressForceMin: 20, pressForceMax: 70, maxPressSpeed: 20, maxImpactEnergy: 0.01,
  ratedThrust: 300, peakThrust: 600, movingMass: 1, rotorInertia: 0.5, lead: 10, resolution: 0.001, repeatability: 0.02, inputFilterTime: 2,
  maxPayloadLevel: 30, maxPayloadVertical: 12, maxPayloadInertia: 100, maxOverloadTime: 1000, brakeFitted: false, brakeCloseTime: 40, brakeHolding: 300, dictionary: {},
})

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
