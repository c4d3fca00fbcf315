import { usedRows } from '../motion/chains'
import { isAbove } from '../motion/exact'
import { answers } from './answers'
import { drivenRows } from './driven'
import { about, axisUnits, quantity } from './format'
import { atMove } from './pointers'
import type { CheckResult, JudgeInput, Rule } from './types'

const { note } = answers('speed-reached')

export const speedReached: Rule = {
  id: 'speed-reached',
  title: 'Speeds that are reached',
  reason: 'On a way too short for its speed a move gets no quicker by asking for more.',
  formula: 'vp = √(2·d·a·b/(a + b)) < speed',
  levels: ['note'],
  // A row whose start nobody knows may have come a long way: it is taken to reach its speed.
  applies: ({ content }) => usedRows(content.moves).length > 0,
  judge,
}

function judge(input: JudgeInput): CheckResult[] {
  const { speed: unit } = axisUnits(input.content.axisKind)
  return drivenRows(input).flatMap(({ row, ways }): CheckResult[] => {
    const reached = Math.max(...ways.map(({ profile }) => profile.peakSpeed))
    const { move, speed } = row.move
    if (ways.length === 0 || !isAbove(speed, reached)) return []
    return [note([atMove(row, 'speed')], `Move ${move} reaches ${about(reached, speed)} of the ${quantity(speed, unit)} asked: its way is too short.`, { move, reached, asked: speed })]
  })
}
