import { usedRows, type Row } from '../motion/chains'
import type { Content } from '../settings/types'
import { answers } from './answers'
import { about, axisUnits, movesInWords, quantity, sentence } from './format'
import { atMove } from './pointers'
import type { CheckResult, JudgeInput, Rule } from './types'

const { note, unknown } = answers('target-grid')

/** A thousandth of the finest step of a file: what dividing by the count may leave of binary noise. */
const noise = 1e-9

interface Off { readonly row: Row, readonly off: number, readonly bound: number }

export const targetGrid: Rule = {
  id: 'target-grid',
  title: 'Targets between counts',
  reason: 'The unit stands only on whole counts: a target between two is rounded, and repeated steps add that up.',
  formula: '|target − nearest whole count| <= window / 2 and <= repeatability; a press has no window',
  levels: ['note', 'unknown'],
  applies: ({ content }) => usedRows(content.moves).length > 0,
  judge,
}

function judge({ content, nameplate }: JudgeInput): CheckResult[] {
  const { length } = axisUnits(content.axisKind)
  const rows = usedRows(content.moves)
  const { resolution, repeatability } = nameplate ?? {}
  if (resolution === undefined) return [unknown('How targets fall on counts', ['nameplate.resolution'], rows.map(row => atMove(row, 'target')))]
  const results: CheckResult[] = []
  const found: Off[] = []
  const open: Row[] = []
  for (const row of rows) {
    const bound = boundOf(row, content, repeatability)
    if (bound === undefined) open.push(row)
    else {
      const off = offGrid(row.move.target, resolution)
      if (off > bound + noise) found.push({ row, off, bound })
    }
  }
  if (found.length > 0) results.push(told(found, resolution, length))
  if (open.length > 0) results.push(unknown(`How the targets of ${movesInWords(open.map(({ move }) => move.move))} fall on counts`, ['nameplate.repeatability'], open.map(row => atMove(row, 'target'))))
  return results
}

/** One line for all, led by the one that is furthest off. */
function told(found: readonly Off[], resolution: number, length: string): CheckResult {
  const moves = found.map(({ row }) => row.move.move).sort((a, b) => a - b)
  const worst = found.reduce((most, one) => one.off > most.off || (one.off === most.off && one.row.move.move < most.row.move.move) ? one : most)
  const { move, target } = worst.row.move
  const [which, ends] = found.length === 1
    ? [`Move ${move} has its target`, `to ${quantity(target, length)} it ends`]
    : [`${sentence(movesInWords(moves))} have targets`, `move ${move} to ${quantity(target, length)} ends`]
  return note(found.map(({ row }) => atMove(row, 'target')),
    `${which} between counts of ${quantity(resolution, length)}: ${ends} up to ${about(worst.off)} ${length} off, more than the ${about(worst.bound, worst.off)} ${length} that pass unseen.`,
    { moves, worst: move, off: worst.off, bound: worst.bound, resolution })
}

/** How far a target may be rounded unseen: half its window or the repeatability, whichever is less. */
function boundOf({ move }: Row, { setup }: Content, repeatability: number | undefined): number | undefined {
  const window = move.kind === 'press' ? undefined : move.window ?? setup.inPositionWindow
  if (window === undefined) return repeatability
  return Math.min(window / 2, repeatability ?? Infinity)
}

function offGrid(target: number, resolution: number): number {
  return Math.abs(target - Math.floor(target / resolution + 0.5) * resolution)
}
