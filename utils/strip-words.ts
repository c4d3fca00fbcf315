import { weights, type Weight } from '#shared/settings/types'

export type StripState = 'in-line' | 'off' | 'never-read' | 'unmarked' | 'new'
export type WeightCountsShown = Readonly<Record<Weight, number>>

/** The heaviest weight that counts at least one change; nothing where there is none. */
export function worstWeight(counts: WeightCountsShown): Weight | undefined {
  return weights.find(weight => counts[weight] > 0)
}

/** '6 harm, 2 motion': only what there is. */
export function weightWords(counts: WeightCountsShown): string {
  return weights.filter(weight => counts[weight] > 0).map(weight => `${counts[weight]} ${weight}`).join(', ')
}

/** What a strip says to those who do not see it. */
export function stripWords(state: StripState, counts?: WeightCountsShown, knownGood?: number | null): string {
  if (state === 'in-line') return knownGood ? `in line with known-good v${knownGood}` : 'in line'
  if (state === 'never-read') return 'no upload'
  if (state === 'unmarked') return 'no known-good'
  if (state === 'new') return 'new'
  const words = counts ? weightWords(counts) : ''
  return words ? `off: ${words}` : 'off'
}
