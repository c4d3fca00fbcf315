import { usedRows, type Row } from '../motion/chains'
import { plus, remainder } from '../motion/exact'
import type { MoveFieldName } from '../settings/move-fields'
import type { Content, Move } from '../settings/types'
import { answers } from './answers'
import { movesInWords } from './format'
import { atMove, atSetup } from './pointers'
import type { CheckResult, JudgeInput, Rule } from './types'

const { stop, unknown } = answers('polarity-flip')
const direction = atSetup('positiveDirection')

export const polarityFlip: Rule = {
  id: 'polarity-flip',
  title: 'Direction turned round',
  reason: 'With the positive direction turned round every target lies on the other side, and the axis runs where nobody expects it.',
  formula: 'positiveDirection as in the version before, or mirrored: target, approach and limits = c − those before (c = 0, or softLimitMin + softLimitMax before of the other end), distances = −those before',
  levels: ['stop', 'unknown'],
  applies: ({ content, before }) => before !== undefined
    && (content.setup.positiveDirection !== undefined || before.content.setup.positiveDirection !== undefined),
  judge,
}

function judge({ content, before }: JudgeInput): CheckResult[] {
  const now = content.setup.positiveDirection
  const then = before?.content.setup.positiveDirection
  if (!before || now === then) return []
  if (now === undefined || then === undefined) {
    return [unknown('Whether the positive direction was turned round', [now === undefined ? 'positiveDirection' : 'positiveDirection of the version before'], [direction])]
  }
  const centre = mirrorOf(content, before.content)
  const astray = rowsAstray(content, before.content, centre ?? 0)
  if (astray.length === 0 && centre !== undefined) return []
  const moves = astray.map(({ move }) => move.move).sort((a, b) => a - b)
  const what = moves.length > 0 ? `${movesInWords(moves)} ${moves.length === 1 ? 'is' : 'are'}` : 'the soft limits are'
  return [stop([direction, ...astray.map(row => atMove(row, 'target'))],
    `The positive direction turns from ${then} to ${now} and ${what} not mirrored: the axis would run the other way.`,
    { from: then, to: now, moves })]
}

/**
 * The sum that a place and its mirror image have in common: 0 where the zero stays; what the limits tell where it moved to
 * the other end. Undefined where the limits are not each other's mirror image.
 */
function mirrorOf({ setup: now }: Content, { setup: then }: Content): number | undefined {
  const sums = [[now.softLimitMin, then.softLimitMax], [now.softLimitMax, then.softLimitMin]]
    .flatMap(([one, other]) => one === undefined || other === undefined ? [] : [plus(one, other)])
  return sums.every(sum => sum === sums[0]) ? sums[0] ?? 0 : undefined
}

/** Rows of one number and kind in both tables that are no mirror image; all rows where no two can be held side by side. */
function rowsAstray(content: Content, before: Content, centre: number): readonly Row[] {
  const then = new Map(usedRows(before.moves).map(({ move }) => [move.move, move]))
  const rows = usedRows(content.moves)
  const pairs = rows.flatMap((row) => {
    const other = then.get(row.move.move)
    return other?.kind === row.move.kind ? [{ row, other }] : []
  })
  if (pairs.length === 0) return rows
  return pairs.filter(({ row, other }) => !isMirrored(row.move, other, centre, content.setup.modulo)).map(({ row }) => row)
}

function isMirrored(now: Move, then: Move, centre: number, modulo: number | undefined): boolean {
  const fits = (field: MoveFieldName & ('target' | 'approach'), sum: number) => {
    const [one, other] = [now[field], then[field]]
    if (one === undefined || other === undefined) return one === other
    const rest = plus(plus(one, other), -sum)
    return rest === 0 || (modulo !== undefined && now.kind !== 'relative' && remainder(rest, modulo) === 0)
  }
  return fits('target', now.kind === 'relative' ? 0 : centre) && fits('approach', centre)
}
