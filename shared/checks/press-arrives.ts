import type { Row } from '../motion/chains'
import { isAbove } from '../motion/exact'
import { stoppingDistance } from '../motion/stopping'
import { answers } from './answers'
import { weigh, type Burden } from './burden'
import { drivenRows } from './driven'
import { about, axisUnits, quantity } from './format'
import { atMove, atSetup } from './pointers'
import { pressRows, pushOf } from './presses'
import type { CheckResult, JudgeInput, Rule } from './types'

const { stop, warn, unknown } = answers('press-arrives')

export const pressArrives: Rule = {
  id: 'press-arrives',
  title: 'Arrival of a press',
  reason: 'A press that is weaker than the weight and friction on its way never gets to the part, and one that cannot hold the load back lets it run.',
  formula: 'forceLimit/100 · base > push · m·g·sin θ + Ff; where forceLimitActsBothWays: forceLimit/100 · base >= −push · m·g·sin θ − Ff; w²/2b <= |target − approach|: else warn',
  levels: ['stop', 'warn', 'unknown'],
  applies: ({ content }) => pressRows(content.moves).length > 0,
  judge,
}

function judge(input: JudgeInput): CheckResult[] {
  const presses = pressRows(input.content.moves)
  const { burden, missing } = weigh(input)
  const lacking = new Set<string>(missing)
  const results = burden ? presses.flatMap(row => forced(input, row, burden, lacking)) : []
  return [
    ...results,
    ...tooFast(input),
    ...lacking.size === 0 ? [] : [unknown('Whether a press arrives', [...lacking], presses.map(row => atMove(row, 'forceLimit')))],
  ]
}

function forced({ nameplate }: JudgeInput, row: Row, { effortOf, base, unit, without }: Burden, lacking: Set<string>): CheckResult[] {
  const { move, forceLimit } = row.move
  const push = pushOf(row.move)
  if (push === undefined) return []
  if (forceLimit === undefined) {
    lacking.add('forceLimit')
    return []
  }
  const thrust = forceLimit / 100 * base
  const { least, most } = effortOf(0, push)
  const [need, pull] = push === 1 ? [most, -least] : [-least, most]
  const at = [atMove(row, 'forceLimit'), atSetup('mountingAngle')]
  const pushes = `Press ${move} pushes with ${quantity(forceLimit, '%')}, ${about(thrust)} ${unit}`
  if (!isAbove(thrust, need)) {
    return [stop(at, `${pushes}, and needs more than ${about(need)} ${unit} to get to the part${without}: it never arrives.`, { move, forceLimit, thrust, need })]
  }
  if (nameplate?.forceLimitActsBothWays && isAbove(pull, thrust)) {
    return [stop(at, `${pushes} both ways, and the load pulls with ${about(pull, thrust)} ${unit}${without}: it runs away.`, { move, forceLimit, thrust, pull })]
  }
  return []
}

/** Presses that come too fast to their target to rest there, were no part met. */
function tooFast(input: JudgeInput): CheckResult[] {
  const { length, speed } = axisUnits(input.content.axisKind)
  return drivenRows(input).flatMap(({ row, ways }): CheckResult[] => {
    const { move, kind, approach, target, acceleration, deceleration = acceleration } = row.move
    if (kind !== 'press' || approach === undefined || ways.every(({ profile }) => profile.brakesInTime)) return []
    const w = row.move.pressSpeed ?? input.content.setup.pressSpeed ?? 0
    const way = stoppingDistance(w, deceleration)
    const room = Math.abs(target - approach)
    return [warn([atMove(row, 'approach'), atMove(row, 'target')],
      `Press ${move} needs ${about(way, room)} ${length} to stop from ${quantity(w, speed)}, and has ${about(room, way)} ${length} from its approach to its target: without a part it runs on beyond.`,
      { move, speed: w, way, room })]
  })
}
