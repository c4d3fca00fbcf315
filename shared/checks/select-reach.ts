import { followers, usedRows } from '../motion/chains'
import { calledMove, highestMove, inputsOn, isCallable, selectCode, type Numbering } from '../motion/select-inputs'
import { answers } from './answers'
import { inWords, movesInWords, sentence } from './format'
import { atMove, atSetup } from './pointers'
import type { CheckResult, JudgeInput, Rule } from './types'

const { warn } = answers('select-reach')

export const selectReach: Rule = {
  id: 'select-reach',
  title: 'Reach of the select inputs',
  reason: 'A move whose code needs more inputs than are wired cannot be called, and with the line ignored another move runs instead.',
  formula: 'code = move − firstMove (allOff first), else move − firstMove + 1 and code 0 calls nothing; callable: code < 2^selectInputs',
  levels: ['warn'],
  applies: ({ content }) => (content.setup.selectInputs ?? 0) > 0 && usedRows(content.moves).length > 0,
  judge,
}

function judge({ content, nameplate }: JudgeInput): CheckResult[] {
  const inputs = content.setup.selectInputs ?? 0
  const numbering = { firstMove: nameplate?.firstMove ?? 0, allOff: nameplate?.allOff ?? 'first' } as const
  const rows = usedRows(content.moves)
  // A row that only follows itself still has to be called a first time.
  const called = followers(rows.filter(({ move }) => move.next !== move.move))
  const unreachable = rows.filter(({ move: { move } }) => !called.has(move) && !isCallable(selectCode(move, numbering), inputs, numbering))
    .sort((one, other) => one.move.move - other.move.move)
  if (unreachable.length === 0) return []
  const moves = unreachable.map(({ move }) => move.move)
  const highest = highestMove(inputs, numbering)
  const used = new Set(rows.map(({ move }) => move.move))
  const ignored = moves.map(move => ignoredLine(move, inputs, numbering, used))
  const reach = `${inputs} select ${inputs === 1 ? 'input reaches' : 'inputs reach'} up to move ${highest}`
  const text = `${sentence(movesInWords(moves))} cannot be called: ${reach}${stories(ignored)}.`
  return [warn([atSetup('selectInputs'), ...unreachable.map(row => atMove(row))], text,
    { highest, moves, inputs, instead: ignored.map(({ instead }) => instead) })]
}

interface Ignored { readonly move: number, readonly line?: number, readonly instead: string }

/** What runs when the lines that are not wired are left out of the code of a move; a code below 0 calls nothing at all. */
function ignoredLine(move: number, inputs: number, numbering: Numbering, used: ReadonlySet<number>): Ignored {
  const code = selectCode(move, numbering)
  if (code < 2 ** inputs) return { move, instead: 'nothing' }
  const called = calledMove(code % 2 ** inputs, numbering)
  const line = inputsOn(code).find(input => input >= inputs)
  if (called === undefined) return { move, line, instead: numbering.allOff === 'home' ? 'home' : 'nothing' }
  return { move, line, instead: used.has(called) ? `move ${called}` : 'nothing' }
}

/** At most four are told one by one; the list in the values is whole. */
function stories(ignored: readonly Ignored[]): string {
  const told = ignored.flatMap(({ move, instead, line }) => line === undefined ? [] : [`${move} without its line ${line + 1} calls ${instead}`])
  if (told.length === 0) return ''
  return `; ${inWords(told.length > 4 ? [...told.slice(0, 4), `so on for ${told.length - 4} more`] : told)}`
}
