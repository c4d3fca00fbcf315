import { isAbove, minus } from '../motion/exact'
import { needOf } from '../motion/thrust'
import { answers } from './answers'
import { bodyOf, weigh } from './burden'
import { about, axisUnits, quantity } from './format'
import { atSetup } from './pointers'
import type { CheckResult, JudgeInput, Rule } from './types'

const { stop, warn, unknown } = answers('homing-plausible')

export const homingPlausible: Rule = {
  id: 'homing-plausible',
  title: 'Homing',
  reason: 'Homing too weak for the load never ends or lets it sink, and homing too strong or too fast drives it into its hard stop.',
  formula: 'homingCreepSpeed <= homingSpeed: else warn; hard-stop: homingForceLimit given; homingForceLimit/100 · base >= |m·g·sin θ| + Ff; ½(m + mR)v² at the hard stop <= maxImpactEnergy: else warn; current-position: warn',
  levels: ['stop', 'warn', 'unknown'],
  applies: ({ content: { setup } }) => [setup.homingMethod, setup.homingSpeed, setup.homingCreepSpeed, setup.homingForceLimit].some(value => value !== undefined),
  judge,
}

function judge(input: JudgeInput): CheckResult[] {
  const { homingMethod, homingSpeed, homingCreepSpeed } = input.content.setup
  const { speed: unit } = axisUnits(input.content.axisKind)
  const results: CheckResult[] = []
  if (homingCreepSpeed !== undefined && homingSpeed !== undefined && homingCreepSpeed > homingSpeed) {
    results.push(warn([atSetup('homingCreepSpeed'), atSetup('homingSpeed')],
      `Homing creeps with ${quantity(homingCreepSpeed, unit)}, ${quantity(minus(homingCreepSpeed, homingSpeed), unit)} faster than it looks for home with ${quantity(homingSpeed, unit)}.`,
      { creep: homingCreepSpeed, speed: homingSpeed }))
  }
  if (homingMethod === 'current-position') {
    results.push(warn([atSetup('homingMethod')], 'Homing takes the place where the axis stands for its zero: after every loss of power all places lie elsewhere.', { homingMethod }))
  }
  results.push(...strength(input))
  if (homingMethod === undefined) results.push(unknown('Homing', ['homingMethod'], [atSetup('homingMethod')]))
  return homingMethod === 'hard-stop' ? [...results, ...blow(input)] : results
}

/** An absolute encoder or the current place needs no search, and no thrust for it. */
function strength(input: JudgeInput): CheckResult[] {
  const { homingMethod, homingForceLimit: limit } = input.content.setup
  if (homingMethod === 'absolute-encoder' || homingMethod === 'current-position') return []
  const at = [atSetup('homingForceLimit')]
  if (limit === undefined) {
    return homingMethod === 'hard-stop' ? [stop(at, 'Homing runs into the hard stop without a force limit: it pushes with all that the unit has.', { homingMethod })] : []
  }
  const { burden, missing } = weigh(input)
  if (!burden) return [unknown('The force of homing', missing, at)]
  const { effortOf, base, unit, without } = burden
  const thrust = limit / 100 * base
  // Whichever way it looks for home, it comes back off what it found.
  const need = Math.max(needOf(effortOf(0, 1), 1), needOf(effortOf(0, -1), -1))
  if (!isAbove(need, thrust)) return []
  return [stop(at, `Homing pushes with ${quantity(limit, '%')}, ${about(thrust, need)} ${unit}, and weight and friction take ${about(need, thrust)} ${unit}${without}.`, { thrust, need, forceLimit: limit })]
}

function blow(input: JudgeInput): CheckResult[] {
  const limit = input.nameplate?.maxImpactEnergy
  const { homingSpeed } = input.content.setup
  if (limit === undefined) return []
  const at = [atSetup('homingSpeed')]
  const body = bodyOf(input)
  const missing = [
    ...homingSpeed === undefined ? ['homingSpeed'] : [],
    ...body ? [] : [input.content.axisKind === 'linear' ? 'payloadMass' : 'payloadInertia'],
  ]
  if (!body || homingSpeed === undefined) return [unknown('The blow of homing', missing, at)]
  const energy = body.impact(homingSpeed)
  if (!isAbove(energy, limit)) return []
  return [warn(at, `Homing meets the hard stop with ${about(energy, limit)} J at ${quantity(homingSpeed, axisUnits(input.content.axisKind).speed)}${body.without}: more than the ${quantity(limit, 'J')} that the unit stands.`,
    { speed: homingSpeed, energy, limit })]
}
