/*
 * Numbered balloons over a rule: those that would touch stand one above the other, at most `rows` high; what finds no room
 * is folded to a count at its place, and named in the list beside the picture.
 */

export interface Stackable { readonly move: number, readonly px: number, readonly changed: boolean }
export interface Stacked<Item> { readonly item: Item, readonly row: number }
export interface Crowd { readonly px: number, readonly moves: readonly number[] }
export interface Stack<Item> { readonly placed: readonly Stacked<Item>[], readonly crowds: readonly Crowd[], readonly rows: number }

export function stackBalloons<Item extends Stackable>(items: readonly Item[], apart: number, rows: number, crowdApart: number): Stack<Item> {
  const taken: number[][] = []
  const placed: Stacked<Item>[] = []
  const left: Item[] = []
  const byRank = [...items].sort((a, b) => Number(b.changed) - Number(a.changed) || a.px - b.px || a.move - b.move)
  for (const item of byRank) {
    const row = Array.from({ length: rows }, (_, index) => index).find(index => (taken[index] ?? []).every(px => Math.abs(px - item.px) >= apart))
    if (row === undefined) left.push(item)
    else {
      taken[row] = [...(taken[row] ?? []), item.px]
      placed.push({ item, row })
    }
  }
  return { placed, crowds: crowdsOf(left, crowdApart), rows: taken.length }
}

function crowdsOf(items: readonly Stackable[], apart: number): Crowd[] {
  const groups: Stackable[][] = []
  for (const item of [...items].sort((a, b) => a.px - b.px)) {
    const group = groups[groups.length - 1]
    if (group && item.px - (group[0]?.px ?? 0) < apart) group.push(item)
    else groups.push([item])
  }
  return groups.map(group => ({ px: middle(group.map(item => item.px)), moves: group.map(item => item.move).sort((a, b) => a - b) }))
}

const middle = (values: readonly number[]) => (Math.min(...values) + Math.max(...values)) / 2

export interface Interval { readonly move: number, readonly from: number, readonly to: number }
export interface Lanes<Item> { readonly placed: readonly { readonly item: Item, readonly lane: number }[], readonly folded: readonly Item[][], readonly count: number }

/** Presses share a lane where they don't touch; a knot of more than `most` that overlap is folded to one bar with a count. */
export function laneIntervals<Item extends Interval>(items: readonly Item[], most: number, air: number): Lanes<Item> {
  const left = (item: Interval) => Math.min(item.from, item.to) - air
  const right = (item: Interval) => Math.max(item.from, item.to)
  const knots: Item[][] = []
  let reach = -Infinity
  for (const item of [...items].sort((a, b) => left(a) - left(b) || a.move - b.move)) {
    if (left(item) < reach) knots[knots.length - 1]?.push(item)
    else knots.push([item])
    reach = Math.max(reach, right(item))
  }
  const placed: { item: Item, lane: number }[] = []
  const folded: Item[][] = []
  for (const knot of knots) {
    const ends: number[] = []
    const inLanes = knot.map((item) => {
      const free = ends.findIndex(end => end <= left(item))
      const lane = free < 0 ? ends.length : free
      ends[lane] = right(item)
      return { item, lane }
    })
    if (ends.length > most) folded.push(knot)
    else placed.push(...inLanes)
  }
  const lanes = placed.map(one => one.lane + 1)
  return { placed, folded, count: Math.max(0, ...lanes, folded.length ? 1 : 0) }
}
