import type { ValueBound, ValuesAnswer, ValueStep } from '#shared/api/values'
import { setupField } from '#shared/settings/fields'
import type { ExtraValue } from '#shared/settings/types'
import type { ValuePlace } from '#shared/settings/value-place'
import { counted, sayValue } from '../format'
import { nearLimits, stepWord, type StepLimit, type StepSister, type StepsInput, type StepValue } from '../pictures/steps'
import { changeWords, valueWord, type FieldWords, type WordContext } from './fields'
import { listWords } from './lists'

/** Label and unit of a place, as a change of it is told. */
export function placeFieldWords({ section, field, row }: ValuePlace, context: WordContext): FieldWords {
  return changeWords({ at: '', section, field, ...(row !== undefined && { row }), weight: 'text', watched: false }, context)
}

/** 'Thrust limit', 'Homing speed', 'Target of move 5', 'From of zone 1'. */
export function placeTitle(place: ValuePlace, context: WordContext): string {
  const { label: short } = placeFieldWords(place, context)
  const label = place.section === 'setup' && setupField(place.field)?.group === 'homing' ? `homing ${short}` : short
  const words = place.row === undefined ? label : `${label} of ${place.section} ${place.row}`
  return words.charAt(0).toUpperCase() + words.slice(1)
}

const plain = (field: string, value: ExtraValue | null): StepValue => {
  const amount = typeof value === 'object' && value !== null ? value.value : value ?? undefined
  const word = valueWord(field, amount)
  return word === undefined || typeof word === 'object' ? null : word
}

/** Nobody named a change: it wants someone. The first reading is no change. */
export const unexplained = ({ before, changedBy }: ValueStep): boolean => before !== null && changedBy === null

/** A number for each change, oldest first; the first reading has none. */
export const stepNumber = (steps: readonly ValueStep[], step: ValueStep): number | undefined =>
  step.before === null ? undefined : steps.filter(({ before }) => before !== null).indexOf(step) + 1

const sides = ({ min, max }: ValueBound): { at: number, words: string }[] => min !== undefined && min === max
  ? [{ at: min, words: `only ${sayValue(min)}` }]
  : [...(min === undefined ? [] : [{ at: min, words: `at least ${sayValue(min)}` }]), ...(max === undefined ? [] : [{ at: max, words: `at most ${sayValue(max)}` }])]

const lawgiver = { rule: 'site rule', nameplate: 'nameplate' } as const

function limitsOf(bounds: readonly ValueBound[], until: number): StepLimit[] {
  return bounds.flatMap(bound => sides(bound).map(({ at, words }) => ({ at, from: Date.parse(bound.from), to: bound.to === null ? until : Date.parse(bound.to), label: `${lawgiver[bound.by]}, ${words}` })))
}

/** The steps of an axis that is like the one shown. */
export const sisterOf = (tag: string, { field, steps }: ValuesAnswer): StepSister => ({ tag, points: steps.map(step => ({ at: Date.parse(step.at), value: plain(field, step.value) })) })

/** `LID-01.Z, LID-02.Z 38 %; LID-04.Z 40 %`: what sister axes hold today, those alike together. */
export function sistersToday(sisters: readonly StepSister[], unit: string): string {
  const held = new Map<string, string[]>()
  for (const { tag, points } of sisters) {
    const value = points.at(-1)?.value ?? null
    const word = typeof value === 'number' ? sayValue(value, unit) : stepWord(value)
    held.set(word, [...held.get(word) ?? [], tag])
  }
  return [...held].map(([word, tags]) => `${tags.join(', ')} ${word}`).join('; ')
}

/** The picture of an answer; `cuts` where other units came in. */
export function stepsOf(answer: ValuesAnswer, until: number, zone: string, cuts: StepsInput['cuts'] = []): StepsInput {
  return {
    points: answer.steps.map((step) => {
      const balloon = stepNumber(answer.steps, step)
      return { at: Date.parse(step.at), value: plain(answer.field, step.value), hot: unexplained(step), ...(balloon !== undefined && { balloon }) }
    }),
    until, zone, cuts,
    bands: answer.knownGood.map(({ number, from, to, value }) => ({ from: Date.parse(from), to: to === null ? until : Date.parse(to), value: plain(answer.field, value), label: `known-good v${number}` })),
    limits: limitsOf(answer.bounds, until),
  }
}

/** '3 changes in 15 versions, 1 by nobody named; 2 void versions left out'. */
export function valuesCount({ steps, versions, leftOut }: ValuesAnswer): string {
  const changes = steps.filter(({ before }) => before !== null)
  const open = changes.filter(unexplained).length
  const head = changes.length === 0 ? `never changed in ${counted(versions, 'version', 'versions')}` : `${counted(changes.length, 'change', 'changes')} in ${counted(versions, 'version', 'versions')}`
  return `${head}${open ? `, ${open} by nobody named` : ''}${leftOut ? `; ${counted(leftOut, 'void version', 'void versions')} left out` : ''}`
}

/** What the picture shows, in words. `day` writes an instant as a date of the plant. */
export function valuesSentence(title: string, answer: ValuesAnswer, unit: string, day: (at: string) => string): string {
  if (answer.steps.length === 0) return `${title} was never set.`
  const say = (value: ExtraValue | null, own: string) => {
    const word = plain(answer.field, value)
    return typeof word === 'number' ? sayValue(word, unit || own) : stepWord(word)
  }
  const told = answer.steps.map((step, index) => `${say(step.value, step.unit)} ${index === 0 ? 'from' : 'since'} ${day(step.at)}`)
  const known = answer.knownGood.findLast(({ to }) => to === null)
  const knownTold = known ? ` Known-good is ${say(known.value, '')}, v${known.number}.` : ' No version is marked known-good.'
  const bounds = answer.bounds.filter(({ to }) => to === null).flatMap(bound => sides(bound).map(({ words }) => `${lawgiver[bound.by]}: ${words}`))
  return `${title}: ${told.join(', ')}.${knownTold}${bounds.length ? ` ${bounds.map(words => `${words.charAt(0).toUpperCase()}${words.slice(1)}.`).join(' ')}` : ''}`
}

/** Limits that lie too far off to be drawn, so that they are told; undefined where there are none. */
export function farLimits(input: StepsInput, unit: string): string | undefined {
  const near = new Set(nearLimits(input).map(({ label }) => label))
  const far = [...new Set(input.limits.filter(({ label }) => !near.has(label)).map(({ label }) => label))]
  return far.length === 0 ? undefined : `Too far off to draw: ${listWords(far.map(label => `${label} ${unit}`.trim()))}.`
}
