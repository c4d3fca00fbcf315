import type { Nameplate } from '../settings/nameplate'
import type { Setup } from '../settings/types'
import { forceBaseOf } from './force-base'

export type ForcePlate = Pick<Nameplate, 'forceBase' | 'ratedThrust' | 'peakThrust'>
export type ThrustLimits = Pick<Setup, 'thrustLimit' | 'thrustLimitPositive' | 'thrustLimitNegative'>

/** What the unit can do at most, in % of its force base: 100·peak/base; Infinity where the nameplate does not tell. */
export function peakPercent(plate: ForcePlate = {}): number {
  const base = forceBaseOf(plate)
  return base === undefined || plate.peakThrust === undefined ? Infinity : 100 * plate.peakThrust / base
}

/** What the unit can do without end, in % of its force base: 100 where that is rated thrust or not known, 100·rated/peak else. */
export function ratedPercent(plate: ForcePlate = {}): number {
  const base = forceBaseOf(plate)
  return base === undefined || plate.ratedThrust === undefined ? 100 : 100 * plate.ratedThrust / base
}

/**
 * The limit of a thrust towards plus (1) or minus (-1) in % of the force base: the lowest of the general one, the one of
 * that sign, what the unit can do, and a move's own. By the sign of the force, not of the motion: braking on the way up
 * pushes down. Infinity where nothing limits it.
 */
export function limitPercent(sign: 1 | -1, setup: ThrustLimits, plate: ForcePlate = {}, forceLimit = Infinity): number {
  const { thrustLimit = Infinity, thrustLimitPositive = Infinity, thrustLimitNegative = Infinity } = setup
  return Math.min(thrustLimit, sign === 1 ? thrustLimitPositive : thrustLimitNegative, peakPercent(plate), forceLimit)
}

/** The same limit in N or N·m; undefined where the force base is not known. */
export function limitForce(sign: 1 | -1, setup: ThrustLimits, plate: ForcePlate = {}, forceLimit = Infinity): number | undefined {
  const base = forceBaseOf(plate)
  return base === undefined ? undefined : limitPercent(sign, setup, plate, forceLimit) / 100 * base
}
