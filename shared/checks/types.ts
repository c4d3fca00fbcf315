import type { AxisFlag, AxisKind, Content } from '../settings/types'
import type { Nameplate } from '../settings/nameplate'

export const levels = ['stop', 'warn', 'note', 'unknown'] as const
/** stop: can hurt, break, or cannot work. warn: probably wrong. note: worth knowing. unknown: could not be judged. */
export type Level = (typeof levels)[number]

export type CheckValue = number | string | readonly number[] | readonly string[]

/** One answer of one rule. */
export interface CheckResult {
  readonly rule: string
  readonly level: Level
  /** JSON Pointers into the canonical content. */
  readonly at: readonly string[]
  /** One sentence with numbers and units in it. */
  readonly message: string
  /** Numbers unrounded, in canonical units. */
  readonly values: Readonly<Record<string, CheckValue>>
  /** unknown only: what is missing, field names of settings or nameplate (`nameplate.stroke`). */
  readonly missing?: readonly string[]
}

/** Narrows a field for a site, machine or axis. `field` as in settings-format: `thrustLimit`, `move.speed`, `zone.from`, `extra:K-017`. */
export interface SiteRule {
  readonly id: number
  readonly scope: 'site' | 'machine' | 'axis'
  readonly field: string
  readonly min?: number
  readonly max?: number
  readonly fixed?: number | string | boolean
  readonly reason: string
}

/** Everything judge() goes by; whatever is absent makes the rules that need it answer `unknown`. */
export interface JudgeInput {
  readonly content: Content
  readonly axis: {
    readonly axisKind: AxisKind
    readonly flags: readonly AxisFlag[]
    /** Numbers of the moves of a cycle, in order, and what a cycle takes in ms. */
    readonly duty?: { readonly moves: readonly number[], readonly cycleTime: number }
    /** How often the controller looks at the drive's outputs and sets its inputs, in ms. */
    readonly controllerScan?: number
  }
  /** Model and firmware as the file says. */
  readonly unit: { readonly model: string, readonly firmware?: string }
  /** As the register has the unit. */
  readonly registered?: { readonly model: string }
  readonly nameplate?: Nameplate
  readonly rules: readonly SiteRule[]
  /** The known-good in force, if any: its firmware and what keys it holds. */
  readonly knownGood?: { readonly firmware?: string, readonly content: Content }
  /** The version that this one follows, if any. */
  readonly before?: { readonly content: Content }
  /** Percentages that come from another unit. */
  readonly broughtFrom?: {
    /** What it held; percentages that differ from it here were worked out anew. Absent: all of them are as they came. */
    readonly content?: Content
    /** What 100 % means there, in N or N·m. */
    readonly forceBase?: number
    /** Somebody said that the percentages are right for the force base here. */
    readonly rescaled: boolean
  }
}

export interface Judgement {
  /** Version of the rule set, kept beside the results. */
  readonly ruleSet: string
  /** Sorted stop, warn, note, unknown, then by the order of the table. */
  readonly results: readonly CheckResult[]
  /** Rules that ran. */
  readonly judged: readonly string[]
  /** Rules that say nothing here, because they do not apply. */
  readonly notApplicable: readonly string[]
}

/** One rule: pure, all of its answers at once. `applies` false = not applicable. */
export interface Rule {
  readonly id: string
  readonly title: string
  /** One sentence: why it matters. */
  readonly reason: string
  readonly formula: string
  /** A level it can reach. */
  readonly levels: readonly Level[]
  readonly applies: (input: JudgeInput) => boolean
  readonly judge: (input: JudgeInput) => readonly CheckResult[]
}
