import { usedRows } from '../motion/chains'
import { answers } from './answers'
import { atMove } from './pointers'
import type { CheckResult, JudgeInput, Rule } from './types'

const { stop } = answers('chain-target')

export const chainTarget: Rule = {
  id: 'chain-target',
  title: 'Followers',
  reason: 'A chain that leads to a row that is not there stands still in the middle of a cycle.',
  formula: 'the move named in next exists and is no unused row',
  levels: ['stop'],
  applies: ({ content }) => usedRows(content.moves).some(({ move }) => move.next !== undefined),
  judge,
}

function judge({ content }: JudgeInput): CheckResult[] {
  const used = usedRows(content.moves)
  const usable = new Set(used.map(({ move }) => move.move))
  const written = new Set(content.moves.map(({ move }) => move))
  return used.flatMap((row) => {
    const { move, next } = row.move
    if (next === undefined || usable.has(next)) return []
    const why = written.has(next) ? 'is an unused row' : 'does not exist'
    return [stop([atMove(row, 'next')], `Move ${move} is followed by move ${next}, which ${why}.`, { move, next })]
  })
}
