import { isAbove } from '../motion/exact'
import { peakPercent, ratedPercent } from '../motion/limit'
import type { Setup } from '../settings/types'
import { answers } from './answers'
import { about, quantity } from './format'
import { atSetup } from './pointers'
import type { CheckResult, JudgeInput, Rule } from './types'

const { stop, warn, note, unknown } = answers('thrust-limit')

const limits = {
  thrustLimit: 'The thrust limit', thrustLimitPositive: 'The thrust limit towards plus', thrustLimitNegative: 'The thrust limit towards minus',
} as const
type LimitField = keyof typeof limits
const fields = Object.keys(limits) as LimitField[]

export const thrustLimit: Rule = {
  id: 'thrust-limit',
  title: 'Thrust limits',
  reason: 'A limit beyond the peak of the unit protects nothing, and one beyond its rated thrust lets it burn where no overload time ends it.',
  formula: 'thrustLimit, thrustLimitPositive, thrustLimitNegative <= 100 · peakThrust / base; above 100 · ratedThrust / base: note, and warn where neither overloadLevel nor overloadTime is given',
  levels: ['stop', 'warn', 'note', 'unknown'],
  applies: ({ content: { setup } }) => fields.some(field => setup[field] !== undefined),
  judge,
}

function judge({ content: { setup }, nameplate }: JudgeInput): CheckResult[] {
  const peak = peakPercent(nameplate)
  const rated = ratedPercent(nameplate)
  const high = fields.filter(field => isAbove(setup[field] ?? 0, rated))
  // What a peak in newtons is in % cannot be told without the force that 100 % means.
  const open = high.length > 0 && peak === Infinity && nameplate?.peakThrust !== undefined
  const results = high.map((field) => {
    const value = setup[field] ?? 0
    const asks = `${limits[field]} of ${quantity(value, '%')}`
    return isAbove(value, peak)
      ? stop([atSetup(field)], `${asks} is ${about(value - peak)} points above the ${about(peak, value)} % that the unit can do at most.`, { value, peak, rated })
      : aboveRated(asks, field, value, rated, setup)
  })
  return open ? [...results, unknown('Thrust limits', ['nameplate.ratedThrust'], high.map(atSetup))] : results
}

function aboveRated(asks: string, field: LimitField, value: number, rated: number, { overloadLevel, overloadTime }: Setup): CheckResult {
  const more = `${asks} is ${about(value - rated)} points more than the unit stands without end`
  const at = [atSetup(field)]
  if (overloadLevel === undefined && overloadTime === undefined) {
    return warn(at, `${more}, and neither an overload level nor an overload time ends it.`, { value, rated })
  }
  const level = overloadLevel === undefined ? '' : ` above ${quantity(overloadLevel, '%')}`
  const time = overloadTime === undefined ? '' : ` after ${quantity(overloadTime, 'ms')}`
  return note(at, `${more}: the overload ends it${level}${time}.`,
    { value, rated, ...overloadLevel === undefined ? {} : { overloadLevel }, ...overloadTime === undefined ? {} : { overloadTime } })
}
