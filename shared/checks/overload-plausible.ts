import { isAbove, minus } from '../motion/exact'
import { limitPercent } from '../motion/limit'
import { answers } from './answers'
import { about, quantity } from './format'
import { atSetup } from './pointers'
import type { CheckResult, JudgeInput, Rule } from './types'

const { stop, note, unknown } = answers('overload-plausible')

export const overloadPlausible: Rule = {
  id: 'overload-plausible',
  title: 'Overload level and time',
  reason: 'An overload level that the thrust never reaches trips never, and a time longer than the unit stands trips too late.',
  formula: 'overloadLevel <= the higher of the thrust limits of both signs; overloadTime <= maxOverloadTime',
  levels: ['stop', 'note', 'unknown'],
  applies: ({ content: { setup } }) => setup.overloadLevel !== undefined || setup.overloadTime !== undefined,
  judge,
}

function judge({ content: { setup }, nameplate }: JudgeInput): CheckResult[] {
  const { overloadLevel, overloadTime } = setup
  const results: CheckResult[] = []
  if (overloadTime !== undefined) {
    const most = nameplate?.maxOverloadTime
    if (most === undefined) results.push(unknown('The overload time', ['nameplate.maxOverloadTime'], [atSetup('overloadTime')]))
    else if (overloadTime > most) {
      results.push(stop([atSetup('overloadTime')],
        `The overload time of ${quantity(overloadTime, 'ms')} is ${quantity(minus(overloadTime, most), 'ms')} longer than the ${quantity(most, 'ms')} that the unit stands.`,
        { value: overloadTime, limit: most }))
    }
  }
  const highest = Math.max(limitPercent(1, setup, nameplate), limitPercent(-1, setup, nameplate))
  if (overloadLevel !== undefined && isAbove(overloadLevel, highest)) {
    results.push(note([atSetup('overloadLevel')],
      `The overload level of ${quantity(overloadLevel, '%')} lies above every thrust limit, the highest being ${about(highest, overloadLevel)} %: it never trips.`,
      { level: overloadLevel, highest }))
  }
  return results
}
