import type { Carry, Weight } from './types'

/*
 * The one table of setup fields. Reader, writer, published schema, difference, checks, kit and every screen go by it.
 * `cia402` is the object index of IEC 61800-7-201 that holds the same quantity; 605Ah, 605Ch, 607Bh, 60A4h, 60F9h and
 * 60FBh are from memory, not verified.
 */

export const setupGroups = ['travel', 'homing', 'motion', 'force', 'load', 'tuning', 'io', 'bus'] as const
export type SetupGroup = (typeof setupGroups)[number]

/** Canonical unit on a linear and on a rotary axis; null = the field is refused there; '' = a bare number. */
export interface UnitByKind { readonly linear: string | null, readonly rotary: string | null }

interface Common {
  readonly group: SetupGroup
  /** The words on the screen. */
  readonly label: string
  /** One sentence for the format page. */
  readonly help: string
  readonly weight: Weight
  readonly carry: Carry
  /** A change always opens a finding. */
  readonly watched: boolean
  readonly cia402?: string
}
export interface NumberField extends Common {
  readonly type: 'number'
  readonly unit: UnitByKind
  readonly min?: number
  readonly max?: number
  /** The value must be greater than this. */
  readonly above?: number
  readonly whole?: true
  /** The drive's own number: kept as the double that it is, never rounded or converted. */
  readonly driveOwn?: true
  /** Stands for both sides of the set value and is shown with ±. */
  readonly plusMinus?: true
}
export interface FlagField extends Common { readonly type: 'flag' }
export interface ChoiceField extends Common {
  readonly type: 'choice'
  readonly choices: { readonly linear: readonly string[], readonly rotary: readonly string[] }
}
export type SetupField = NumberField | FlagField | ChoiceField

const length: UnitByKind = { linear: 'mm', rotary: 'deg' }
const speed: UnitByKind = { linear: 'mm/s', rotary: 'deg/s' }
const acceleration: UnitByKind = { linear: 'mm/s²', rotary: 'deg/s²' }
const both = (unit: string): UnitByKind => ({ linear: unit, rotary: unit })
const linearOnly = (unit: string): UnitByKind => ({ linear: unit, rotary: null })
const rotaryOnly = (unit: string): UnitByKind => ({ linear: null, rotary: unit })
const same = <const Choices extends readonly string[]>(...choices: Choices) => ({ linear: choices, rotary: choices })

const harm = { weight: 'harm', watched: true } as const
const motion = { weight: 'motion', watched: false } as const
const watchedMotion = { weight: 'motion', watched: true } as const
const copy = { carry: 'copy' } as const
const prove = { carry: 'prove' } as const
const place = { carry: 'place' } as const

