import type { FieldChange } from './types'

/** Harm first, then motion, then text; within a weight the order they came in. The very array where all are of one weight. */
export function byWeight(changes: FieldChange[]): FieldChange[] {
  if (changes.every(change => change.weight === changes[0]?.weight)) return changes
  const harm: FieldChange[] = []
  const motion: FieldChange[] = []
  const text: FieldChange[] = []
  for (const change of changes) (change.weight === 'harm' ? harm : change.weight === 'motion' ? motion : text).push(change)
  return harm.concat(motion, text)
}

/** By weight what comes before the moves, the moves and what comes behind; the moves are in order already, and mostly all there is. */
export function inOrder(first: readonly FieldChange[], moves: FieldChange[], last: readonly FieldChange[]): FieldChange[] {
  return first.length + last.length === 0 ? moves : byWeight([...first, ...moves, ...last])
}
