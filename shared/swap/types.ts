import type { Comparison } from '../diff/types'
import type { Nameplate } from '../settings/nameplate'
import type { Carry, Content, SetupFieldName, Weight } from '../settings/types'

/** What is exchanged: the whole unit, or where drive and actuator are separate only one of them. */
export const replacedParts = ['unit', 'drive', 'actuator'] as const
export type ReplacedPart = (typeof replacedParts)[number]

/** What the vault hears of, in this order. Taking the kit and writing the values happen between unit-in and read-back. */
export const swapSteps = ['unit-in', 'safe', 'read-back', 'first-motion', 'running', 'release'] as const
export type SwapStep = (typeof swapSteps)[number]
/** The step that comes next, or how the swap ended. */
export const swapStates = [...swapSteps, 'released', 'abandoned'] as const
export type SwapState = (typeof swapStates)[number]

/** How a load that could fall is kept from falling. */
export const blockings = ['prop', 'pin', 'lowered'] as const
export type Blocking = (typeof blockings)[number]

/** same: not one value changes. adjust: percentages are rescaled. unfit: see the reasons. */
export const fits = ['same', 'adjust', 'unfit'] as const
export type Fit = (typeof fits)[number]

/** The first four are hard: nobody may go on with them. */
export const unfitCodes = ['axis-kind', 'stroke-short', 'no-brake', 'force-outside', 'nameplate-missing', 'actuator-model', 'unit-state', 'too-many-moves', 'stop-check'] as const
export type UnfitCode = (typeof unfitCodes)[number]

export interface UnfitReason {
  readonly code: UnfitCode
  /** Nobody may go on with it; else a planner may, with name, time and reason. */
  readonly hard: boolean
  /** One sentence with numbers and units. */
  readonly message: string
  /** JSON Pointers into the content. */
  readonly at: readonly string[]
}

/** A value that has to be another on the new unit: a percentage that means other newtons there, or a home offset that counts the other way. */
export interface Adjustment {
  /** JSON Pointer into the content. */
  readonly at: string
  /** As the change of a difference has them: section, move number, field. */
  readonly section: 'setup' | 'move'
  readonly row?: number
  readonly field: string
  readonly before: number
  readonly after: number
  readonly unit: string
  /** N, rotary N·m; null for a value that is no force. */
  readonly newtonsBefore: number | null
  readonly newtonsAfter: number | null
  readonly why: string
}

/** One side of the swap, as the register has it. */
export interface SwapSide {
  readonly model: string
  readonly firmware?: string
  readonly actuatorModel?: string
  readonly nameplate?: Nameplate
}

/** What becomes of one value of the known-good. */
export interface CarriedValue {
  readonly section: 'setup' | 'zone' | 'move' | 'extra'
  /** Name in the format; for extra the key; absent for zones and moves, which go as a whole. */
  readonly field?: string
  readonly carry: Carry
  /** One sentence: why, on this swap. */
  readonly why: string
}

/** The known-good as fitted to the new unit. */
export interface KitContent {
  /** What goes to the new unit: percentages rescaled, values to be taught left out. */
  readonly content: Content
  readonly adjustments: readonly Adjustment[]
  /** Setup and extra in the order of the format, then zones and moves. */
  readonly carried: readonly CarriedValue[]
  /** To be taught on the new unit, and left out: setup names, extra as `extra:KEY`. */
  readonly teach: readonly string[]
  /** Copied, and to be proved at the machine. */
  readonly prove: readonly string[]
  /** Setup values among `teach`. */
  readonly taughtSetup: readonly SetupFieldName[]
  /** Keys of extra among `teach`. */
  readonly taughtExtra: readonly string[]
}

/** A value that the kit holds and the unit's firmware seems to have no place for: `extra:KEY`, a setup name, `move.FIELD`. */
export interface MissingKey { readonly key: string, readonly weight: Weight, /** Known not to be in this firmware. */ readonly accepted: boolean }

/** A read-back against the kit. */
export interface ReadBackComparison extends Comparison {
  readonly missingKeys: readonly MissingKey[]
  /** Rows that the kit has and the unit has not: the table was written in part. */
  readonly rowsMissing: readonly { readonly section: 'zone' | 'move', readonly row: number }[]
  /** Of the kit's keys, the kit's value where the difference is within tolerance; null: what differs is no part of a code. */
  readonly scribeCode: string | null
}

export const motionItemKinds = ['jog', 'brake-hold', 'enable-loss', 'emergency-stop', 'move', 'chain'] as const
export type MotionItemKind = (typeof motionItemKinds)[number]

/** One line of the first-motion list. */
export interface MotionItem {
  /** `jog`, `brake-hold`, `enable-loss`, `emergency-stop`, `move-5`, `chain-5`. */
  readonly item: string
  readonly kind: MotionItemKind
  /** What happens and what to see, in one sentence: "5→6→7→8 runs by itself, 4 movements, ends at 120 mm". */
  readonly words: string
  /** The moves of it in order, one for a move. */
  readonly moves: readonly number[]
  /** It runs on until another move is called. */
  readonly endless: boolean
  readonly direction: 'positive' | 'negative' | 'either' | null
  /** mm or deg; null where it hangs on where the axis stands. */
  readonly end: number | null
  /** Longest time at the reduced speed in s; null where it hangs on where the axis stands. */
  readonly seconds: number | null
  /** A jerk limit, or a start nobody knows, makes it longer than can be told. */
  readonly atLeast: boolean
  /** Select inputs that are on, lowest first; null where moves are called over the bus or the inputs cannot call it. */
  readonly inputs: readonly number[] | null
}
