import { isUnused } from '../settings/move-fields'
import { answers } from './answers'
import { numbersInWords } from './format'
import type { CheckResult, JudgeInput, Rule } from './types'

const { note } = answers('unused-rows')

export const unusedRows: Rule = {
  id: 'unused-rows',
  title: 'Unused rows',
  reason: 'Empty rows are kept, so that a restored unit is as empty there as the old one.',
  formula: 'speed = 0 and acceleration = 0',
  levels: ['note'],
  applies: ({ content }) => content.moves.length > 0,
  judge,
}

function judge({ content }: JudgeInput): CheckResult[] {
  const unused = content.moves.flatMap((move, index) => isUnused(move) ? [{ number: move.move, at: `/moves/${index}` }] : [])
  if (unused.length === 0) return []
  const moves = unused.map(({ number }) => number)
  const rows = moves.length === 1 ? `Row ${moves[0]} is` : `Rows ${numbersInWords(moves)} are`
  return [note(unused.map(({ at }) => at), `${rows} unused: ${moves.length} of ${content.moves.length}.`, { moves })]
}
