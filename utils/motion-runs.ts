import { weigh, type Burden } from '#shared/checks/burden'
import { chainsOf } from '#shared/checks/chains-to-judge'
import { surroundings } from '#shared/checks/driven'
import { lapMeans, lapSentence, lapsOf, type LapMean } from '#shared/checks/lap-rms'
import type { JudgeInput } from '#shared/checks/types'
import { usedRows } from '#shared/motion/chains'
import { limitPercent } from '#shared/motion/limit'
import { startOf } from '#shared/motion/start-of'
import { directionOf } from '#shared/motion/thrust'
import { lapStart, timeline, type Part, type Stretch } from '#shared/motion/timeline'
import type { Axis } from '#shared/api/versions'
import type { Nameplate } from '#shared/settings/nameplate'
import type { Content, Move } from '#shared/settings/types'
import type { Course } from './pictures/motion'
import type { ThrustPiece } from './pictures/thrust'
import type { ChartLine } from './pictures/time-chart'

/** Moves that can be looked at as one: a move, a chain, the duty of the axis. */
export interface Run {
  readonly key: string
  readonly label: string
  readonly moves: readonly Move[]
  readonly from: number
  /** The move at whose end it sets off; undefined where it begins again where it ends. */
  readonly after: number | undefined
}

/** Everything that a picture of motion goes by. */
export interface RunContext {
  readonly content: Content
  readonly axis: Pick<Axis, 'axisKind' | 'flags' | 'duty'>
  readonly nameplate: Nameplate | undefined
}

const named = ({ move, label }: Move) => `move ${move}${label ? `, ${label}` : ''}`

/** All runs of an axis: its duty, its chains, then each move whose start is known, in the order of the table. */
export function runsOf({ content, axis }: RunContext): Run[] {
  const rows = usedRows(content.moves)
  const byNumber = new Map(rows.map(({ move }) => [move.move, move]))
  const lap = (moves: readonly Move[]) => ({ moves, from: lapStart(moves, content.setup.modulo), after: undefined })
  const duty = axis.duty?.moves.map(number => byNumber.get(number)) ?? []
  const inDuty = duty.flatMap(move => move ?? [])
  const chains = chainsOf(rows).map(({ rows: chain, endless }): Run => {
    const moves = chain.map(({ move }) => move)
    const start = endless || !moves[0] ? undefined : startOf(moves[0], content.moves)
    const label = `chain ${moves.map(({ move }) => move).join(', ')}${endless ? ', without end' : ''}`
    return { key: `chain ${moves[0]?.move ?? ''}`, label, ...(start ? { moves, from: start.target, after: start.move } : lap(moves)) }
  })
  const singles = rows.flatMap(({ move }): Run[] => {
    const start = startOf(move, content.moves)
    return start ? [{ key: `move ${move.move}`, label: named(move), moves: [move], from: start.target, after: start.move }] : []
  })
  // A duty that names a row which is not there is told by the checks, not drawn in part.
  return [...(duty.length > 0 && inDuty.length === duty.length ? [{ key: 'duty', label: 'the duty of the axis', ...lap(inDuty) }] : []), ...chains, ...singles]
}

/** One move of a run in numbers; thrust only where it can be told. */
export interface Leg {
  readonly move: Move
  readonly from: number
  readonly to: number
  /** Seconds from the start of the run. */
  readonly begins: number
  /** Seconds with smoothing and dwell. */
  readonly takes: number
  readonly peakSpeed: number
  /** Where it comes nearest to a limit, a press up to its approach; N or N·m. */
  readonly thrust: { readonly need: number, readonly limit: number } | undefined
}

export interface Shown {
  readonly course: Course
  readonly legs: readonly Leg[]
  readonly atLeast: boolean
  readonly thrust: { readonly pieces: readonly ThrustPiece[], readonly unit: string, readonly without: string } | undefined
  /** Of a chain or the duty: thrust in the mean, as its rule reckons it, the rule's sentence, and where a lap begins. */
  readonly mean: LapMean & { readonly sentence: string, readonly from: number } | undefined
  /** What is missing where there is no thrust. */
  readonly missing: readonly string[]
}

type PieceOf = (stretch: Stretch, move: Move) => ThrustPiece

const topSpeed = (stretches: readonly Stretch[]) => Math.max(0, ...stretches.map(({ v0, a, t0, t1 }) => Math.max(Math.abs(v0), Math.abs(v0 + a * (t1 - t0)))))

/** A run over time: what the pictures draw, and the same in numbers. */
export function showRun(run: Run, context: RunContext): Shown {
  const input = judgeInput(context)
  const around = surroundings(input)
  const whole = timeline(run.moves, run.from, around)
  const { burden, missing } = weigh(input)
  const pieceOf: PieceOf | undefined = burden && ((stretch, move) => {
    const { plus, minus } = limitsOf(stretch.part, move, input, burden.base)
    const pressing = pushOf(move) === 1 ? plus : -minus
    const { least, most } = stretch.part === 'hold' && Number.isFinite(pressing) ? { least: pressing, most: pressing } : burden.effortOf(stretch.a, directionOf(stretch))
    return { t0: stretch.t0, t1: stretch.t1, least, most, plus, minus }
  })
  const legs: Leg[] = []
  const pieces: ThrustPiece[] = []
  let place = run.from, clock = 0
  for (const move of run.moves) {
    const { stretches, end, seconds } = timeline([move], place, around)
    const own = pieceOf ? stretches.map(stretch => ({ part: stretch.part, piece: pieceOf(stretch, move) })) : []
    pieces.push(...own.map(({ piece }) => ({ ...piece, t0: clock + piece.t0, t1: clock + piece.t1 })))
    legs.push({ move, from: place, to: end, begins: clock, takes: seconds, peakSpeed: topSpeed(stretches), thrust: nearest(own.filter(({ part }) => part === 'move' || part === 'wait').map(({ piece }) => piece)) })
    clock += seconds
    place = end
  }
  return {
    course: { segments: whole.stretches, duration: whole.seconds, from: whole.from, end: whole.end, peakSpeed: topSpeed(whole.stretches) },
    legs, atLeast: whole.atLeast, missing, mean: burden && meanOf(run, input, burden),
    thrust: burden && { pieces, unit: burden.unit, without: burden.without },
  }
}

