import { rowsByNumber, usedRows, type Row } from '../motion/chains'
import { isAbove } from '../motion/exact'
import { loadsOver, rms, type Load } from '../motion/rms'
import { sizeOf } from '../motion/thrust'
import { lapStart, timeline } from '../motion/timeline'
import type { Move } from '../settings/types'
import type { Burden } from './burden'
import { chainsOf } from './chains-to-judge'
import { surroundings } from './driven'
import { about, movesInWords, quantity, sentence } from './format'
import type { JudgeInput } from './types'

/** Moves that come again and again. */
export interface Lap {
  readonly rows: readonly Row[]
  /** Made only where there is something to say: a table may have as many chains as rows. */
  readonly words: () => string
  /** It is so for certain; another is only looked at as if. */
  readonly certain: boolean
  /** Seconds of one lap where they are declared. */
  readonly cycle?: number
}

/** What a lap asks of the motor in the mean. */
export interface LapMean {
  /** N or N·m. */
  readonly thrust: number
  /** Of the rated thrust. */
  readonly percent: number
  /** Seconds of one lap. */
  readonly time: number
}

/** The declared duty first, then the chains; `missing` names rows of the duty that the table lacks, which leave the duty out. */
export function lapsOf(input: JudgeInput): { readonly laps: Lap[], readonly missing: string[] } {
  const rows = usedRows(input.content.moves)
  const duty = dutyOf(input, rows)
  const chains = chainsOf(rows).map(({ rows, endless }): Lap => {
    const moves = () => sentence(movesInWords(rows.map(({ move }) => move.move)))
    return { rows, certain: endless, words: () => endless ? `${moves()} without end` : `${moves()}, if begun again and again,` }
  })
  return { laps: [...duty.laps, ...chains], missing: duty.missing }
}

function dutyOf({ axis: { duty } }: JudgeInput, rows: readonly Row[]): { laps: Lap[], missing: string[] } {
  if (!duty) return { laps: [], missing: [] }
  const byNumber = rowsByNumber(rows)
  const missing = [...new Set(duty.moves.filter(number => !byNumber.has(number)))].map(number => `move ${number}`)
  if (missing.length > 0) return { laps: [], missing }
  return { laps: [{ rows: duty.moves.flatMap(number => byNumber.get(number) ?? []), certain: true, words: () => 'The duty', cycle: duty.cycleTime / 1000 }], missing }
}

/**
 * √(ΣF²Δt/Σt) over laps of one axis, against the rated thrust in N or N·m. Many chains may lead into the same rows: what those
 * need from one place is worked out once for all laps that are asked for.
 */
export function lapMeans(input: JudgeInput, burden: Burden, rated: number): (lap: Lap) => LapMean {
  const runOf = runsOf(input, burden)
  const { modulo } = input.content.setup
  return (lap) => {
    const { loads, time } = loadsOf(lap, modulo, burden, runOf)
    const thrust = rms(loads)
    return { thrust, percent: 100 * thrust / rated, time }
  }
}

/** "The duty needs 18.2 N in the mean over 2.4 s, 4.1 % of the rated 440 N." */
export function lapSentence(lap: Lap, { thrust, percent, time }: LapMean, { unit, without }: Burden, rated: number): string {
  const one = lap.rows.length === 1 || lap.cycle !== undefined
  return `${lap.words()} ${one ? 'needs' : 'need'} ${about(thrust)} ${unit} in the mean over ${about(time)} s, ${about(percent, isAbove(percent, 100) ? 100 : undefined)} % of the rated ${quantity(rated, unit)}${without}.`
}

/** A move from where it starts, with what waits behind it: the constant load that heats as much over the same time, and where it ends. */
interface Run { readonly load: Load, readonly end: number }

type RunOf = (move: Move, from: number) => Run

function runsOf(input: JudgeInput, { effortOf, base }: Burden): RunOf {
  const around = surroundings(input)
  const known = new Map<Move, Map<number, Run>>()
  return (move, from) => {
    const ofMove = known.get(move) ?? new Map<number, Run>()
    const again = ofMove.get(from)
    if (again) return again
    const line = timeline([move], from, around)
    const loads = loadsOver(line, effortOf, { pressForce: () => pressForceOf(move, base) })
    const run = { load: { force: rms(loads), time: line.seconds }, end: line.end }
    known.set(move, ofMove.set(from, run))
    return run
  }
}

function pressForceOf({ forceLimit = 0 }: Move, base: number): number {
  return forceLimit / 100 * base
}

function loadsOf({ rows, cycle = 0 }: Lap, modulo: number | undefined, { effortOf, base }: Burden, runOf: RunOf): { loads: Load[], time: number } {
  const moves = rows.map(({ move }, index) => waitingFor(move, rows[(index + 1) % rows.length]))
  const loads: Load[] = []
  let place = lapStart(moves, modulo), time = 0
  for (const move of moves) {
    const { load, end } = runOf(move, place)
    loads.push(load)
    time += load.time
    place = end
  }
  const rest = cycle - time
  if (rest <= 0) return { loads, time }
  const last = moves[moves.length - 1]
  const holding = last?.kind === 'press' ? pressForceOf(last, base) : sizeOf(effortOf(0, 0))
  return { loads: [...loads, { force: holding, time: rest }], time: cycle }
}

/** A dwell is waited only before the row that `next` names. */
function waitingFor(move: Move, following: Row | undefined): Move {
  return move.dwell === undefined || move.next === following?.move.move ? move : { ...move, dwell: undefined }
}
