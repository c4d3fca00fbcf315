import { isUnused } from '../settings/move-fields'
import type { Move } from '../settings/types'
import { plus } from './exact'
import { onceFor } from './once'

/** A used row and where it stands in the table. */
export interface Row { readonly move: Move, readonly index: number }

/** Rows that are in use, in the order of the table; nearly every rule asks for them. */
export const usedRows = onceFor((moves: readonly Move[]): readonly Row[] => {
  const rows: Row[] = []
  moves.forEach((move, index) => {
    if (!isUnused(move)) rows.push({ move, index })
  })
  return rows
})

/** Rows by their numbers; of several with one number the last. */
export const rowsByNumber = onceFor((rows: readonly Row[]): ReadonlyMap<number, Row> => new Map(rows.map(row => [row.move.move, row])))

/** Numbers that a used row names in `next`: rows that start by themselves. */
export const followers = onceFor((rows: readonly Row[]): ReadonlySet<number> => {
  const named = new Set<number>()
  for (const { move: { next } } of rows) if (next !== undefined) named.add(next)
  return named
})

/** Where a row starts, as far as the rows that name it tell. */
export interface Starts {
  /** Lowest and highest start in mm or deg; one where they are the same, none where no row tells. */
  readonly positions: readonly number[]
  /** A row that names it ends nobody knows where. */
  readonly open: boolean
}

interface Reach { low: number, high: number, open: boolean }

/**
 * Starts by move number: the end of each row that names the row in `next`; a press ends at its target, the furthest it
 * can get. A row that nobody names has no entry. Relative rows pass on start + distance, and a loop that does not come
 * back to its place is gone round once.
 */
export const knownStarts = onceFor((rows: readonly Row[]): ReadonlyMap<number, Starts> => {
  const named = followers(rows)
  if (named.size === 0) return new Map()
  const reached = new Map<number, Reach>([...named].map(number => [number, { low: Infinity, high: -Infinity, open: false }]))
  const loops = endlessChains(rows)
  for (const { move } of leadingIn(rows, new Set(loops.flat()))) passOn(move, reached)
  for (const loop of loops) for (const { move } of onceRound(loop, reached)) passOn(move, reached)
  return new Map([...reached].map(([number, { low, high, open }]) =>
    [number, { positions: low > high ? [] : low === high ? [low] : [low, high], open }]))
})

/** Tells the row that follows `move` where it starts. */
function passOn(move: Move, reached: ReadonlyMap<number, Reach>): void {
  const follower = move.next === undefined ? undefined : reached.get(move.next)
  if (!follower) return
  const from = move.kind === 'relative' ? reached.get(move.move) : { low: 0, high: 0, open: false }
  if (!from || from.open) follower.open = true
  if (!from || from.low > from.high) return
  follower.low = Math.min(follower.low, plus(from.low, move.target))
  follower.high = Math.max(follower.high, plus(from.high, move.target))
}

/** Rows outside loops, each behind all rows that name it. */
function leadingIn(rows: readonly Row[], looping: ReadonlySet<Row>): Row[] {
  const byNumber = rowsByNumber(rows)
  const waitingFor = new Map<number, number>()
  for (const { move: { next } } of rows) if (next !== undefined) waitingFor.set(next, (waitingFor.get(next) ?? 0) + 1)
  const ready = rows.filter(row => !waitingFor.has(row.move.move))
  for (const { move: { next } } of ready) {
    const follower = next === undefined ? undefined : byNumber.get(next)
    if (!follower || looping.has(follower)) continue
    const left = (waitingFor.get(follower.move.move) ?? 0) - 1
    waitingFor.set(follower.move.move, left)
    if (left === 0) ready.push(follower)
  }
  return ready
}

/** The order in which rows of a loop tell their followers: from a place of its own all round, else from where it is entered. */
function onceRound(loop: readonly Row[], reached: ReadonlyMap<number, Reach>): readonly Row[] {
  const fixed = loop.findIndex(({ move }) => move.kind !== 'relative')
  if (fixed >= 0) return turned(loop, fixed)
  const entered = loop.findIndex(({ move }) => {
    const start = reached.get(move.move)
    return start !== undefined && (start.open || start.low <= start.high)
  })
  const round = turned(loop, Math.max(0, entered))
  const comesBack = loop.reduce((net, { move }) => plus(net, move.target), 0) === 0
  return comesBack ? [...round, ...round] : round.slice(0, -1)
}

/** Rows that follow each other without end, each loop once, from its lowest number on. */
export const endlessChains = onceFor((rows: readonly Row[]): readonly (readonly Row[])[] => {
  if (followers(rows).size === 0) return []
  const byNumber = rowsByNumber(rows)
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
})

function fromLowest(loop: readonly Row[]): Row[] {
  const lowest = Math.min(...loop.map(row => row.move.move))
  return turned(loop, loop.findIndex(row => row.move.move === lowest))
}

/** The same loop, told from its row at `first` on. */
export function turned(loop: readonly Row[], first: number): Row[] {
  return [...loop.slice(first), ...loop.slice(0, first)]
}
