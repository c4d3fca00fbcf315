import { endlessChains, usedRows } from '../motion/chains'
import { takesNoTime } from '../motion/lap'
import { answers } from './answers'
import { movesInWords, sentence } from './format'
import { atMove } from './pointers'
import type { CheckResult, JudgeInput, Rule } from './types'

const { warn, note } = answers('chain-endless')

export const chainEndless: Rule = {
  id: 'chain-endless',
  title: 'Endless chains',
  reason: 'A chain that comes back to itself runs until somebody stops it, and with nothing to wait for the drive has no pause at all.',
  formula: 'following next comes back to the move; a lap without travel and dwell: warn',
  levels: ['warn', 'note'],
  applies: ({ content }) => usedRows(content.moves).some(({ move }) => move.next !== undefined),
  judge,
}

function judge({ content }: JudgeInput): CheckResult[] {
  return endlessChains(usedRows(content.moves)).map((chain) => {
    const moves = chain.map(row => row.move.move)
    const at = chain.map(row => atMove(row, 'next'))
    const story = `${sentence(movesInWords(moves))} ${moves.length === 1 ? 'repeats' : 'repeat'} without end`
    return takesNoTime(chain.map(row => row.move))
      ? warn(at, `${story} in a lap of 0 ms: give one a dwell.`, { moves, lapTime: 0 })
      : note(at, `${story}.`, { moves })
  })
}
