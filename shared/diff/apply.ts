import { setEntries } from '../settings/move-row'
import type { Content, ExtraValue, Move, Zone } from '../settings/types'
import { DiffError } from './error'
import { sameValue } from './measure'
import type { FieldChange } from './types'

/** Values by field, open to change. */
export type Values = Map<string, ExtraValue>

/**
 * The second content out of the first and the flat reading: applyFlat(a, diffContents(a, b)) = b. A row without a field
 * left is gone. Throws `wrong-base` where a value is not the one that the change starts from.
 */
export function applyFlat(base: Content, changes: readonly FieldChange[]): Content {
  const moves = rowsOf(base.moves, 'move')
  for (const change of changes) {
    if (change.section === 'move') applyTo(rowAt(moves, change.row ?? 0), change)
  }
  return { ...applyOutsideMoves(base, changes), moves: rowsFrom<Move>(moves, 'move') }
}

/** Everything but the move table, to which both readings apply alike. */
export function applyOutsideMoves(base: Content, changes: readonly FieldChange[]): Omit<Content, 'moves'> {
  const file: Values = new Map([['axisKind', base.axisKind]])
  const setup = valuesOf(base.setup)
  const extra = valuesOf(base.extra)
  const zones = rowsOf(base.zones, 'zone')
  for (const change of changes) {
    if (change.section === 'file') applyTo(file, change)
    else if (change.section === 'setup') applyTo(setup, change)
    else if (change.section === 'extra') applyTo(extra, change)
    else if (change.section === 'zone') applyTo(rowAt(zones, change.row ?? 0), change)
  }
  return {
    axisKind: file.get('axisKind') as Content['axisKind'],
    extra: Object.fromEntries(extra),
    setup: Object.fromEntries(setup),
    zones: rowsFrom<Zone>(zones, 'zone'),
  }
}

/** Sets or takes away one value; throws `wrong-base` unless the value before is the change's. */
export function applyTo(values: Values, change: FieldChange): void {
  if (!sameValue(values.get(change.field), change.before)) {
    throw new DiffError('wrong-base', `${change.at} does not hold the value that its change starts from.`, { at: change.at })
  }
  if (change.after === undefined) values.delete(change.field)
  else values.set(change.field, change.after)
}

/** What is set in a row or in the setup, as a map; Object.fromEntries takes it back. */
export function valuesOf(record: object): Values {
  return new Map(setEntries(record))
}

/** Rows sorted by number, the key written as `key`; rows without a field are left out. */
export function rowsFrom<Row extends Move | Zone>(rows: ReadonlyMap<number, Values>, key: 'move' | 'zone'): Row[] {
  return [...rows].filter(([, values]) => values.size > 0).sort(([a], [b]) => a - b)
    .map(([number, values]) => ({ [key]: number, ...Object.fromEntries(values) }) as unknown as Row)
}

function rowsOf<Key extends 'move' | 'zone'>(rows: readonly (Readonly<Record<Key, number>>)[], key: Key): Map<number, Values> {
  return new Map(rows.map((row) => {
    const values = valuesOf(row)
    values.delete(key)
    return [row[key], values]
  }))
}

function rowAt(rows: Map<number, Values>, number: number): Values {
  const values = rows.get(number) ?? new Map<string, ExtraValue>()
  rows.set(number, values)
  return values
}
