import type { Content, Move } from '../settings/types'
import { applyOutsideMoves, applyTo, rowsFrom, valuesOf, type Values } from './apply'
import { DiffError } from './error'
import { followersOf, type Followers } from './followers'
import type { FieldChange, RenumberedReading, RowPair } from './types'

/**
 * The second content out of the first and a renumbered reading: rows take their new numbers, followers go along, and the
 * changes are made. applyRenumbered(a, diffRenumbered(a, b)) = b. Throws `wrong-base` where rows or values are others.
 */
export function applyRenumbered(base: Content, reading: RenumberedReading): Content {
  const rows = takeRows(base.moves, reading.pairs)
  const told = new Set<Values>()
  for (const change of reading.changes) {
    if (change.section !== 'move') continue
    const row = rowOf(change, rows, base.moves)
    applyTo(row, change)
    if (change.field === 'next') told.add(row)
  }
  const followers = followersOf(reading.pairs)
  for (const row of rows.bySecond.values()) if (!told.has(row)) follow(row, followers)
  return { ...applyOutsideMoves(base, reading.changes), moves: rowsFrom<Move>(rows.bySecond, 'move') }
}

/** The rows by their number in either content; a row that stays is one object in both. */
interface Rows { readonly byFirst: ReadonlyMap<number, Values>, readonly bySecond: ReadonlyMap<number, Values> }

function takeRows(moves: readonly Move[], pairs: readonly RowPair[]): Rows {
  const byFirst = new Map(moves.map(({ move, ...fields }) => [move, valuesOf(fields)]))
  const bySecond = new Map<number, Values>()
  for (const { before, after } of pairs) {
    if (before !== undefined && !byFirst.has(before)) throw new DiffError('wrong-base', `There is no move ${before} to start from.`, { before })
    if (after !== undefined) bySecond.set(after, byFirst.get(before ?? -1) ?? new Map())
  }
  return { byFirst, bySecond }
}

/** A change points into the second content, where its row number counts, or by index into the first where its value is gone. */
function rowOf(change: FieldChange, rows: Rows, moves: readonly Move[]): Values {
  const row = change.after === undefined ? rows.byFirst.get(moves[Number(change.at.split('/')[2])]?.move ?? -1) : rows.bySecond.get(change.row ?? -1)
  if (!row) throw new DiffError('wrong-base', `${change.at} is in no row of the pairs.`, { at: change.at })
  return row
}

function follow(row: Values, followers: Followers): void {
  const next = row.get('next')
  if (typeof next === 'number') row.set('next', followers.mapped(next) ?? next)
}
