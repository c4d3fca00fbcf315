import { directionOf, sizeOf, type EffortOf } from './thrust'
import type { Timeline } from './timeline'

/** One thrust (N) or torque (N·m) and how many seconds it lasts. */
export interface Load { readonly force: number, readonly time: number }

/** √(ΣF²Δt/Σt): the constant thrust that heats a motor as much, rests counted in the time. 0 where there is no time. */
export function rms(loads: readonly Load[]): number {
  let heat = 0, seconds = 0
  for (const { force, time } of loads) {
    heat += force ** 2 * time
    seconds += time
  }
  return seconds > 0 ? Math.sqrt(heat / seconds) : 0
}

export interface Holding {
  /** N or N·m that a press holds on with, by the number of its row. */
  readonly pressForce: (move: number) => number
  /** Seconds of rest after which a brake is set and the motor rests too; absent = it holds all the time. */
  readonly brakeAfter?: number
}

/**
 * What the motor does over a timeline: ramps and constant speed by the effort of their segment, a rest with what holds the
 * load until a brake is set, a press hold with the force of the press.
 */
export function loadsOver({ stretches }: Timeline, effortOf: EffortOf, { pressForce, brakeAfter = Infinity }: Holding): Load[] {
  const loads: Load[] = []
  for (const stretch of stretches) {
    const time = stretch.t1 - stretch.t0
    const force = stretch.part === 'hold' ? pressForce(stretch.move) : sizeOf(effortOf(stretch.a, directionOf(stretch)))
    const braked = stretch.part === 'wait' ? Math.max(0, time - brakeAfter) : 0
    loads.push({ force, time: time - braked })
    if (braked > 0) loads.push({ force: 0, time: braked })
  }
  return loads
}
