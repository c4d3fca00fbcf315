import type { Row } from '../motion/chains'
import { forceBaseOf } from '../motion/force-base'
import { forceOnPart } from '../motion/press-force'
import { minus } from '../motion/exact'
import type { SetupFieldName } from '../settings/types'
import { answers } from './answers'
import { quantity } from './format'
import { atMove, atSetup } from './pointers'
import { pressRows, pushOf } from './presses'
import type { CheckResult, JudgeInput, Rule } from './types'

const { stop, unknown } = answers('press-force')

export const pressForce: Rule = {
  id: 'press-force',
  title: 'Force of a press',
  reason: 'A unit holds its press force only within its own range, and a press that asks more than the thrust limit never counts as arrived.',
  formula: 'pressForceMin <= forceLimit <= pressForceMax; forceLimit <= min(thrustLimit, thrustLimitPositive or thrustLimitNegative by the way it pushes)',
  levels: ['stop', 'unknown'],
  applies: ({ content }) => pressRows(content.moves).length > 0,
  judge,
}

function judge(input: JudgeInput): CheckResult[] {
  const presses = pressRows(input.content.moves)
  const { pressForceMin, pressForceMax } = input.nameplate ?? {}
  const results: CheckResult[] = []
  const missing = new Set<string>()
  if (pressForceMin === undefined) missing.add('nameplate.pressForceMin')
  if (pressForceMax === undefined) missing.add('nameplate.pressForceMax')
  for (const row of presses) {
    const { move, forceLimit } = row.move
    const at = atMove(row, 'forceLimit')
    if (forceLimit === undefined) {
      missing.add('forceLimit')
      continue
    }
    const asks = `Press ${move} pushes with ${quantity(forceLimit, '%')}`
    const values = (limit: number) => ({ move, forceLimit, limit, ...onPart(input, row, forceLimit) })
    if (pressForceMin !== undefined && forceLimit < pressForceMin) {
      results.push(stop([at], `${asks}, ${gap(pressForceMin, forceLimit)} below the ${quantity(pressForceMin, '%')} from which the unit holds a press force.`, values(pressForceMin)))
    }
    if (pressForceMax !== undefined && forceLimit > pressForceMax) {
      results.push(stop([at], `${asks}, ${gap(forceLimit, pressForceMax)} above the ${quantity(pressForceMax, '%')} that the unit may press with.`, values(pressForceMax)))
    }
    const thrust = thrustLimitOf(input, row)
    if (!thrust) missing.add('thrustLimit')
    else if (forceLimit > thrust.limit) {
      results.push(stop([at, atSetup(thrust.field)], `${asks}, ${gap(forceLimit, thrust.limit)} above the thrust limit of ${quantity(thrust.limit, '%')} that way.`, values(thrust.limit)))
    }
  }
  if (missing.size > 0) results.push(unknown('Press force', [...missing], presses.map(row => atMove(row, 'forceLimit'))))
  return results
}

function gap(more: number, less: number): string {
  return quantity(minus(more, less), 'points')
}

/** The lowest thrust limit that binds the way the press pushes. */
function thrustLimitOf({ content: { setup } }: JudgeInput, row: Row): { field: SetupFieldName, limit: number } | undefined {
  const push = pushOf(row.move)
  const oneSided = push === 1 ? 'thrustLimitPositive' : 'thrustLimitNegative'
  const general = setup.thrustLimit
  const sided = push === undefined ? undefined : setup[oneSided]
  if (sided !== undefined && (general === undefined || sided < general)) return { field: oneSided, limit: sided }
  return general === undefined ? undefined : { field: 'thrustLimit', limit: general }
}

/** The force on the part in N, where load, mounting and rated thrust are known; rotary axes press with a torque and have none. */
function onPart({ content: { axisKind, setup }, nameplate }: JudgeInput, row: Row, forceLimit: number): { onPart?: number } {
  const push = pushOf(row.move)
  const base = forceBaseOf(nameplate)
  const { payloadMass, mountingAngle, frictionForce = 0 } = setup
  if (axisKind === 'rotary' || !push || base === undefined || payloadMass === undefined || mountingAngle === undefined) return {}
  const load = { mass: payloadMass + (nameplate?.movingMass ?? 0), mountingAngle, friction: frictionForce }
  return { onPart: forceOnPart(forceLimit / 100 * base, push, load) }
}
