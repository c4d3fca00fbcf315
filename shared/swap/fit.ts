import type { CheckResult } from '../checks/types'
import { about, axisUnits, quantity } from '../checks/format'
import { minus } from '../motion/exact'
import { peakPercent } from '../motion/limit'
import { forceBaseOf } from '../motion/force-base'
import { isUnused } from '../settings/move-fields'
import type { AxisFlag, AxisKind, Content } from '../settings/types'
import type { CarryCase } from './carried'
import { drivenBack } from './falls'
import { longestTravel, reachOf } from './reach'
import { forceFields, holdsForces } from './rescale'
import type { Fit, KitContent, SwapSide, UnfitReason } from './types'

export interface FitInput extends CarryCase {
  readonly axis: { readonly axisKind: AxisKind, readonly flags: readonly AxisFlag[] }
  /** As the kit for the new unit has it. */
  readonly kit: KitContent
  /** As the register has the new unit: `spare`, or why it should not go in. */
  readonly state: 'spare' | 'failed' | 'repair' | 'scrapped'
  /** Of the kit's content on the new unit, accepted stops left out. */
  readonly checks: readonly CheckResult[]
}

export interface FitAnswer { readonly fit: Fit, readonly reasons: readonly UnfitReason[] }

/** By both nameplates, the content and the checks: unfit with every reason, hard ones first; adjust where a value changes; else same. */
export function fitOf(input: FitInput): FitAnswer {
  const reasons = [...hardReasons(input), ...otherReasons(input)]
  if (reasons.length > 0) return { fit: 'unfit', reasons }
  return { fit: input.kit.adjustments.length > 0 ? 'adjust' : 'same', reasons }
}

/** A unit of the model that the values come from can do what that one did: what is wrong with the values is told by the checks. */
const isLike = ({ out, into, ownValues }: CarryCase) => ownValues || out.model === into.model

function hardReasons(input: FitInput): UnfitReason[] {
  const { into, axis } = input
  if (into.nameplate && into.nameplate.axisKind !== axis.axisKind) {
    return [hard('axis-kind', `${into.model} is a ${into.nameplate.axisKind} unit, and this axis is ${axis.axisKind}.`, [])]
  }
  if (isLike(input) || !into.nameplate) return []
  return [...strokeShort(input.kit.content, into), ...noBrake(input), ...forceOutside(input.kit.content, into)]
}

const hard = (code: UnfitReason['code'], message: string, at: readonly string[]): UnfitReason => ({ code, hard: true, message, at })
const soft = (code: UnfitReason['code'], message: string, at: readonly string[] = []): UnfitReason => ({ code, hard: false, message, at })

function strokeShort(content: Content, { model, nameplate }: SwapSide): UnfitReason[] {
  const stroke = nameplate?.stroke ?? Infinity
  const { length } = axisUnits(content.axisKind)
  const reach = reachOf(content)
  const travel = content.setup.modulo === undefined ? longestTravel(content) : undefined
  if (reach && minus(reach.high, reach.low) > stroke) {
    return [hard('stroke-short', `The moves go from ${quantity(reach.low, length)} to ${quantity(reach.high, length)}, ${quantity(minus(reach.high, reach.low), length)} in all; ${model} has a stroke of ${quantity(stroke, length)}.`, ['/moves'])]
  }
  if (!travel || travel.length <= stroke) return []
  const went = travel.moves.length > 1 ? `Moves ${travel.moves.join('→')} go ${quantity(travel.length, length)} in one run` : `One move goes ${quantity(travel.length, length)} at once`
  return [hard('stroke-short', `${went}; ${model} has a stroke of ${quantity(stroke, length)}.`, ['/moves'])]
}

/** Hard where the old unit had a brake, or may have had one; a job that never had one is told by the checks. */
function noBrake({ axis: { flags }, kit: { content }, out, into }: FitInput): UnfitReason[] {
  const hadNone = out.nameplate?.brakeFitted === false && content.setup.brakeFitted !== true
  if (into.nameplate?.brakeFitted !== false || hadNone || !drivenBack(flags, content, into.nameplate)) return []
  return [hard('no-brake', `The load of this axis falls when nothing holds it, and ${into.model} has no brake.`, ['/setup/brakeFitted'])]
}

function forceOutside({ setup, moves, axisKind }: Content, { model, nameplate }: SwapSide): UnfitReason[] {
  const base = forceBaseOf(nameplate)
  const unit = axisKind === 'linear' ? 'N' : 'N·m'
  const newtons = (percent: number) => base === undefined ? quantity(percent, '%') : `${quantity(percent, '%')} (${about(percent / 100 * base)} ${unit})`
  const peak = peakPercent(nameplate)
  const found: UnfitReason[] = []
  for (const field of forceFields) {
    const value = setup[field]
    if (value !== undefined && field !== 'overloadLevel' && value > peak) found.push(hard('force-outside', `The ${forceWords[field]} would be ${newtons(value)}, and ${model} can do ${newtons(peak)} at most.`, [`/setup/${field}`]))
  }
  const { pressForceMin = 0, pressForceMax = peak } = nameplate ?? {}
  moves.forEach((move, index) => {
    if (isUnused(move) || move.forceLimit === undefined) return
    const [least, most] = move.kind === 'press' ? [pressForceMin, pressForceMax] : [0, peak]
    if (move.forceLimit > 0 && move.forceLimit >= least && move.forceLimit <= most) return
    found.push(hard('force-outside', `Move ${move.move} would push with ${newtons(move.forceLimit)}, and ${model} does ${least > 0 ? `from ${newtons(least)} to` : 'up to'} ${newtons(most)}.`, [`/moves/${index}/forceLimit`]))
  })
  return found
}

const forceWords = {
  homingForceLimit: 'homing force limit', thrustLimit: 'thrust limit', thrustLimitPositive: 'thrust limit towards plus',
  thrustLimitNegative: 'thrust limit towards minus', overloadLevel: 'overload level',
} as const

function otherReasons(input: FitInput): UnfitReason[] {
  const { into, out, kit: { content }, checks, replaced, ownValues } = input
  const missing = !isLike(input) && forceBaseOf(into.nameplate) === undefined && holdsForces(content)
    ? [soft('nameplate-missing', `What 100 % of force means on ${into.model} is not on a nameplate: its percentages may mean other newtons.`)]
    : !isLike(input) && forceBaseOf(out.nameplate) === undefined && holdsForces(content)
        ? [soft('nameplate-missing', `What 100 % of force meant on ${out.model} is not on a nameplate: the percentages cannot be brought over.`)]
        : !isLike(input) && !into.nameplate ? [soft('nameplate-missing', `No nameplate of ${into.model} is registered: what it can do is not known.`)] : []
  const actuator = replaced === 'actuator' && !ownValues && out.actuatorModel !== into.actuatorModel
    ? [soft('actuator-model', `The actuator is ${into.actuatorModel ?? 'of no known model'} and was ${out.actuatorModel ?? 'of no known model'}: its stroke, force and brake are to be compared by its plate.`)]
    : []
  const most = into.nameplate?.maxMoves
  const moves = most !== undefined && content.moves.length > most
    ? [soft('too-many-moves', `The table has ${content.moves.length} moves, and ${into.model} holds ${most}.`, ['/moves'])]
    : []
  const state = input.state === 'spare' ? [] : [soft('unit-state', `The register has this unit as ${input.state === 'repair' ? 'in repair' : input.state}.`)]
  return [...state, ...missing, ...actuator, ...moves, ...checks.filter(({ level }) => level === 'stop').map(({ message, at }) => soft('stop-check', message, at))]
}
