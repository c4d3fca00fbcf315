import type { Direction, Effort, EffortOf } from './thrust'

export interface RotaryLoad {
  /** kg·cm² at the output. */
  readonly inertia: number
  /** kg·cm² of the rotor, before the gear. */
  readonly rotorInertia: number
  /** Motor turns a turn of the output. */
  readonly gearRatio: number
  /** N·m of the off-centre load with the shaft level. */
  readonly unbalance: number
  /** Deg of the shaft from vertical: 0 no unbalance counts, ±90 all of it. */
  readonly tilt: number
  /** N·m. */
  readonly friction: number
}

/** Inertia at the output in kg·cm²: the rotor counts with the square of the gear, as energy is the same on both sides of it. */
export function inertiaAtOutput({ inertia, rotorInertia, gearRatio }: Pick<RotaryLoad, 'inertia' | 'rotorInertia' | 'gearRatio'>): number {
  return inertia + rotorInertia * gearRatio ** 2
}

/**
 * T = J·α·π/180 + unbalance·sin(tilt)·cos(angle) + sign(ω)·Tf in N·m, from deg/s²; an off-centre load passes its highest
 * point either way, so that cos(angle) counts from -1 to 1.
 */
export function torque(load: RotaryLoad, acceleration: number, direction: Direction): Effort {
  const steady = inertiaAtOutput(load) * 1e-4 * acceleration * Math.PI / 180 + direction * load.friction
  const swing = Math.abs(load.unbalance * Math.sin(load.tilt * Math.PI / 180))
  return { least: steady - swing, most: steady + swing }
}

/** The torque of a rotary axis as an effort, for rules that judge both kinds of axis. */
export function rotaryEffort(load: RotaryLoad): EffortOf {
  return (acceleration, direction) => torque(load, acceleration, direction)
}
