import { isAbove } from '../motion/exact'
import { ratedPercent } from '../motion/limit'
import type { Move, Setup } from '../settings/types'
import { answers } from './answers'
import { about, quantity } from './format'
import { atMove, atSetup } from './pointers'
import { pressRows } from './presses'
import type { CheckResult, JudgeInput, Rule } from './types'

const { stop, warn, unknown } = answers('press-hold')

export const pressHold: Rule = {
  id: 'press-hold',
  title: 'Holding of a press',
  reason: 'A press that no move follows holds on until somebody calls one: beyond the rated thrust the motor burns or the drive trips.',
  formula: 'without next: forceLimit <= 100 · ratedThrust / base, else warn; forceLimit >= overloadLevel and (without next, or dwell > overloadTime): stop',
  levels: ['stop', 'warn', 'unknown'],
  applies: ({ content }) => pressRows(content.moves).some(({ move }) => move.forceLimit !== undefined),
  judge,
}

function judge({ content: { moves, setup }, nameplate }: JudgeInput): CheckResult[] {
  const rated = ratedPercent(nameplate)
  return pressRows(moves).flatMap((row): CheckResult[] => {
    const { move, forceLimit } = row.move
    if (forceLimit === undefined) return []
    const at = [atMove(row, 'forceLimit')]
    const holds = `Press ${move} holds with ${quantity(forceLimit, '%')} ${holdInWords(row.move)}`
    const results: CheckResult[] = []
    if (endless(row.move) && isAbove(forceLimit, rated)) {
      results.push(warn(at, `${holds}, more than the ${about(rated, forceLimit)} % that the unit stands: let a move follow.`, { move, forceLimit, rated }))
    }
    const trips = tripping(row.move, setup)
    if (trips.missing) results.push(unknown(`Whether press ${move} trips the overload`, [trips.missing], at, { move, forceLimit }))
    if (trips.does) {
      const { overloadLevel = 0, overloadTime } = setup
      const time = overloadTime === undefined ? '' : ` after ${quantity(overloadTime, 'ms')}`
      results.push(stop([...at, atSetup('overloadLevel')], `${holds}, and from ${quantity(overloadLevel, '%')} on the overload trips${time}.`,
        { move, forceLimit, overloadLevel, ...overloadTime === undefined ? {} : { overloadTime } }))
    }
    return results
  })
}

function endless({ next }: Move): boolean {
  return next === undefined
}

function holdInWords({ next, dwell = 0 }: Move): string {
  return next === undefined ? 'without end' : `for ${quantity(dwell, 'ms')}`
}

/** A drive without both values is taken to have no overload watch; with one of them the other is asked for where it decides. */
function tripping(move: Move, { overloadLevel, overloadTime }: Setup): { does: boolean, missing?: 'overloadLevel' | 'overloadTime' } {
  const { forceLimit = 0, dwell = 0 } = move
  const outlasts = endless(move) || (overloadTime !== undefined && dwell > overloadTime)
  if (overloadLevel === undefined) return overloadTime !== undefined && outlasts ? { does: false, missing: 'overloadLevel' } : { does: false }
  if (forceLimit < overloadLevel) return { does: false }
  return !outlasts && overloadTime === undefined && dwell > 0 ? { does: false, missing: 'overloadTime' } : { does: outlasts }
}
