import type { FieldChange } from '#shared/diff/types'

/*
 * Changes as a reader takes them in: a row of the move or zone table that came or went is one thing, not as many as it
 * has fields. Such a row is told by its `kind` (moves) or `from` (zones), which every row has.
 */

export interface ChangeLine {
  readonly key: string
  /** Heaviest first. */
  readonly change: FieldChange
  /** A whole row that is new or gone, with all of its fields; absent for a single value. */
  readonly row?: { readonly state: 'new' | 'gone', readonly fields: readonly FieldChange[] }
}

const rowOf = (at: string) => /^\/(?:moves|zones)\/\d+/.exec(at)?.[0]
const tellsRow = (change: FieldChange) => (change.section === 'move' && change.field === 'kind') || (change.section === 'zone' && change.field === 'from')

type RowState = 'new' | 'gone'
const stateOf = (change: FieldChange): RowState | undefined =>
  change.before === undefined ? 'new' : change.after === undefined ? 'gone' : undefined

/** Pointer prefix and side of each row that came or went: both tables may have one at the same index. */
function wholeRows(changes: readonly FieldChange[]): Set<string> {
  return new Set(changes.filter(tellsRow).flatMap((change) => {
    const state = stateOf(change)
    return state ? [`${state} ${rowOf(change.at) ?? ''}`] : []
  }))
}

const rowKey = (change: FieldChange) => {
  const state = stateOf(change)
  const row = rowOf(change.at)
  return state && row ? `${state} ${row}` : undefined
}

const rank = { harm: 0, motion: 1, text: 2 } as const

/** Lines in the order of the changes, which come sorted by weight; a whole row stands where its heaviest field does. */
export function changeLines(changes: readonly FieldChange[]): ChangeLine[] {
  const whole = wholeRows(changes)
  const lines = new Map<string, ChangeLine>()
  for (const change of changes) {
    const key = rowKey(change)
    if (key === undefined || !whole.has(key)) {
      lines.set(`${change.section} ${change.row ?? ''} ${change.field} ${change.at}`, { key: `${change.section} ${change.row ?? ''} ${change.field} ${change.at}`, change })
      continue
    }
    const line = lines.get(key)
    const fields = [...(line?.row?.fields ?? []), change]
    const heaviest = line && rank[line.change.weight] <= rank[change.weight] ? line.change : change
    lines.set(key, { key, change: heaviest, row: { state: key.startsWith('new') ? 'new' : 'gone', fields } })
  }
  return [...lines.values()]
}

/** Changes of single fields of moves that stay, by move and field: what the cells of a move table ask. */
export function cellsByMove(changes: readonly FieldChange[]): Map<number, Map<string, FieldChange>> {
  const whole = wholeRows(changes)
  const byMove = new Map<number, Map<string, FieldChange>>()
  for (const change of changes) {
    if (change.section !== 'move' || change.row === undefined || whole.has(rowKey(change) ?? '')) continue
    byMove.set(change.row, (byMove.get(change.row) ?? new Map<string, FieldChange>()).set(change.field, change))
  }
  return byMove
}