/** Undefined for a single move, which does not come again, and where the nameplate has no rated thrust. */
function meanOf(run: Run, input: JudgeInput, burden: Burden): Shown['mean'] {
  const rated = input.nameplate?.ratedThrust
  const numbers = run.moves.map(({ move }) => move).join()
  const lap = lapsOf(input).laps.find(({ rows, cycle }) => (cycle !== undefined) === (run.key === 'duty') && rows.map(({ move }) => move.move).join() === numbers)
  if (rated === undefined || !lap || run.key.startsWith('move')) return undefined
  const mean = lapMeans(input, burden, rated)(lap)
  return { ...mean, sentence: lapSentence(lap, mean, burden, rated), from: lapStart(run.moves, input.content.setup.modulo) }
}

/** Judging takes more than a picture needs: no rules of a site and no other versions. */
function judgeInput({ content, axis, nameplate }: RunContext): JudgeInput {
  return { content, axis: { axisKind: axis.axisKind, flags: axis.flags, ...(axis.duty && { duty: axis.duty }) }, unit: { model: nameplate?.model ?? '' }, rules: [], ...(nameplate && { nameplate }) }
}

const pushOf = ({ target, approach = target }: Move): 1 | -1 => target >= approach ? 1 : -1

/** The force limit of a press holds from its approach on, towards its part alone unless the drive limits both ways. */
function limitsOf(part: Part, move: Move, { content: { setup }, nameplate }: JudgeInput, base: number): { plus: number, minus: number } {
  const limit = (sign: 1 | -1) => {
    const fromApproach = part === 'press' || part === 'hold'
    const own = move.kind === 'press' ? fromApproach && (nameplate?.forceLimitActsBothWays === true || sign === pushOf(move)) : true
    return limitPercent(sign, setup, nameplate, own ? move.forceLimit : undefined) / 100 * base
  }
  return { plus: limit(1), minus: limit(-1) }
}

const shareOf = ({ need, limit }: { need: number, limit: number }) => need === 0 ? 0 : need / limit

/** Where a run comes nearest to a limit, over all its moves. */
export const worstOf = ({ legs }: Shown): Leg['thrust'] => legs.flatMap(({ thrust }) => thrust ?? []).toSorted((one, other) => shareOf(other) - shareOf(one) || other.need - one.need)[0]

/** The need that is the largest part of its limit; where nothing limits it the largest. */
function nearest(pieces: readonly ThrustPiece[]): Leg['thrust'] {
  const needs = pieces.flatMap(({ least, most, plus, minus }) => [{ need: Math.max(0, most), limit: plus }, { need: Math.max(0, -least), limit: minus }])
  return needs.toSorted((one, other) => shareOf(other) - shareOf(one) || other.need - one.need)[0]
}

/** Digits after the point of a thrust: a torque in N·m is a hundredth of what a force in N is. */
export const thrustDigits = (unit: string) => unit === 'N' ? 1 : 3

/** How much of its limit a thrust takes, in whole percent; rounded up, so that what is above never reads 100. */
export const percentOf = ({ need, limit }: { readonly need: number, readonly limit: number }): number | undefined =>
  Number.isFinite(limit) && limit > 0 ? Math.ceil(100 * need / limit - 1e-9) : undefined

/** The speed limit of the setup, unless it is so far above that it would press the curve flat. */
export function speedLines({ setup: { speedLimit } }: Content, { peakSpeed }: Course): ChartLine[] {
  return speedLimit !== undefined && speedLimit <= 2 * peakSpeed ? [{ at: speedLimit, word: 'speed limit' }] : []
}

/** Where the presses of a run begin to push, and the soft limits that it comes near. */
export function positionLines({ setup }: Content, { moves }: Run, { segments, from, end }: Course): ChartLine[] {
  const side = (at: number) => Math.abs(at - end) < Math.abs(at - from) ? 'left' as const : 'right' as const
  const places = [...segments.map(segment => segment.x0), end]
  const [low, high] = [Math.min(...places), Math.max(...places)]
  const near = (high - low) / 4
  const approaches = new Set(moves.flatMap(({ kind, approach }) => kind === 'press' && approach !== undefined ? [approach] : []))
  const limits = setup.softLimitsActive === false ? [] : [setup.softLimitMin, setup.softLimitMax]
  return [
    ...[...approaches].map(at => ({ at, word: 'press approach' })),
    ...limits.flatMap(at => at !== undefined && at >= low - near && at <= high + near ? [{ at, word: 'soft limit', side: side(at) }] : []),
  ]
}
