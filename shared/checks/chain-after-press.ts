import { usedRows } from '../motion/chains'
import { answers } from './answers'
import { axisUnits, quantity } from './format'
import { atMove } from './pointers'
import { pressRows } from './presses'
import type { CheckResult, JudgeInput, Rule } from './types'

const { note } = answers('chain-after-press')

export const chainAfterPress: Rule = {
  id: 'chain-after-press',
  title: 'After a press',
  reason: 'What follows a press starts wherever the part stopped it, not at a place of the table.',
  formula: 'next of a press: the follower starts when the press ends, between approach and target',
  levels: ['note'],
  applies: ({ content }) => pressRows(content.moves).some(({ move }) => move.next !== undefined),
  judge,
}

function judge({ content }: JudgeInput): CheckResult[] {
  const { length } = axisUnits(content.axisKind)
  const usable = new Map(usedRows(content.moves).map(({ move }) => [move.move, move]))
  return pressRows(content.moves).flatMap((row) => {
    const { move, next, approach, target } = row.move
    // A follower that is not there is chain-target's to tell.
    const follower = next === undefined ? undefined : usable.get(next)
    if (!follower) return []
    const between = approach === undefined ? `at ${quantity(target, length)} at the latest` : `between ${quantity(approach, length)} and ${quantity(target, length)}`
    const ends = follower.kind === 'relative' ? `: it ends ${quantity(follower.target, length)} from there` : ''
    return [note([atMove(row, 'next')], `Move ${follower.move} starts when press ${move} ends, ${between}${ends}.`,
      { move, next: follower.move, ...approach === undefined ? {} : { approach }, target })]
  })
}
