import { CodedError } from '../errors/coded'
import { isUnused } from '../settings/move-fields'
import type { Move, Setup } from '../settings/types'
import { distanceOf } from './distance'
import { minus, plus } from './exact'
import { ramp, type Drive, type Segment } from './ramp'

/** What a move goes by besides its row. */
export interface Surroundings {
  readonly setup?: Pick<Setup, 'pressSpeed' | 'modulo' | 'smoothingTime' | 'jerk'>
  /** The unit comes to rest at the approach of a press before it goes on. */
  readonly stopsAtApproach?: boolean
}

/** One movement over time: what pictures draw and rules go by. */
export interface Profile {
  /** Without gaps from t = 0; empty where the axis is there already. */
  readonly segments: readonly Segment[]
  /** Seconds from start to rest, a press without meeting a part; smoothing is not in it. */
  readonly duration: number
  readonly from: number
  readonly end: number
  readonly peakSpeed: number
  /** A press: seconds at which the approach is passed and the part may be met. */
  readonly approachAt?: number
  /** False for a press that is too fast to come to rest at its target. */
  readonly brakesInTime: boolean
  /** The shortest way round was just half a turn: the drive chooses which. */
  readonly halfTurn: boolean
}

/**
 * The movement of a used row from rest at a place. A press slows to its press speed at the approach and goes on to its
 * target as if no part were met; without a press speed it ends at the approach. Throws 'unused-row' for an empty row.
 */
export function profile(move: Move, from: number, around: Surroundings = {}): Profile {
  if (isUnused(move)) throw new CodedError('unused-row', `Move ${move.move} is an unused row: it has no motion.`, { move: move.move })
  if (move.kind === 'press' && move.approach !== undefined) return pressProfile(move, move.approach, from, around)
  const { distance, halfTurn } = distanceOf(move, from, around.setup?.modulo)
  const { segments, peak } = ramp(distance, drive(move, move.speed, 0, 0), from, 0)
  return { segments, duration: endOf(segments, 0), from, end: plus(from, distance), peakSpeed: peak, brakesInTime: true, halfTurn }
}

function pressProfile(move: Move, approach: number, from: number, { setup, stopsAtApproach = false }: Surroundings): Profile {
  const pressSpeed = move.pressSpeed ?? setup?.pressSpeed ?? 0
  const first = minus(approach, from)
  const onward = pressSpeed > 0 ? minus(move.target, approach) : 0
  const restsBetween = stopsAtApproach || onward === 0 || first * onward < 0
  const there = ramp(first, drive(move, move.speed, 0, restsBetween ? 0 : Math.min(pressSpeed, move.speed)), from, 0)
  const approachAt = endOf(there.segments, 0)
  const on = ramp(onward, drive(move, pressSpeed, there.leave, 0), approach, approachAt)
  const segments = [...there.segments, ...on.segments]
  return {
    segments, duration: endOf(segments, 0), from, end: plus(approach, onward), approachAt,
    peakSpeed: Math.max(there.peak, on.peak), brakesInTime: on.leave === 0, halfTurn: false,
  }
}

function drive({ acceleration, deceleration = acceleration }: Move, speed: number, enter: number, leave: number): Drive {
  return { speed, acceleration, deceleration, enter, leave }
}

function endOf(segments: readonly Segment[], otherwise: number): number {
  return segments[segments.length - 1]?.t1 ?? otherwise
}

/** Place and signed speed at a time in seconds; before the start and after the end at rest there. */
export function motionAt({ segments, from, end }: Profile, time: number): { readonly x: number, readonly v: number } {
  const segment = segments.find(one => time < one.t1)
  if (!segment) return { x: end, v: 0 }
  if (time < segment.t0) return { x: from, v: 0 }
  const elapsed = time - segment.t0
  return { x: segment.x0 + segment.v0 * elapsed + segment.a * elapsed ** 2 / 2, v: segment.v0 + segment.a * elapsed }
}

/** Seconds that the move takes with the setup's smoothing; `atLeast` where a jerk limit makes it longer than can be told. */
export function moveTime({ duration }: Profile, { smoothingTime = 0, jerk }: Pick<Setup, 'smoothingTime' | 'jerk'>): { readonly seconds: number, readonly atLeast: boolean } {
  return { seconds: duration === 0 ? 0 : duration + smoothingTime / 1000, atLeast: jerk !== undefined }
}
