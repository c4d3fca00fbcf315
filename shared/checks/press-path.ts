import { knownStarts, usedRows, type Row, type Starts } from '../motion/chains'
import { minus } from '../motion/exact'
import type { Move } from '../settings/types'
import { answers } from './answers'
import { axisUnits, movesInWords, quantity } from './format'
import { beyondLimit, softLimits, turnsFreely, type SoftLimits } from './limits'
import { atMove, atSetup } from './pointers'
import { pressRows, pushOf } from './presses'
import type { CheckResult, JudgeInput, Rule } from './types'

const { stop, unknown } = answers('press-path')

/** What an unknown of this rule misses where nobody can know the start: it never holds up a mark. */
export const startOfPress = 'start of press'

export const pressPath: Rule = {
  id: 'press-path',
  title: 'Path of a press',
  reason: 'A press that starts beyond its approach meets the part at full speed, and one without a way beyond it never presses.',
  formula: 'softLimitMin <= approach, target <= softLimitMax; target ≠ approach; start, where known, not beyond approach in the direction from approach to target',
  levels: ['stop', 'unknown'],
  applies: ({ content }) => pressRows(content.moves).length > 0,
  judge,
}

function judge({ content }: JudgeInput): CheckResult[] {
  const { length } = axisUnits(content.axisKind)
  const rows = usedRows(content.moves)
  const presses = pressRows(content.moves)
  const starts = knownStarts(rows)
  const free = turnsFreely(content)
  const limits = softLimits(content)
  const results = presses.flatMap(row => [
    ...free ? [] : outside(row, limits, length),
    ...onTheWay(row, starts.get(row.move.move), rows, length),
  ])
  if (!free && limits.missing.length > 0) {
    results.push(unknown('The path of a press', limits.missing, presses.flatMap(row => [atMove(row, 'approach'), atMove(row, 'target')])))
  }
  return results
}

function outside(row: Row, limits: SoftLimits, length: string): CheckResult[] {
  const { move, approach, target } = row.move
  const places = [
    { field: 'approach', place: approach, text: 'slows down at' },
    { field: 'target', place: target, text: 'may run on to' },
  ] as const
  return places.flatMap(({ field, place, text }) => {
    if (place === undefined) return []
    const found = beyondLimit(place, limits)
    if (!found) return []
    return [stop([atMove(row, field), atSetup(found.field)],
      `Press ${move} ${text} ${quantity(place, length)}, ${quantity(found.beyond, length)} beyond the soft limit of ${quantity(found.limit, length)}.`,
      { ...path(row.move), limit: found.limit, beyond: found.beyond })]
  })
}

function onTheWay(row: Row, starts: Starts | undefined, rows: readonly Row[], length: string): CheckResult[] {
  const { move, approach, target } = row.move
  if (approach === undefined) return [unknown(`The path of press ${move}`, ['approach'], [atMove(row)])]
  const push = pushOf(row.move)
  if (push === undefined) {
    return [stop([atMove(row, 'approach'), atMove(row, 'target')],
      `Press ${move} has approach and target at ${quantity(target, length)}: no way is left to press on.`, path(row.move))]
  }
  const tooFar = (starts?.positions ?? []).filter(start => push * minus(start, approach) > 0)
  const results = tooFar.map(start => stop(
    [atMove(row, 'approach')],
    `Press ${move} starts at ${quantity(start, length)}, ${quantity(Math.abs(minus(start, approach)), length)} beyond its approach of ${quantity(approach, length)}.`,
    { ...path(row.move), start }))
  if (!starts || starts.positions.length === 0 || starts.open) results.push(startUnknown(row, push, rows, length))
  return results
}

/** Names the absolute moves from whose end the press would start too far on. */
function startUnknown(row: Row, push: 1 | -1, rows: readonly Row[], length: string): CheckResult {
  const { move, approach = 0, target } = row.move
  const between = rows.filter(other => other.move.kind === 'absolute'
    && push * minus(other.move.target, approach) > 0 && push * minus(target, other.move.target) >= 0)
  const numbers = between.map(other => other.move.move)
  const found = numbers.length === 0
    ? 'no absolute move ends there'
    : `${movesInWords(numbers)} ${numbers.length === 1 ? 'ends' : 'end'} there`
  return {
    ...unknown(`Press ${move}`, [startOfPress], [atMove(row, 'approach'), ...between.map(other => atMove(other, 'target'))], { ...path(row.move), between: numbers }),
    message: `Press ${move} must not start between its approach of ${quantity(approach, length)} and its target of ${quantity(target, length)}, and where it starts is not known: ${found}.`,
  }
}

function path({ move, approach, target }: Move): Record<string, number> {
  return approach === undefined ? { move, target } : { move, approach, target }
}
