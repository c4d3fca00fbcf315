import { isUnused } from '../settings/move-fields'
import type { Move } from '../settings/types'
import { plus } from './exact'

/** A used row and where it stands in the table. */
export interface Row { readonly move: Move, readonly index: number }

/** Rows that are in use, in the order of the table. */
export function usedRows(moves: readonly Move[]): Row[] {
  return moves.flatMap((move, index) => isUnused(move) ? [] : [{ move, index }])
}

/** Numbers that a used row names in `next`: rows that start by themselves. */
export function followers(rows: readonly Row[]): ReadonlySet<number> {
  return new Set(rows.flatMap(({ move }) => move.next === undefined ? [] : [move.next]))
}

/** Where a row starts, as far as the rows that name it tell. */
export interface Starts {
  /** In mm or deg, without doubles. */
  readonly positions: readonly number[]
  /** A row that names it ends nobody knows where. */
  readonly open: boolean
}

/**
 * Starts by move number: the end of each row that names the row in `next`; a press ends at its target, the furthest it
 * can get. A row that nobody names has none. Relative rows pass on start + distance, once round a loop.
 */
export function knownStarts(rows: readonly Row[]): ReadonlyMap<number, Starts> {
  const byNumber = new Map(rows.map(({ move }) => [move.move, move]))
  const named = followers(rows)
  const positions = new Map<number, Set<number>>()
  const open = new Set<number>()
  for (const { move } of rows) {
    if (move.kind === 'relative') {
      if (!named.has(move.move)) walk(move, byNumber, follower => open.add(follower.move))
      continue
    }
    let end = move.target
    walk(move, byNumber, (follower) => {
      const starts = positions.get(follower.move) ?? new Set()
      positions.set(follower.move, starts.add(end))
      end = plus(end, follower.target)
    })
  }
  return new Map([...named].map(number => [number, { positions: [...positions.get(number) ?? []], open: open.has(number) }]))
}

/** Visits what follows `from`, up to the first row that goes to a place of its own or that was visited before. */
function walk(from: Move, byNumber: ReadonlyMap<number, Move>, visit: (follower: Move) => void): void {
  const visited = new Set<number>()
  let follower = next(from, byNumber)
  while (follower !== undefined && !visited.has(follower.move)) {
    visit(follower)
    visited.add(follower.move)
    follower = follower.kind === 'relative' ? next(follower, byNumber) : undefined
  }
}

/** Rows that follow each other without end, each loop once, from its lowest number on. */
export function endlessChains(rows: readonly Row[]): Row[][] {
  const byNumber = new Map(rows.map(row => [row.move.move, row]))
  const settled = new Set<number>()
  const loops: Row[][] = []
  for (const start of rows) {
    const path: Row[] = []
    const onPath = new Map<number, number>()
    let row: Row | undefined = start
    while (row !== undefined && !settled.has(row.move.move)) {
      settled.add(row.move.move)
      onPath.set(row.move.move, path.push(row) - 1)
      row = row.move.next === undefined ? undefined : byNumber.get(row.move.next)
    }
    const entry = row && onPath.get(row.move.move)
    if (entry !== undefined) loops.push(fromLowest(path.slice(entry)))
  }
  return loops
}

function fromLowest(loop: readonly Row[]): Row[] {
  const lowest = Math.min(...loop.map(row => row.move.move))
  const first = loop.findIndex(row => row.move.move === lowest)
  return [...loop.slice(first), ...loop.slice(0, first)]
}

function next(move: Move, byNumber: ReadonlyMap<number, Move>): Move | undefined {
  return move.next === undefined ? undefined : byNumber.get(move.next)
}
