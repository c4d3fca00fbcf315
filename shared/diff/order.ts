import type { Weight } from '../settings/types'
import type { FieldChange } from './types'

/** Harm first, then motion, then text; within a weight the order they came in. */
export function byWeight(changes: readonly FieldChange[]): FieldChange[] {
  const sorted: Record<Weight, FieldChange[]> = { harm: [], motion: [], text: [] }
  for (const change of changes) sorted[change.weight].push(change)
  return sorted.harm.concat(sorted.motion, sorted.text)
}
