import { usedRows } from '../motion/chains'
import { isAbove } from '../motion/exact'
import { answers } from './answers'
import { weigh, type Burden } from './burden'
import { hasChains } from './chains-to-judge'
import { lapMeans, lapSentence, lapsOf, type Lap, type LapMean } from './lap-rms'
import { atMove } from './pointers'
import type { CheckResult, JudgeInput, Rule } from './types'

const { stop, warn, unknown } = answers('thrust-rms')

/** Share of the rated thrust from which a warm cabinet is too much. */
const near = 85

export const thrustRms: Rule = {
  id: 'thrust-rms',
  title: 'Thrust over time',
  reason: 'A motor that does more than its rated thrust on average gets too hot, however short each push is.',
  formula: '√(ΣF²Δt/Σt) over ramps, constant speed, dwells (m·g·sin θ) and press holds (forceLimit): over a duty or an endless chain > ratedThrust stop, > 85 % warn; over any other chain, as if it began again where it ends, > 85 % warn',
  levels: ['stop', 'warn', 'unknown'],
  applies: ({ axis, content }) => axis.duty !== undefined || hasChains(usedRows(content.moves)),
  judge,
}

function judge(input: JudgeInput): CheckResult[] {
  const { laps, missing: missingRows } = lapsOf(input)
  const { burden, missing } = weigh(input)
  const rated = input.nameplate?.ratedThrust
  const lacking = new Set([...missing, ...rated === undefined ? ['nameplate.ratedThrust'] : [], ...missingRows])
  const results = burden && rated !== undefined ? overLaps(input, laps, burden, rated) : []
  return lacking.size === 0 ? results : [...results, unknown('Thrust over time', [...lacking], placesOf(laps))]
}

function overLaps(input: JudgeInput, laps: readonly Lap[], burden: Burden, rated: number): CheckResult[] {
  const meanOf = lapMeans(input, burden, rated)
  return laps.flatMap(lap => overLap(lap, meanOf(lap), burden, rated))
}

function overLap(lap: Lap, mean: LapMean, burden: Burden, rated: number): CheckResult[] {
  if (!isAbove(mean.thrust, near / 100 * rated)) return []
  const say = lap.certain && isAbove(mean.thrust, rated) ? stop : warn
  return [say(placesOf([lap]), lapSentence(lap, mean, burden, rated), { rms: mean.thrust, percent: mean.percent, time: mean.time, moves: lap.rows.map(({ move }) => move.move) })]
}

function placesOf(laps: readonly Lap[]): string[] {
  return [...new Set(laps.flatMap(({ rows }) => rows.map(row => atMove(row))))]
}
