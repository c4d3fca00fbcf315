import { minus } from '../motion/exact'
import { answers } from './answers'
import { axisUnits, quantity } from './format'
import { softLimits, turnsFreely } from './limits'
import { atSetup } from './pointers'
import type { CheckResult, JudgeInput, Rule } from './types'

const { stop, unknown } = answers('travel-span')
const both = [atSetup('softLimitMin'), atSetup('softLimitMax')]

export const travelSpan: Rule = {
  id: 'travel-span',
  title: 'Soft limits and stroke',
  reason: 'Soft limits the wrong way round stop every move, and limits wider than the stroke let the axis run into its hard stop.',
  formula: 'softLimitMin < softLimitMax; softLimitMax − softLimitMin <= stroke (modulo axes: <= modulo)',
  levels: ['stop', 'unknown'],
  // Limits that are off and not given have no span; soft-limits-off speaks about them.
  applies: ({ content }) => !turnsFreely(content)
    && !(content.setup.softLimitsActive === false && softLimits(content).missing.length === 2),
  judge,
}

function judge({ content, nameplate }: JudgeInput): CheckResult[] {
  const { min, max, missing } = softLimits(content)
  if (min === undefined || max === undefined) return [unknown('The span of the soft limits', missing, both)]
  const { length } = axisUnits(content.axisKind)
  const span = minus(max, min)
  if (span <= 0) {
    return [stop(both, `The soft limits run from ${quantity(min, length)} to ${quantity(max, length)}: the lower must lie below the upper.`, { min, max, span })]
  }
  const { modulo } = content.setup
  const most = modulo ?? nameplate?.stroke
  if (most === undefined) return [unknown('The span of the soft limits', ['nameplate.stroke'], both, { min, max, span })]
  if (span <= most) return []
  const what = modulo === undefined ? 'stroke' : 'modulo'
  return [stop(both,
    `The soft limits span ${quantity(span, length)}, ${quantity(minus(span, most), length)} more than the ${what} of ${quantity(most, length)}.`,
    { min, max, span, [what]: most, beyond: minus(span, most) })]
}
