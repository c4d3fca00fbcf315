import type { Row } from '../motion/chains'
import { minus } from '../motion/exact'
import { answers } from './answers'
import { bodyOf } from './burden'
import { about, axisUnits, quantity } from './format'
import { atMove, atSetup } from './pointers'
import { pressRows } from './presses'
import type { CheckResult, JudgeInput, Rule } from './types'

const { stop, warn, unknown } = answers('press-speed')

export const pressSpeed: Rule = {
  id: 'press-speed',
  title: 'Speed of a press',
  reason: 'What moves must be stopped by the part: too fast, and unit or part take a blow instead of a push.',
  formula: 'pressSpeed given, above 0 and <= maxPressSpeed; ½(m + mR)v² <= maxImpactEnergy, m = payload + moving mass, mR = rotorInertia·(2π/lead)²',
  levels: ['stop', 'warn', 'unknown'],
  applies: ({ content }) => pressRows(content.moves).length > 0,
  judge,
}

function judge(input: JudgeInput): CheckResult[] {
  const { content, nameplate } = input
  const { speed: unit } = axisUnits(content.axisKind)
  const body = bodyOf(input)
  const results: CheckResult[] = []
  const presses = pressRows(content.moves)
  for (const row of presses) {
    const { move } = row.move
    const speed = row.move.pressSpeed ?? content.setup.pressSpeed
    const at = [speedAt(row)]
    if (speed === undefined || speed === 0) {
      results.push(stop(at, `Press ${move} has ${speed === 0 ? `a press speed of ${quantity(0, unit)}` : 'no press speed'}: it cannot go on from its approach.`, { move }))
      continue
    }
    const most = nameplate?.maxPressSpeed
    if (most !== undefined && speed > most) {
      results.push(stop(at, `Press ${move} presses at ${quantity(speed, unit)}, ${quantity(minus(speed, most), unit)} above the ${quantity(most, unit)} that the unit may press with.`, { move, speed, limit: most }))
    }
    const limit = nameplate?.maxImpactEnergy
    const energy = body?.impact(speed)
    if (limit !== undefined && body && energy !== undefined && energy > limit) {
      results.push(warn(at, `Press ${move} meets the part with ${about(energy, limit)} J at ${quantity(speed, unit)}${body.without}: more than the ${quantity(limit, 'J')} that the unit stands.`, { move, speed, energy, limit }))
    }
  }
  return [...results, ...waiting(input, presses)]
}

function speedAt(row: Row): string {
  return row.move.pressSpeed === undefined ? atSetup('pressSpeed') : atMove(row, 'pressSpeed')
}

function waiting({ content, nameplate }: JudgeInput, presses: readonly Row[]): CheckResult[] {
  const load = content.axisKind === 'linear' ? 'payloadMass' : 'payloadInertia'
  const missing: string[] = []
  if (nameplate?.maxPressSpeed === undefined) missing.push('nameplate.maxPressSpeed')
  if (nameplate?.maxImpactEnergy !== undefined && content.setup[load] === undefined) missing.push(load)
  return missing.length === 0 ? [] : [unknown('Press speed', missing, [...new Set(presses.map(speedAt))])]
}
