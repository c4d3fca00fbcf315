import type { Content } from '#shared/settings/types'
import { positionLines, runsOf, showRun, speedLines, type Run, type RunContext, type Shown } from './motion-runs'
import type { ChartLine } from './pictures/time-chart'
import { pressAfter } from './words/means'
import type { MovesTold } from './words/moves-told'

/* Movements that two versions do differently, each with what it was. */

export interface RunSide { readonly run: Run, readonly shown: Shown, readonly content: Content }
export interface RunPair { readonly key: string, readonly before: RunSide, readonly after: RunSide }

const isMove = ({ key }: Run) => key.startsWith('move')

/** A single move ends when it has arrived: what is waited after it belongs to the chain. */
const arriving = (run: Run): Run => isMove(run) ? { ...run, moves: run.moves.map(move => ({ ...move, dwell: undefined })) } : run

/** The move under its old number; the duty; of chains the one with most moves in common. */
function partnerOf(run: Run, others: readonly Run[], was: ReadonlyMap<number, number>): Run | undefined {
  if (run.key === 'duty') return others.find(({ key }) => key === 'duty')
  const before = run.moves.flatMap(({ move }) => was.get(move) ?? [])
  if (isMove(run)) return others.find(({ key }) => key === `move ${before[0] ?? ''}`)
  const shared = (other: Run) => other.moves.filter(({ move }) => before.includes(move)).length
  return others.filter(({ key }) => key.startsWith('chain')).filter(other => shared(other) > 0).toSorted((one, other) => shared(other) - shared(one))[0]
}

const motionOf = ({ shown: { course } }: RunSide) => JSON.stringify(course.segments.map(({ t0, t1, x0, v0, a }) => [t0, t1, x0, v0, a]))
const thrustOf = ({ shown: { thrust } }: RunSide) => JSON.stringify(thrust?.pieces)

/**
 * Moves whose own row changed come first, then those that only set off elsewhere, then chains, then the duty. Where nothing
 * moves differently, the movements that other limits or another load apply to.
 */
export function changedRuns(told: MovesTold, before: RunContext, after: RunContext): RunPair[] {
  const was = new Map(told.rows.flatMap(row => row.was && row.is ? [[row.is.move, row.was.move] as const] : []))
  const changed = new Set(told.rows.filter(row => row.state === 'changed').flatMap(row => row.is?.move ?? []))
  const others = runsOf(before)
  const pairs = runsOf(after).flatMap((run): RunPair[] => {
    const partner = partnerOf(run, others, was)
    if (!partner) return []
    const side = (one: Run, context: RunContext): RunSide => ({ run: one, shown: showRun(arriving(one), context), content: context.content })
    return [{ key: run.key, before: side(partner, before), after: side(run, after) }]
  })
  const rank = ({ after: { run } }: RunPair) => isMove(run) ? changed.has(run.moves[0]?.move ?? -1) ? 0 : 1 : run.key === 'duty' ? 3 : 2
  const moving = pairs.filter(pair => motionOf(pair.before) !== motionOf(pair.after))
  return (moving.length > 0 ? moving : pairs.filter(pair => thrustOf(pair.before) !== thrustOf(pair.after))).toSorted((one, other) => rank(one) - rank(other))
}

/** Lines of both sides; the old one only where it lies elsewhere. */
function bothLines(before: readonly ChartLine[], after: readonly ChartLine[]): ChartLine[] {
  const same = (one: ChartLine) => after.some(({ at, word }) => at === one.at && word === one.word)
  return [...before.filter(one => !same(one)).map((one): ChartLine => ({ ...one, word: `${one.word} before`, tone: 'before' })), ...after]
}

export const pairSpeedLines = ({ before, after }: RunPair): ChartLine[] => bothLines(speedLines(before.content, before.shown.course), speedLines(after.content, after.shown.course))
export const pairPositionLines = ({ before, after }: RunPair): ChartLine[] => bothLines(placeLines(before), placeLines(after))

/** A single move is seen against the press that comes after it: its approach is what the move comes close to. */
function placeLines({ run, content, shown: { course } }: RunSide): ChartLine[] {
  const approach = isMove(run) && run.moves[0] ? pressAfter(content, run.moves[0].move)?.approach : undefined
  return [...positionLines(content, run, course), ...(approach === undefined ? [] : [{ at: approach, word: 'press approach' }])]
}
