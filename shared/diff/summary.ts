import { weights, type Weight } from '../settings/types'
import type { FieldChange } from './types'

/** How many changes there are of each weight, the zeros too. */
export function countByWeight(changes: readonly FieldChange[]): Record<Weight, number> {
  const counts: Record<Weight, number> = { harm: 0, motion: 0, text: 0 }
  for (const change of changes) counts[change.weight] += 1
  return counts
}

/** The weightiest of the weights that occur; undefined where nothing changed. */
export function heaviest(changes: readonly FieldChange[]): Weight | undefined {
  return weights.find(weight => changes.some(change => change.weight === weight))
}
