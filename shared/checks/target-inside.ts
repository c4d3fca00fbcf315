import { knownStarts, usedRows, type Row } from '../motion/chains'
import { plus } from '../motion/exact'
import { answers } from './answers'
import { axisUnits, quantity } from './format'
import { beyondLimit, softLimits, turnsFreely } from './limits'
import { atMove, atSetup } from './pointers'
import type { CheckResult, JudgeInput, Rule } from './types'

const { stop, unknown } = answers('target-inside')

interface End { readonly row: Row, readonly end: number, readonly start?: number }

export const targetInside: Rule = {
  id: 'target-inside',
  title: 'Ends of the moves',
  reason: 'The drive refuses or cuts short a move that ends beyond its soft limits, and the machine waits.',
  formula: 'softLimitMin <= end <= softLimitMax; end = target, of a relative move with a known start: start + target',
  levels: ['stop', 'unknown'],
  // Relative moves alone have no known start.
  applies: ({ content }) => !turnsFreely(content) && usedRows(content.moves).some(({ move }) => move.kind !== 'relative'),
  judge,
}

function judge({ content }: JudgeInput): CheckResult[] {
  const { length } = axisUnits(content.axisKind)
  const limits = softLimits(content)
  const judged = ends(content.moves)
  const results: CheckResult[] = []
  for (const { row, end, start } of judged) {
    const found = beyondLimit(end, limits)
    if (!found) continue
    const from = start === undefined ? '' : ` from ${quantity(start, length)}`
    results.push(stop([atMove(row, 'target'), atSetup(found.field)],
      `Move ${row.move.move}${from} ends at ${quantity(end, length)}, ${quantity(found.beyond, length)} beyond the soft limit of ${quantity(found.limit, length)}.`,
      { move: row.move.move, end, limit: found.limit, beyond: found.beyond, ...(start === undefined ? {} : { start }) }))
  }
  if (limits.missing.length > 0) results.push(unknown('Where the moves end', limits.missing, [...new Set(judged.map(({ row }) => atMove(row, 'target')))]))
  return results
}

function ends(moves: JudgeInput['content']['moves']): End[] {
  const rows = usedRows(moves)
  const starts = knownStarts(rows)
  const found: End[] = []
  for (const row of rows) {
    const { move, kind, target } = row.move
    if (kind !== 'relative') found.push({ row, end: target })
    else for (const start of starts.get(move)?.positions ?? []) found.push({ row, start, end: plus(start, target) })
  }
  return found
}
