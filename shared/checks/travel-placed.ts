import { minus } from '../motion/exact'
import { endsByHardStop, type Ends } from '../motion/hard-stops'
import type { SetupFieldName } from '../settings/types'
import { answers } from './answers'
import { axisUnits, quantity } from './format'
import { softLimits, turnsFreely } from './limits'
import { atSetup } from './pointers'
import type { CheckResult, JudgeInput, Rule } from './types'

const { stop, unknown } = answers('travel-placed')
const both = [atSetup('softLimitMin'), atSetup('softLimitMax')]

export const travelPlaced: Rule = {
  id: 'travel-placed',
  title: 'Soft limits and hard stops',
  reason: 'Soft limits that fit the stroke still let the axis run into a hard stop where the zero is set off.',
  formula: 'h = −homeOffset (home-reads-offset: +homeOffset); hard stops h … h + stroke + 2·hardMargin (negative homing) or h − stroke − 2·hardMargin … h (positive); soft limits within them, drawn in by hardMargin',
  levels: ['stop', 'unknown'],
  // A modulo axis turns past every place; limits that are off and not given lie nowhere.
  applies: ({ content }) => content.setup.modulo === undefined && !turnsFreely(content)
    && !(content.setup.softLimitsActive === false && softLimits(content).missing.length === 2),
  judge,
}

function judge({ content, nameplate }: JudgeInput): CheckResult[] {
  const { setup } = content
  const limits = softLimits(content)
  if (setup.homingMethod !== undefined && setup.homingMethod !== 'hard-stop') return [elsewhere(setup.homingMethod)]
  const missing: string[] = [
    ...(['homingMethod', 'homingDirection', 'homeOffset'] as const).filter(name => setup[name] === undefined),
    ...nameplate === undefined ? ['nameplate.stroke'] : [],
    ...limits.missing,
  ]
  const ends = setup.homingMethod === undefined ? undefined : endsByHardStop(setup, nameplate)
  const results = ends ? outside(limits, ends, axisUnits(content.axisKind).length) : []
  return missing.length === 0 ? results : [...results, unknown('Where the soft limits lie between the hard stops', missing, both)]
}

function outside({ min, max }: { readonly min?: number, readonly max?: number }, ends: Ends, length: string): CheckResult[] {
  const results: CheckResult[] = []
  const say = (field: SetupFieldName, words: string, limit: number, end: number, hard: number) => {
    const beyond = Math.abs(minus(limit, end))
    results.push(stop([atSetup(field), atSetup('homeOffset')],
      `The ${words} soft limit of ${quantity(limit, length)} lies ${quantity(beyond, length)} beyond the end of the stroke at ${quantity(end, length)}; the hard stop stands at ${quantity(hard, length)}.`,
      { ...min === undefined ? {} : { min }, ...max === undefined ? {} : { max }, ...ends, beyond }))
  }
  // Limits the wrong way round may lie beyond either end.
  if (min !== undefined && min < ends.low) say('softLimitMin', 'lower', min, ends.low, ends.hardLow)
  if (min !== undefined && min > ends.high) say('softLimitMin', 'lower', min, ends.high, ends.hardHigh)
  if (max !== undefined && max > ends.high) say('softLimitMax', 'upper', max, ends.high, ends.hardHigh)
  if (max !== undefined && max < ends.low) say('softLimitMax', 'upper', max, ends.low, ends.hardLow)
  return results
}

/** Only a hard stop that is home itself ties the zero to the ends of the stroke. */
function elsewhere(method: string): CheckResult {
  return {
    ...unknown('Where the soft limits lie', ['place of the hard stops'], both, { method }),
    message: `Homing by ${method} does not tell where the hard stops stand: whether the soft limits keep clear of them cannot be judged.`,
  }
}
