import { forceBaseOf } from '../motion/force-base'
import { usedRows } from '../motion/chains'
import type { Content } from '../settings/types'
import { answers } from './answers'
import { about, quantity } from './format'
import { atMove, atSetup } from './pointers'
import type { CheckResult, JudgeInput, Rule } from './types'

const { stop, unknown } = answers('force-rescale')

const setupPercents = {
  homingForceLimit: 'homing force limit', thrustLimit: 'thrust limit', thrustLimitPositive: 'thrust limit, positive',
  thrustLimitNegative: 'thrust limit, negative', overloadLevel: 'overload level',
} as const

interface Percent { readonly at: string, readonly words: string, readonly value: number }

export const forceRescale: Rule = {
  id: 'force-rescale',
  title: 'Percentages of another unit',
  reason: 'A percentage brought from a unit with another rated thrust presses with another force, though it reads the same.',
  formula: 'force = % / 100 · base; where the base of the unit that the values come from differs from the base here: stop, until the rescaling is confirmed',
  levels: ['stop', 'unknown'],
  applies: input => input.broughtFrom !== undefined && !input.broughtFrom.rescaled && unchanged(input).length > 0,
  judge,
}

function judge(input: JudgeInput): CheckResult[] {
  const { content, nameplate, broughtFrom } = input
  const from = broughtFrom?.forceBase
  const to = forceBaseOf(nameplate)
  const percents = unchanged(input)
  const at = percents.map(percent => percent.at)
  if (from === undefined || to === undefined) {
    const here = nameplate?.forceBase === 'peak-thrust' ? 'nameplate.peakThrust' : 'nameplate.ratedThrust'
    return [unknown('What the percentages mean', [...from === undefined ? ['force base of the unit before'] : [], ...to === undefined ? [here] : []], at)]
  }
  if (from === to) return []
  const unit = content.axisKind === 'linear' ? 'N' : 'N·m'
  const [first] = percents
  const example = first ? `: ${first.words} ${quantity(first.value, '%')} was ${force(first.value, from)} ${unit} and would be ${force(first.value, to)} ${unit}` : ''
  return [stop(at, `100 % meant ${quantity(from, unit)} on the unit that the values come from and means ${quantity(to, unit)} on this one${example}.`,
    { from, to, factor: from / to })]
}

function force(percent: number, base: number): string {
  return about(percent / 100 * base)
}

/** The percentages that stand as they did on the other unit, rows by their numbers. */
function unchanged({ content, broughtFrom }: JudgeInput): Percent[] {
  const here = percentsOf(content)
  if (!broughtFrom?.content) return here
  const there = new Map(percentsOf(broughtFrom.content).map(({ words, value }) => [words, value]))
  return here.filter(({ words, value }) => there.get(words) === value)
}

/** Every value of a content that is a percentage of the force base, moves by their numbers. */
function percentsOf({ setup, moves }: Content): Percent[] {
  const inSetup = (Object.keys(setupPercents) as (keyof typeof setupPercents)[]).flatMap((field) => {
    const value = setup[field]
    return value === undefined ? [] : [{ at: atSetup(field), words: setupPercents[field], value }]
  })
  const inMoves = usedRows(moves).toSorted((one, other) => one.move.move - other.move.move).flatMap((row) => {
    const { move, forceLimit } = row.move
    return forceLimit === undefined ? [] : [{ at: atMove(row, 'forceLimit'), words: `move ${move} force`, value: forceLimit }]
  })
  return [...inSetup, ...inMoves]
}
