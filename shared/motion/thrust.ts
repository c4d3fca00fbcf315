import { standardGravity, type PressLoad } from './press-force'
import type { Segment } from './ramp'

/** The way an axis moves: towards plus, towards minus, or not at all. */
export type Direction = 1 | -1 | 0

/** What a screw axis moves: the masses of a press, and what its turning parts weigh along the stroke (kg). */
export interface LinearLoad extends PressLoad { readonly turningMass: number }

/** Lowest and highest thrust (N) or torque (N·m) that one state of motion may ask for, signed towards plus. */
export interface Effort { readonly least: number, readonly most: number }

/** Effort for a signed acceleration (mm/s² or deg/s²) and a direction. */
export type EffortOf = (acceleration: number, direction: Direction) => Effort

/** Told in this order: an axis that cannot be held is worse than one that cannot brake, and that worse than one that lags. */
export const phases = ['hold', 'brake', 'accelerate'] as const
export type Phase = (typeof phases)[number]

/**
 * F = (m + mR)·ẍ + m·g·sin θ + sign(ẋ)·Ff in N, from mm/s²; Newton's second law on an incline, friction against the
 * motion (OpenStax University Physics 1, sections 5.6 and 6.2). The turning parts have no weight along the stroke.
 */
export function thrust({ mass, turningMass, mountingAngle, friction }: LinearLoad, acceleration: number, direction: Direction): number {
  const weight = mass * standardGravity * Math.sin(mountingAngle * Math.PI / 180)
  return (mass + turningMass) * acceleration / 1000 + weight + direction * friction
}

/** A linear axis asks for one thrust in each state: least and most are the same. */
export function linearEffort(load: LinearLoad): EffortOf {
  return (acceleration, direction) => {
    const force = thrust(load, acceleration, direction)
    return { least: force, most: force }
  }
}

/** The way of a segment, by its mean speed: a segment never turns round. */
export function directionOf({ t0, t1, v0, a }: Segment): Direction {
  const mean = v0 + a * (t1 - t0) / 2
  return mean > 0 ? 1 : mean < 0 ? -1 : 0
}

/**
 * The phase of a segment: faster in its direction is accelerate, slower is brake. Constant speed has none: its thrust lies
 * between that of rest and that of speeding up.
 */
export function phaseOf(segment: Segment): Phase | undefined {
  const along = segment.a * directionOf(segment)
  return along > 0 ? 'accelerate' : along < 0 ? 'brake' : undefined
}

/** What an effort asks of the thrust towards plus (1) or minus (-1), 0 where it asks nothing that way. */
export function needOf({ least, most }: Effort, sign: 1 | -1): number {
  return Math.max(0, sign === 1 ? most : -least)
}

/** The larger of both ways: what heats the motor, N or N·m. */
export function sizeOf({ least, most }: Effort): number {
  return Math.max(Math.abs(least), Math.abs(most))
}
