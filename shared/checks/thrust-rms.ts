import { usedRows, type Row } from '../motion/chains'
import { isAbove } from '../motion/exact'
import { loadsOver, rms, type Load } from '../motion/rms'
import { sizeOf } from '../motion/thrust'
import { lapStart, timeline } from '../motion/timeline'
import type { Move } from '../settings/types'
import { answers } from './answers'
import { weigh, type Burden } from './burden'
import { chainsOf } from './chains-to-judge'
import { surroundings } from './driven'
import { about, movesInWords, quantity, sentence } from './format'
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
  applies: ({ axis, content }) => axis.duty !== undefined || chainsOf(usedRows(content.moves)).length > 0,
  judge,
}

/** Moves that come again and again. */
interface Lap {
  readonly rows: readonly Row[]
  readonly words: string
  /** It is so for certain; another is only looked at as if. */
  readonly certain: boolean
  /** Seconds of one lap where they are declared. */
  readonly cycle?: number
}

function judge(input: JudgeInput): CheckResult[] {
  const rows = usedRows(input.content.moves)
  const duty = dutyOf(input, rows)
  const laps = [...duty.laps, ...chainsOf(rows).map(({ rows, endless }): Lap => {
    const moves = sentence(movesInWords(rows.map(({ move }) => move.move)))
    return { rows, certain: endless, words: endless ? `${moves} without end` : `${moves}, if begun again and again,` }
  })]
  const { burden, missing } = weigh(input)
  const rated = input.nameplate?.ratedThrust
  const lacking = new Set([...missing, ...rated === undefined ? ['nameplate.ratedThrust'] : [], ...duty.missing])
  const results = burden && rated !== undefined ? laps.flatMap(lap => overLap(input, lap, burden, rated)) : []
  return lacking.size === 0 ? results : [...results, unknown('Thrust over time', [...lacking], placesOf(laps))]
}

/** The declared duty as a lap, or the rows that it names and the table lacks. */
function dutyOf({ axis: { duty } }: JudgeInput, rows: readonly Row[]): { laps: Lap[], missing: string[] } {
  if (!duty) return { laps: [], missing: [] }
  const byNumber = new Map(rows.map(row => [row.move.move, row]))
  const missing = [...new Set(duty.moves.filter(number => !byNumber.has(number)))].map(number => `move ${number}`)
  if (missing.length > 0) return { laps: [], missing }
  return { laps: [{ rows: duty.moves.flatMap(number => byNumber.get(number) ?? []), certain: true, words: 'The duty', cycle: duty.cycleTime / 1000 }], missing }
}

function overLap(input: JudgeInput, lap: Lap, burden: Burden, rated: number): CheckResult[] {
  const { loads, time } = loadsOf(input, lap, burden)
  const thrust = rms(loads)
  const percent = 100 * thrust / rated
  if (!isAbove(thrust, near / 100 * rated)) return []
  const say = lap.certain && isAbove(thrust, rated) ? stop : warn
  return [say([...new Set(lap.rows.map(row => atMove(row)))],
    `${lap.words} ${lap.rows.length === 1 || lap.cycle !== undefined ? 'needs' : 'need'} ${about(thrust)} ${burden.unit} in the mean over ${about(time)} s, ${about(percent, isAbove(percent, 100) ? 100 : undefined)} % of the rated ${quantity(rated, burden.unit)}${burden.without}.`,
    { rms: thrust, percent, time, moves: lap.rows.map(({ move }) => move.move) })]
}

function loadsOf(input: JudgeInput, { rows, cycle = 0 }: Lap, { effortOf, base }: Burden): { loads: Load[], time: number } {
  const moves = rows.map(({ move }, index) => waitingFor(move, rows[(index + 1) % rows.length]))
  const pressForce = (number: number) => (moves.find(({ move }) => move === number)?.forceLimit ?? 0) / 100 * base
  const line = timeline(moves, lapStart(moves, input.content.setup.modulo), surroundings(input))
  const loads = loadsOver(line, effortOf, { pressForce })
  const rest = cycle - line.seconds
  if (rest <= 0) return { loads, time: line.seconds }
  const last = moves[moves.length - 1]
  const holding = last?.kind === 'press' ? pressForce(last.move) : sizeOf(effortOf(0, 0))
  return { loads: [...loads, { force: holding, time: rest }], time: cycle }
}

/** A dwell is waited only before the row that `next` names. */
function waitingFor(move: Move, following: Row | undefined): Move {
  return move.next === following?.move.move ? move : { ...move, dwell: undefined }
}

function placesOf(laps: readonly Lap[]): string[] {
  return [...new Set(laps.flatMap(({ rows }) => rows.map(row => atMove(row))))]
}
