import { usedRows, type Row } from '../motion/chains'
import { answers } from './answers'
import { axisUnits, quantity } from './format'
import { atMove, atSetup } from './pointers'
import type { CheckResult, JudgeInput, Rule } from './types'

const { warn, unknown } = answers('quick-stop-soft')

export const quickStopSoft: Rule = {
  id: 'quick-stop-soft',
  title: 'Quick stop',
  reason: 'A quick stop that brakes softer than a move takes a longer way than the move itself would.',
  formula: 'quickStopDeceleration >= the highest deceleration of a move',
  levels: ['warn', 'unknown'],
  applies: ({ content }) => usedRows(content.moves).length > 0,
  judge,
}

function judge({ content }: JudgeInput): CheckResult[] {
  const { quickStopDeceleration: quickStop } = content.setup
  const at = atSetup('quickStopDeceleration')
  if (quickStop === undefined) return [unknown('The quick stop', ['quickStopDeceleration'], [at])]
  const hardest = usedRows(content.moves).reduce(harder)
  const deceleration = brakes(hardest)
  if (quickStop >= deceleration) return []
  const { acceleration: unit } = axisUnits(content.axisKind)
  const { move } = hardest.move
  return [warn([at, atMove(hardest, hardest.move.deceleration === undefined ? 'acceleration' : 'deceleration')],
    `The quick stop brakes with ${quantity(quickStop, unit)}, softer than move ${move} with ${quantity(deceleration, unit)}: give it at least as much.`,
    { move, quickStop, deceleration })]
}

/** The row that brakes harder; of two alike the one with the lower number. */
function harder(one: Row, other: Row): Row {
  const more = brakes(other) - brakes(one)
  return more > 0 || (more === 0 && other.move.move < one.move.move) ? other : one
}

function brakes({ move: { acceleration, deceleration = acceleration } }: Row): number {
  return deceleration
}
