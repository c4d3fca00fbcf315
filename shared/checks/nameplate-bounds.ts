import { peakPercent } from '../motion/limit'
import type { Nameplate } from '../settings/nameplate'
import type { ValuePlace } from '../settings/value-place'

/** Least and most that a unit allows for one value; inclusive, in the value's own unit. */
export interface Bounds { readonly min?: number, readonly max?: number }

type BoundsOf = (nameplate: Nameplate) => Bounds
const upTo = (max: number | undefined): Bounds => max === undefined || max === Infinity ? {} : { max }

const speed: BoundsOf = ({ maxSpeed }) => upTo(maxSpeed)
const acceleration: BoundsOf = ({ maxAcceleration }) => upTo(maxAcceleration)
const peak: BoundsOf = nameplate => upTo(peakPercent(nameplate))
const pressing: BoundsOf = ({ maxSpeed = Infinity, maxPressSpeed = Infinity }) => upTo(Math.min(maxSpeed, maxPressSpeed))

const setupBounds: Readonly<Record<string, BoundsOf>> = {
  homingSpeed: speed, homingCreepSpeed: speed, speedLimit: speed, jogSpeed: speed, pressSpeed: pressing,
  homingAcceleration: acceleration, accelerationLimit: acceleration, decelerationLimit: acceleration,
  thrustLimit: peak, thrustLimitPositive: peak, thrustLimitNegative: peak,
  overloadTime: ({ maxOverloadTime }) => upTo(maxOverloadTime),
}
const moveBounds: Readonly<Record<string, BoundsOf>> = { speed, acceleration, deceleration: acceleration, pressSpeed: pressing, forceLimit: peak }

/**
 * What the nameplate allows for a value: the bounds that the rules speed-limit, acceleration-limit, press-speed, press-force,
 * thrust-limit, overload-plausible and extra-range hold it against. Empty where no such bound is known.
 */
export function nameplateBounds({ section, field }: ValuePlace, nameplate: Nameplate, press = false): Bounds {
  if (section === 'extra') {
    const entry = nameplate.dictionary && Object.hasOwn(nameplate.dictionary, field) ? nameplate.dictionary[field] : undefined
    return { ...entry?.min !== undefined && { min: entry.min }, ...upTo(entry?.max) }
  }
  if (press && section === 'move' && field === 'forceLimit') {
    const { pressForceMin, pressForceMax = Infinity } = nameplate
    return { ...pressForceMin !== undefined && { min: pressForceMin }, ...upTo(Math.min(pressForceMax, peakPercent(nameplate))) }
  }
  const table = section === 'setup' ? setupBounds : section === 'move' ? moveBounds : {}
  return Object.hasOwn(table, field) ? table[field]?.(nameplate) ?? {} : {}
}
