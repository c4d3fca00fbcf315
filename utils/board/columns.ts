import { createSortedRowModel, rowSortingFeature, tableFeatures, type ColumnDef, type Row } from '@tanstack/vue-table'
import type { BoardAxis } from '#shared/api/board'
import { weights } from '#shared/settings/types'
import { waitsFor } from '~/utils/board/waits'

const collator = new Intl.Collator('en', { numeric: true, sensitivity: 'base' })

/** Z2 before Z10; numbers by size. */
function natural<Features extends typeof boardFeatures>(a: Row<Features, BoardAxis>, b: Row<Features, BoardAxis>, column: string): number {
  const [left, right] = [a.getValue(column), b.getValue(column)]
  return typeof left === 'number' && typeof right === 'number' ? left - right : collator.compare(String(left), String(right))
}

export const boardFeatures = tableFeatures({ rowSortingFeature, sortedRowModel: createSortedRowModel() })

/** How far off: not known at all first, then by counts of harm, motion and text. */
function farness(axis: BoardAxis): number {
  if (axis.status === 'never-read') return 3e9
  if (axis.status === 'unmarked') return 2e9
  return weights.reduce((sum, weight) => sum * 1000 + Math.min(axis.off[weight], 999), 0)
}

const gravity = ({ checks }: BoardAxis) => ((Math.min(checks.stop, 99) * 100 + Math.min(checks.warn, 99)) * 100 + Math.min(checks.unknown, 99)) * 100 + Math.min(checks.note, 99)

export interface BoardColumn { readonly id: string, readonly head: string, readonly value: (axis: BoardAxis) => string | number | undefined, readonly end?: true, readonly worstFirst?: true }

/** Everything the board's table can be sorted by, in the order in which it stands. */
export const boardColumns: readonly BoardColumn[] = [
  { id: 'tag', head: 'Tag', value: axis => axis.tag },
  { id: 'state', head: 'Against known-good', value: farness, worstFirst: true },
  { id: 'role', head: 'Role', value: axis => axis.role || undefined },
  { id: 'machine', head: 'Machine', value: axis => axis.machine },
  { id: 'line', head: 'Line', value: axis => `${axis.site} ${axis.line}` },
  { id: 'unit', head: 'Unit fitted', value: axis => axis.serial ?? undefined },
  { id: 'model', head: 'Model', value: axis => axis.model ?? undefined },
  { id: 'upload', head: 'Last upload', value: axis => axis.lastUploadAt ?? undefined, end: true, worstFirst: true },
  { id: 'good', head: 'Known-good', value: axis => axis.knownGood?.number, end: true },
  { id: 'age', head: 'Age', value: axis => axis.knownGood?.at, end: true },
  { id: 'checks', head: 'Checks', value: gravity, worstFirst: true },
  { id: 'waits', head: 'Waits for', value: axis => waitsFor(axis)?.words },
]

export const columnDefinitions: ColumnDef<typeof boardFeatures, BoardAxis>[] = boardColumns.map(column => ({
  id: column.id,
  accessorFn: column.value,
  sortFn: natural,
  sortUndefined: 'last',
  sortDescFirst: column.worstFirst ?? false,
}))