export const setupFields = {
  positiveDirection: { group: 'travel', type: 'choice', label: 'positive direction', choices: { linear: ['extend', 'retract'], rotary: ['clockwise', 'counterclockwise'] }, ...harm, ...place, cia402: '607Eh', help: 'The way the axis goes when its position counts up; a rotary axis as seen looking at its output face.' },
  softLimitsActive: { group: 'travel', type: 'flag', label: 'soft limits active', ...harm, ...copy, help: 'Whether the drive holds the soft limits. Absent means yes where limits are given.' },
  softLimitMin: { group: 'travel', type: 'number', label: 'soft limit, min', unit: length, ...harm, ...place, cia402: '607Dh', help: 'The lowest position the drive lets a move end at.' },
  softLimitMax: { group: 'travel', type: 'number', label: 'soft limit, max', unit: length, ...harm, ...place, cia402: '607Dh', help: 'The highest position the drive lets a move end at.' },
  homeOffset: { group: 'travel', type: 'number', label: 'home offset', unit: length, ...harm, ...prove, cia402: '607Ch', help: 'Zero lies at home plus this offset, so that home itself reads minus the offset. What becomes of it on another unit hangs on the homing method.' },
  modulo: { group: 'travel', type: 'number', label: 'modulo', unit: rotaryOnly('deg'), above: 0, ...harm, ...copy, cia402: '607Bh', help: 'The position wraps at this value.' },

  homingMethod: { group: 'homing', type: 'choice', label: 'method', choices: same('hard-stop', 'limit-switch', 'home-switch', 'index-pulse', 'current-position', 'absolute-encoder'), ...harm, ...copy, cia402: '6098h', help: 'What the axis finds its zero by.' },
  homingDirection: { group: 'homing', type: 'choice', label: 'direction', choices: same('negative', 'positive'), ...harm, ...copy, cia402: '6098h', help: 'The way it sets off to find home.' },
  homingSpeed: { group: 'homing', type: 'number', label: 'speed', unit: speed, min: 0, ...harm, ...copy, cia402: '6099h', help: 'Speed while it looks for home.' },
  homingCreepSpeed: { group: 'homing', type: 'number', label: 'creep speed', unit: speed, min: 0, ...harm, ...copy, cia402: '6099h', help: 'Speed of the last, slow part of homing.' },
  homingAcceleration: { group: 'homing', type: 'number', label: 'acceleration', unit: acceleration, min: 0, ...motion, ...copy, cia402: '609Ah', help: 'Acceleration and braking while homing.' },
  homingForceLimit: { group: 'homing', type: 'number', label: 'force limit', unit: both('%'), min: 0, ...harm, ...copy, help: 'Most thrust or torque while homing, of the rated one.' },

  speedLimit: { group: 'motion', type: 'number', label: 'speed limit', unit: speed, min: 0, ...harm, ...copy, cia402: '607Fh', help: 'The drive never goes faster.' },
  accelerationLimit: { group: 'motion', type: 'number', label: 'acceleration limit', unit: acceleration, min: 0, ...harm, ...copy, cia402: '60C5h', help: 'The drive never accelerates harder.' },
  decelerationLimit: { group: 'motion', type: 'number', label: 'deceleration limit', unit: acceleration, min: 0, ...harm, ...copy, cia402: '60C6h', help: 'The drive never brakes harder, a quick stop aside.' },
  quickStopDeceleration: { group: 'motion', type: 'number', label: 'quick stop', unit: acceleration, min: 0, ...harm, ...copy, cia402: '6085h', help: 'Braking on a quick stop.' },
  jogSpeed: { group: 'motion', type: 'number', label: 'jog speed', unit: speed, min: 0, ...harm, ...copy, help: 'Speed while a person jogs the axis.' },
  pressSpeed: { group: 'motion', type: 'number', label: 'press speed', unit: speed, min: 0, ...harm, ...copy, help: 'Speed of the slow part of a press that names none of its own.' },
  jerk: { group: 'motion', type: 'number', label: 'jerk', unit: { linear: 'mm/s³', rotary: 'deg/s³' }, min: 0, ...motion, ...copy, cia402: '60A4h', help: 'How fast acceleration may change.' },
  smoothingTime: { group: 'motion', type: 'number', label: 'smoothing', unit: both('ms'), min: 0, ...motion, ...copy, help: 'Filter on the set position; adds this time to each move.' },
  inPositionWindow: { group: 'motion', type: 'number', label: 'in-position window', unit: length, min: 0, plusMinus: true, ...watchedMotion, ...copy, cia402: '6067h', help: 'The move counts as done inside this band.' },
  inPositionTime: { group: 'motion', type: 'number', label: 'in-position time', unit: both('ms'), min: 0, ...watchedMotion, ...copy, cia402: '6068h', help: 'How long it must stay inside the band.' },
  followingErrorWindow: { group: 'motion', type: 'number', label: 'following error', unit: length, min: 0, plusMinus: true, ...harm, ...copy, cia402: '6065h', help: 'The drive stops when the axis lags by more.' },
  followingErrorTime: { group: 'motion', type: 'number', label: 'following error time', unit: both('ms'), min: 0, ...harm, ...copy, cia402: '6066h', help: 'How long it may lag before the drive stops.' },

  thrustLimit: { group: 'force', type: 'number', label: 'thrust limit', unit: both('%'), min: 0, ...harm, ...copy, cia402: '6072h', help: 'Most thrust or torque either way, of the rated one.' },
  thrustLimitPositive: { group: 'force', type: 'number', label: 'thrust limit, positive', unit: both('%'), min: 0, ...harm, ...copy, cia402: '60E0h', help: 'Most thrust towards plus, by the sign of the force.' },
  thrustLimitNegative: { group: 'force', type: 'number', label: 'thrust limit, negative', unit: both('%'), min: 0, ...harm, ...copy, cia402: '60E1h', help: 'Most thrust towards minus, by the sign of the force.' },
  overloadLevel: { group: 'force', type: 'number', label: 'overload level', unit: both('%'), min: 0, ...harm, ...copy, help: 'Above this the overload time runs.' },
  overloadTime: { group: 'force', type: 'number', label: 'overload time', unit: both('ms'), min: 0, ...harm, ...copy, help: 'The drive trips after this time above the overload level.' },

  payloadMass: { group: 'load', type: 'number', label: 'payload', unit: linearOnly('kg'), min: 0, ...harm, ...copy, help: 'Mass that the axis carries, the moving part of the unit aside.' },
  payloadInertia: { group: 'load', type: 'number', label: 'payload inertia', unit: rotaryOnly('kg·cm²'), min: 0, ...harm, ...copy, help: 'Inertia that the axis turns, the rotor of the unit aside.' },
  mountingAngle: { group: 'load', type: 'number', label: 'mounting angle', unit: both('deg'), min: -90, max: 90, ...harm, ...place, help: 'Linear: the positive direction against level. Rotary: tilt of the shaft from vertical.' },
  unbalanceTorque: { group: 'load', type: 'number', label: 'unbalance torque', unit: rotaryOnly('N·m'), min: 0, ...harm, ...place, help: 'Torque of the off-centre load with the shaft level.' },
  frictionForce: { group: 'load', type: 'number', label: 'friction', unit: linearOnly('N'), min: 0, ...motion, ...prove, help: 'Force that friction takes while moving.' },
  frictionTorque: { group: 'load', type: 'number', label: 'friction', unit: rotaryOnly('N·m'), min: 0, ...motion, ...prove, help: 'Torque that friction takes while turning.' },

  positionGain: { group: 'tuning', type: 'number', label: 'position gain', unit: both('1/s'), min: 0, ...watchedMotion, ...prove, cia402: '60FBh', help: 'Speed asked for per deviation.' },
  velocityGain: { group: 'tuning', type: 'number', label: 'velocity gain', unit: both(''), driveOwn: true, ...watchedMotion, ...prove, cia402: '60F9h', help: 'The drive’s own number, kept digit for digit.' },
  velocityIntegralTime: { group: 'tuning', type: 'number', label: 'integral time', unit: both('ms'), min: 0, ...watchedMotion, ...prove, cia402: '60F9h', help: 'Integral time of the velocity loop.' },
  velocityFeedForward: { group: 'tuning', type: 'number', label: 'feed-forward', unit: both('%'), min: 0, ...watchedMotion, ...prove, help: 'Part of the set speed given past the position loop.' },
  inertiaRatio: { group: 'tuning', type: 'number', label: 'inertia ratio', unit: both('%'), min: 0, ...watchedMotion, ...prove, help: '100 means that the load equals the rotor.' },
  notchFrequency: { group: 'tuning', type: 'number', label: 'notch', unit: both('Hz'), min: 0, ...watchedMotion, ...prove, help: 'Frequency that the drive leaves out.' },

  inputSwitching: { group: 'io', type: 'choice', label: 'inputs', choices: same('p', 'n'), ...harm, ...place, help: 'p: the field signal pulls to plus (PNP). n: it pulls to 0 V (NPN).' },
  outputSwitching: { group: 'io', type: 'choice', label: 'outputs', choices: same('p', 'n'), ...harm, ...place, help: 'p: the output pulls to plus (PNP). n: it pulls to 0 V (NPN).' },
  selectInputs: { group: 'io', type: 'number', label: 'select inputs', unit: both(''), whole: true, min: 0, max: 10, ...harm, ...place, help: 'Binary inputs that choose the move; 0 means called over the bus.' },
  selectSettleTime: { group: 'io', type: 'number', label: 'settle time', unit: both('ms'), min: 0, ...harm, ...copy, help: 'The select inputs must stand this long before the start.' },
  startPulseTime: { group: 'io', type: 'number', label: 'start pulse', unit: both('ms'), min: 0, ...harm, ...copy, help: 'Shortest start signal that counts.' },
  onEnableLoss: { group: 'io', type: 'choice', label: 'on enable loss', choices: same('stop-and-hold', 'stop-and-release', 'release'), ...harm, ...copy, cia402: '605Ah, 605Ch', help: 'What the drive does when its enable goes.' },
  brakeFitted: { group: 'io', type: 'flag', label: 'brake fitted', ...harm, ...copy, help: 'Whether the drive has a brake to handle.' },
  brakeReleaseDelay: { group: 'io', type: 'number', label: 'brake release', unit: both('ms'), min: 0, ...harm, ...copy, help: 'Waits for the brake to open before it moves.' },
  brakeEngageDelay: { group: 'io', type: 'number', label: 'brake engage', unit: both('ms'), min: 0, ...harm, ...copy, help: 'Holds on this long while the brake closes.' },

  nodeAddress: { group: 'bus', type: 'number', label: 'node address', unit: both(''), whole: true, min: 0, max: 65535, ...harm, ...place, help: 'Address on the bus; 0 means unset.' },
} as const satisfies Record<string, SetupField>

export type SetupFieldName = keyof typeof setupFields

type ValueOf<Field> = Field extends { type: 'number' } ? number
  : Field extends { type: 'flag' } ? boolean
    : Field extends { choices: { linear: readonly (infer A)[], rotary: readonly (infer B)[] } } ? A | B : never

/** Setup values by field; numbers in the canonical unit of the axis kind. */
export type SetupValues = { readonly [Name in SetupFieldName]?: ValueOf<(typeof setupFields)[Name]> }

/** Names in the order of the table: the order of screens and sheets, not of the canonical text. */
export const setupFieldNames = Object.keys(setupFields) as SetupFieldName[]

/** The table's entry, with the widened type; undefined for a name that is no setup field. */
export function setupField(name: string): SetupField | undefined {
  return Object.hasOwn(setupFields, name) ? setupFields[name as SetupFieldName] : undefined
}
