import type { DictionaryEntry } from '../settings/nameplate'
import type { AxisFlag, Weight } from '../settings/types'

/** Motion fields of moves weigh harm where the axis carries a load up, presses, or can hit something. */
export function moveWeight(weight: Weight, flags: readonly AxisFlag[]): Weight {
  return weight === 'motion' && flags.length > 0 ? 'harm' : weight
}

/** The dictionary's word on a drive's own key; motion where it says nothing. */
export function extraWeight(entry: DictionaryEntry | undefined): Weight {
  return entry?.weight ?? 'motion'
}
