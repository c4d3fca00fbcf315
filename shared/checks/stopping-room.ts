import { usedRows, type Row } from '../motion/chains'
import { endsByHardStop } from '../motion/hard-stops'
import { furthestStop, thrustDeceleration } from '../motion/stopping'
import type { Way } from '../motion/ways'
import { answers } from './answers'
import { bindingLimit } from './binding-limit'
import { weigh, type Burden } from './burden'
import { drivenRows } from './driven'
import { about, axisUnits, quantity } from './format'
import { softLimits, turnsFreely } from './limits'
import { atMove, atSetup } from './pointers'
import type { CheckResult, JudgeInput, Rule } from './types'

const { warn, unknown } = answers('stopping-room')

/** The last digit of a place, mm or deg: what lies less beyond came from roots and products. */
const finest = 1e-6

export const stoppingRoom: Rule = {
  id: 'stopping-room',
  title: 'Room for a quick stop',
  reason: 'A quick stop that takes a longer way than there is ends at the hard stop, with what speed is left.',
  formula: 'furthest x ± v²/(2b) of the move within the hard stops; b = min(quickStopDeceleration, (limit + m·g·sin θ against the motion + Ff)/(m + mR)); hard stops from the homing, else at least a hard margin beyond the soft limits',
  levels: ['warn', 'unknown'],
  applies: ({ content }) => content.setup.modulo === undefined && !turnsFreely(content) && usedRows(content.moves).length > 0,
  judge,
}

function judge(input: JudgeInput): CheckResult[] {
  const at = atSetup('quickStopDeceleration')
  const commanded = input.content.setup.quickStopDeceleration
  if (commanded === undefined) return [unknown('The room for a quick stop', ['quickStopDeceleration'], [at])]
  const { burden, missing } = weigh(input)
  const room = roomOf(input)
  const braking = ([1, -1] as const).map(direction => ({ direction, deceleration: brakes(input, burden, commanded, direction) }))
  const lacking = new Set(missing)
  const results = drivenRows(input).flatMap(({ row, ways }) => {
    const worst = furthestBeyond(ways, braking, room)
    if (!worst) return []
    if (room.certain) return [told(input, row, worst, burden)]
    lacking.add('place of the hard stops')
    return []
  })
  return lacking.size === 0 ? results : [...results, unknown('The room for a quick stop', [...lacking], [at])]
}

/** The deceleration of a quick stop: what is asked, or what the thrust against the motion can do. */
function brakes(input: JudgeInput, burden: Burden | undefined, commanded: number, direction: 1 | -1): number {
  if (!burden) return commanded
  const against = bindingLimit(input, direction === 1 ? -1 : 1).percent / 100 * burden.base
  return Math.min(commanded, thrustDeceleration(burden.effortOf, against, direction))
}

interface Room {
  readonly low: number
  readonly high: number
  /** The hard stops stand there; else they stand there or further out. */
  readonly certain: boolean
}

function roomOf({ content, nameplate }: JudgeInput): Room {
  const ends = content.setup.homingMethod === 'hard-stop' ? endsByHardStop(content.setup, nameplate) : undefined
  if (ends) return { low: ends.hardLow, high: ends.hardHigh, certain: true }
  const { min, max } = softLimits(content)
  const margin = nameplate?.hardMargin ?? 0
  return { low: (min ?? Infinity) - margin, high: (max ?? -Infinity) + margin, certain: false }
}

interface Beyond { readonly stop: number, readonly hardStop: number, readonly beyond: number, readonly speed: number }

interface Braking { readonly direction: 1 | -1, readonly deceleration: number }

/** Of all quick stops on the ways of a row the one that ends furthest beyond a hard stop; undefined where all end before. */
function furthestBeyond(ways: readonly Way[], braking: readonly Braking[], { low, high }: Room): Beyond | undefined {
  let worst: Beyond | undefined
  for (const { profile, placed } of ways) {
    if (!placed) continue
    for (const { direction, deceleration } of braking) {
      const stop = furthestStop(profile, deceleration, direction)
      const hardStop = direction === 1 ? high : low
      const beyond = direction * (stop - hardStop)
      if (beyond > (worst?.beyond ?? finest)) worst = { stop, hardStop, beyond, speed: profile.peakSpeed }
    }
  }
  return worst
}

function told({ content: { axisKind } }: JudgeInput, row: Row, { stop, hardStop, beyond, speed }: Beyond, burden: Burden | undefined): CheckResult {
  const units = axisUnits(axisKind)
  const { move } = row.move
  const at = [atMove(row, 'speed'), atSetup('quickStopDeceleration')]
  const without = burden?.without ?? ''
  const words = `A quick stop in move ${move} from ${about(speed)} ${units.speed}`
  if (stop === Infinity || stop === -Infinity) {
    return warn(at, `${words} never ends: the thrust cannot brake the load before the hard stop at ${quantity(hardStop, units.length)}${without}.`, { move, hardStop, speed })
  }
  return warn(at, `${words} ends at ${about(stop, hardStop)} ${units.length}, ${about(beyond)} ${units.length} beyond the hard stop at ${quantity(hardStop, units.length)}${without}.`,
    { move, stop, hardStop, beyond, speed })
}
