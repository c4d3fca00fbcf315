import { forceBaseOf } from '../motion/force-base'
import { linearImpact, rotaryImpact } from '../motion/impact'
import { reflectedMass } from '../motion/reflected-mass'
import { inertiaAtOutput, rotaryEffort } from '../motion/rotary-torque'
import { linearEffort, type EffortOf } from '../motion/thrust'
import { inWords } from './format'
import type { JudgeInput } from './types'

/** What an axis has to move and to hold, with the force that 100 % means. */
export interface Burden {
  readonly effortOf: EffortOf
  /** N or N·m. */
  readonly base: number
  readonly unit: 'N' | 'N·m'
  /** ", without friction and the rotor" for what counts as nothing because nobody gave it; '' where all is known. */
  readonly without: string
}

/** A burden, or the names of the values without which no thrust can be told. */
export interface Weighed { readonly burden?: Burden, readonly missing: readonly string[] }

/** Weighs an axis; the shaft of a rotary one counts as level where its tilt is not given. */
export function weigh(input: JudgeInput): Weighed {
  const { content: { axisKind, setup }, nameplate } = input
  const base = forceBaseOf(nameplate)
  const missing: string[] = []
  const turning = axisKind === 'rotary'
  if (turning && setup.payloadInertia === undefined) missing.push('payloadInertia')
  if (!turning && setup.payloadMass === undefined) missing.push('payloadMass')
  if (!turning && setup.mountingAngle === undefined) missing.push('mountingAngle')
  if (base === undefined) missing.push(nameplate?.forceBase === 'peak-thrust' ? 'nameplate.peakThrust' : 'nameplate.ratedThrust')
  if (base === undefined || missing.length > 0) return { missing }
  const { effortOf, without } = turning ? rotaryBurden(input) : linearBurden(input)
  return { missing, burden: { effortOf, base, unit: turning ? 'N·m' : 'N', without: withoutWords(without) } }
}

interface Counted { readonly effortOf: EffortOf, readonly without: readonly string[] }

function linearBurden(input: JudgeInput): Counted {
  const { mountingAngle = 0, frictionForce } = input.content.setup
  const { mass, turningMass, without } = massOf(input, input.content.setup.payloadMass ?? 0)
  return {
    effortOf: linearEffort({ mass, turningMass, mountingAngle, friction: frictionForce ?? 0 }),
    without: [...without, ...frictionForce === undefined ? ['friction'] : []],
  }
}

function rotaryBurden({ content: { setup }, nameplate }: JudgeInput): Counted {
  const { payloadInertia = 0, mountingAngle = 90, unbalanceTorque, frictionTorque } = setup
  const { rotorInertia, gearRatio = 1 } = nameplate ?? {}
  // An unbalance of a shaft that stands upright pulls no way.
  const needsUnbalance = unbalanceTorque === undefined && mountingAngle !== 0
  return {
    effortOf: rotaryEffort({ inertia: payloadInertia, rotorInertia: rotorInertia ?? 0, gearRatio, unbalance: unbalanceTorque ?? 0, tilt: mountingAngle, friction: frictionTorque ?? 0 }),
    without: [...rotorInertia === undefined ? ['the rotor'] : [], ...needsUnbalance ? ['unbalance'] : [], ...frictionTorque === undefined ? ['friction'] : []],
  }
}

function massOf({ nameplate }: JudgeInput, payload: number): { mass: number, turningMass: number, without: string[] } {
  const { movingMass, rotorInertia, lead } = nameplate ?? {}
  const turning = rotorInertia === undefined || lead === undefined ? undefined : reflectedMass(rotorInertia, lead)
  return {
    mass: payload + (movingMass ?? 0),
    turningMass: turning ?? 0,
    without: [...movingMass === undefined ? ['the moving mass of the unit'] : [], ...turning === undefined ? ['the rotor'] : []],
  }
}

function withoutWords(things: readonly string[]): string {
  return things.length === 0 ? '' : `, without ${inWords(things)}`
}

/** What whatever stops the axis has to take up. */
export interface Body {
  /** J at a speed in mm/s or deg/s. */
  readonly impact: (speed: number) => number
  readonly without: string
}

/** The moving body of an axis; undefined where its payload is not known. */
export function bodyOf(input: JudgeInput): Body | undefined {
  const { payloadMass, payloadInertia } = input.content.setup
  if (input.content.axisKind === 'rotary') {
    if (payloadInertia === undefined) return undefined
    const { rotorInertia, gearRatio = 1 } = input.nameplate ?? {}
    const inertia = inertiaAtOutput({ inertia: payloadInertia, rotorInertia: rotorInertia ?? 0, gearRatio })
    return { impact: speed => rotaryImpact(inertia, speed), without: withoutWords(rotorInertia === undefined ? ['the rotor'] : []) }
  }
  if (payloadMass === undefined) return undefined
  const { mass, turningMass, without } = massOf(input, payloadMass)
  return { impact: speed => linearImpact(mass + turningMass, speed), without: withoutWords(without) }
}
