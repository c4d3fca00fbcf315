import { usedRows, type Row } from '../motion/chains'
import type { Move, Setup } from '../settings/types'
import { answers } from './answers'
import { inWords, numbersInWords, sentence } from './format'
import type { CheckResult, JudgeInput, Rule } from './types'

const { note } = answers('twin-moves')

export const twinMoves: Rule = {
  id: 'twin-moves',
  title: 'Twin moves',
  reason: 'Two rows that do the same are right only by both: whoever teaches one of them anew leaves the other as it was.',
  formula: 'all fields equal, number, label and comment aside; a value left out counts as what the drive takes instead',
  levels: ['note'],
  applies: ({ content }) => usedRows(content.moves).length > 1,
  judge,
}

function judge({ content: { moves, setup } }: JudgeInput): CheckResult[] {
  const groups = new Map<string, { numbers: number[], at: string[] }>()
  // Most rows are told apart by their target alone, which costs far less than to spell out all of each.
  const rows = usedRows(moves)
  const targets = countOf(rows)
  for (const { move, index } of rows) {
    if (targets.get(move.target) === 1) continue
    const key = motionOf(move, setup)
    const group = groups.get(key) ?? { numbers: [], at: [] }
    group.numbers.push(move.move)
    group.at.push(`/moves/${index}`)
    groups.set(key, group)
  }
  const twins = [...groups.values()].filter(({ numbers }) => numbers.length > 1)
  if (twins.length === 0) return []
  const sets = twins.map(({ numbers }) => numbers.sort((a, b) => a - b)).sort((one, other) => (one[0] ?? 0) - (other[0] ?? 0))
  return [note(twins.flatMap(({ at }) => at),
    `${sentence(inWords(sets.map(numbers => `moves ${numbersInWords(numbers)}`)))} do the same.`,
    { moves: sets.flat().sort((a, b) => a - b), groups: sets.map(numbersInWords) })]
}

function countOf(rows: readonly Row[]): ReadonlyMap<number, number> {
  const count = new Map<number, number>()
  for (const { move: { target } } of rows) count.set(target, (count.get(target) ?? 0) + 1)
  return count
}

/** What a row does, as text; equal for rows that cannot be told apart by watching the axis. */
function motionOf(move: Move, setup: Setup): string {
  const { kind, target, turn = 'signed', speed, acceleration, deceleration = acceleration, forceLimit, approach, next, dwell = 0 } = move
  const pressSpeed = kind === 'press' ? move.pressSpeed ?? setup.pressSpeed : undefined
  const window = move.window ?? setup.inPositionWindow
  return [kind, target, turn, speed, acceleration, deceleration, forceLimit, approach, pressSpeed, window, next, dwell].join()
}
