import { minus } from '../motion/exact'
import { homeReading } from '../motion/hard-stops'
import type { SetupFieldName } from '../settings/types'
import { answers } from './answers'
import { axisUnits, quantity } from './format'
import { softLimits, turnsFreely } from './limits'
import { atSetup } from './pointers'
import type { CheckResult, JudgeInput, Rule } from './types'

const { stop, unknown } = answers('home-side')

export const homeSide: Rule = {
  id: 'home-side',
  title: 'Side of home',
  reason: 'Home is an end of the travel: where it reads a place between the soft limits, zero or the direction of homing is wrong.',
  formula: 'hard-stop and limit-switch homing, h = −homeOffset (home-reads-offset: +homeOffset): h <= softLimitMin (negative), h >= softLimitMax (positive)',
  levels: ['stop', 'unknown'],
  applies: ({ content }) => {
    const { homingMethod, softLimitsActive, modulo } = content.setup
    const ofAnEnd = homingMethod === undefined || homingMethod === 'hard-stop' || homingMethod === 'limit-switch'
    return ofAnEnd && modulo === undefined && !turnsFreely(content) && !(softLimitsActive === false && softLimits(content).missing.length === 2)
  },
  judge,
}

function judge({ content, nameplate }: JudgeInput): CheckResult[] {
  const { setup } = content
  const { length } = axisUnits(content.axisKind)
  const home = homeReading(setup, nameplate?.homeOffsetSense)
  const field: SetupFieldName = setup.homingDirection === 'positive' ? 'softLimitMax' : 'softLimitMin'
  const limit = setup[field]
  const missing = (['homingMethod', 'homingDirection', 'homeOffset'] as const).filter(name => setup[name] === undefined)
  const at = [atSetup('homeOffset'), atSetup(field)]
  if (home === undefined || limit === undefined || missing.length > 0) {
    const wanted = [...missing, ...setup.homingDirection !== undefined && limit === undefined ? [field] : []]
    return [unknown('On which side of the travel home lies', wanted, at)]
  }
  const inside = field === 'softLimitMax' ? minus(limit, home) : minus(home, limit)
  if (inside <= 0) return []
  const side = field === 'softLimitMax' ? 'upper' : 'lower'
  return [stop(at,
    `Home, found going ${setup.homingDirection}, reads ${quantity(home, length)}: ${quantity(inside, length)} inside the ${side} soft limit of ${quantity(limit, length)}, where it has to lie on or beyond it.`,
    { home, limit, inside })]
}
