import type { Move } from '#shared/settings/types'
import { moveFieldNames, type MoveFieldName } from '#shared/settings/move-fields'
import { fractionOf } from './format'
import { rowWords, type WordContext } from './words/fields'

export interface MoveColumn {
  readonly field: MoveFieldName
  readonly label: string
  readonly unit: string
  /** Digits that the column keeps after the point. */
  readonly fraction: number
}

const always = new Set<MoveFieldName>(['target', 'speed', 'acceleration'])
const apart = new Set<MoveFieldName>(['label', 'kind', 'comment'])

/** The columns that these moves need: what none of them has takes no room. Label, kind and comment stand apart. */
export function moveColumns(moves: readonly Move[], context: WordContext): MoveColumn[] {
  return moveFieldNames.filter(field => !apart.has(field) && (always.has(field) || moves.some(move => move[field] !== undefined))).map((field) => {
    const words = rowWords('move', field, context)
    const unit = field === 'next' ? 'move' : words.unit
    return { field, label: words.label, unit: words.plusMinus ? `± ${unit}` : unit, fraction: fractionOf(moves.map(move => move[field])) }
  })
}
