import { answers } from './answers'
import { inWords } from './format'
import { atSetup } from './pointers'
import type { CheckResult, JudgeInput, Rule } from './types'

const { stop, warn } = answers('soft-limits-off')

export const softLimitsOff: Rule = {
  id: 'soft-limits-off',
  title: 'Soft limits switched off',
  reason: 'Without soft limits nothing but the hard stop ends a wrong move.',
  formula: 'softLimitsActive is not false; on an axis flagged gravity or press that stops, elsewhere it warns',
  levels: ['stop', 'warn'],
  // Not written means on, wherever limits are given.
  applies: ({ content }) => content.setup.softLimitsActive !== undefined,
  judge,
}

function judge({ content, axis }: JudgeInput): CheckResult[] {
  if (content.setup.softLimitsActive !== false) return []
  const strict = axis.flags.filter(flag => flag === 'gravity' || flag === 'press')
  const at = [atSetup('softLimitsActive')]
  return strict.length === 0
    ? [warn(at, 'The soft limits are off: the drive lets every move run on to the hard stop.', { flags: [] })]
    : [stop(at, `The soft limits are off on a ${inWords(strict)} axis: the drive lets every move run on to the hard stop.`, { flags: strict })]
}
