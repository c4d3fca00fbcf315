import type { ExtraValue } from '../settings/types'
import { answers } from './answers'
import { anyValue, fieldWords, quantity, sentence } from './format'
import { placesOf, type Place } from './site-places'
import type { CheckResult, JudgeInput, Rule, SiteRule } from './types'

const { stop, unknown } = answers('site-rule')

export const siteRule: Rule = {
  id: 'site-rule',
  title: 'Rules of the site',
  reason: 'Somebody here has learnt what this machine stands and wrote it down; the unit alone would allow more.',
  formula: 'min <= value <= max, value = fixed, as the site, the machine or the axis says',
  levels: ['stop', 'unknown'],
  applies: ({ rules }) => rules.length > 0,
  judge: input => input.rules.flatMap(rule => judgeRule(input, rule)),
}

function judgeRule({ content }: JudgeInput, rule: SiteRule): CheckResult[] {
  const places = placesOf(content, rule.field)
  if (places === undefined) return [unknown(`A rule of this ${rule.scope}`, [rule.field], [], { ruleId: rule.id })]
  const unit = fieldWords(rule.field, content.axisKind)?.unit ?? ''
  return places.flatMap(place => broken(rule, place, place.unit ?? unit))
}

function broken(rule: SiteRule, place: Place, unit: string): CheckResult[] {
  const { min, max, fixed, scope } = rule
  const { value } = place
  const results: CheckResult[] = []
  const say = (text: string, bound: Record<string, number | string>) => results.push(stop([place.at],
    `${sentence(place.words)} ${anyValue(value, unit)} ${text} on this ${scope}: ${reason(rule)}`,
    { ruleId: rule.id, ...place.row, value: flat(value), ...bound }))
  if (fixed !== undefined && value !== fixed) say(`is not the ${anyValue(fixed, unit)} set`, { fixed: flat(fixed) })
  if (typeof value !== 'number') {
    if (min !== undefined || max !== undefined) say('is no number, as it has to be', {})
    return results
  }
  if (min !== undefined && value < min) say(`is below the ${quantity(min, unit)} asked`, { min })
  if (max !== undefined && value > max) say(`is above the ${quantity(max, unit)} allowed`, { max })
  return results
}

type Bare = Exclude<ExtraValue, object>

function flat(value: Bare): number | string {
  return typeof value === 'boolean' ? String(value) : value
}

/** The reason as it was written, with one full stop. */
function reason(rule: SiteRule): string {
  return `${rule.reason.trim().replace(/\.$/, '')}.`
}
