import { byWeight } from './order'
import { pairsInOrder, rowsOf } from './runs'
import { otherKindOf, swapSides } from './swap-sides'
import { sections, type FieldChange, type RenumberedReading, type RowPair } from './types'

/** The flat reading the other way round: invertFlat(diffContents(a, b)) = diffContents(b, a) in one context. */
export function invertFlat(changes: readonly FieldChange[]): FieldChange[] {
  const kind = otherKindOf(changes)
  const zones = indexInFirst(changes, 'zone', 'from')
  const moves = indexInFirst(changes, 'move', 'kind')
  return changes.map((change) => {
    if (change.section === 'zone') return swapSides(change, kind, zones(change))
    return change.section === 'move' ? swapSides(change, kind, moves(change)) : swapSides(change, kind)
  })
}

/** The renumbered reading the other way round, equal to the one that is found between the exchanged contents. */
export function invertRenumbered({ renumbered, pairs, changes }: RenumberedReading): RenumberedReading {
  const kind = otherKindOf(changes)
  const zones = indexInFirst(changes, 'zone', 'from')
  const rows = new PairedRows(pairs)
  const turned = changes.map((change) => {
    if (change.section === 'zone') return { change: swapSides(change, kind, zones(change)), gone: false }
    if (change.section === 'move') return turnMove(change, rows)
    const { affects, ...rest } = swapSides(change, kind)
    return { change: affects ? { ...rest, affects: rows.inFirst(affects) } : rest, gone: false }
  })
  return {
    renumbered: renumbered.map(({ first, last, by, sure }) => ({ first: first + by, last: last + by, by: 0 - by, sure })).sort((a, b) => a.first - b.first),
    pairs: pairsInOrder(pairs.map(exchanged)),
    changes: byWeight(turned.sort(inTableOrder).map(({ change }) => change)),
  }

  function turnMove(change: FieldChange, paired: PairedRows): Turned {
    const { before, after } = paired.pairOf(change)
    const swapped = swapSides(change, kind, () => paired.indexOf(before))
    return { change: { ...swapped, row: before ?? after }, gone: before === undefined }
  }
}

/** A change with whether its row is gone on the new second side. */
interface Turned { readonly change: FieldChange, readonly gone: boolean }

/** Section, row, and of two rows with one number the one that is gone first; fields stay in their order. */
function inTableOrder(a: Turned, b: Turned): number {
  return sections.indexOf(a.change.section) - sections.indexOf(b.change.section)
    || (a.change.row ?? 0) - (b.change.row ?? 0) || Number(b.gone) - Number(a.gone)
}

/** From the index of a row that stays in the second table to that in the first: rows added before it do not count, rows gone do. */
function indexInFirst(changes: readonly FieldChange[], section: 'zone' | 'move', neededField: string): (change: FieldChange) => (index: number) => number {
  const whole = changes.filter(change => change.section === section && change.field === neededField)
  const gone = whole.filter(change => change.after === undefined)
  const added = whole.filter(change => change.before === undefined)
  return ({ row = 0, after }) => (index) => {
    const below = (rows: readonly FieldChange[]) => rows.filter(change => (change.row ?? 0) < row).length
    return after === undefined ? index : index + below(gone) - below(added)
  }
}

function exchanged({ before, after }: RowPair): RowPair {
  return { ...after === undefined ? {} : { before: after }, ...before === undefined ? {} : { after: before } }
}

class PairedRows {
  private readonly first: readonly RowPair[]
  private readonly byAfter: ReadonlyMap<number | undefined, RowPair>

  constructor(pairs: readonly RowPair[]) {
    this.first = rowsOf(pairs, 'before')
    this.byAfter = new Map(pairs.map(pair => [pair.after, pair]))
  }

  /** The pair that a change is in: by its row in the second content, by its index in the first where the value is gone. */
  pairOf(change: FieldChange): RowPair {
    return (change.after === undefined ? this.first[Number(change.at.split('/')[2])] : this.byAfter.get(change.row)) ?? {}
  }

  indexOf(before: number | undefined): number {
    return this.first.findIndex(pair => pair.before === before)
  }

  inFirst(numbers: readonly number[]): number[] {
    return numbers.map(number => this.byAfter.get(number)?.before ?? number).sort((a, b) => a - b)
  }
}
