import microdiff from 'microdiff'
import { diffContents } from '../shared/diff/diff'
import { diffRenumbered } from '../shared/diff/renumber'
import { canonicalText } from '../shared/settings/canonical'
import { readSettings } from '../shared/settings/read'
import { contentOfText } from '../shared/settings/stored-content'
import type { Content, Move } from '../shared/settings/types'
import { atMost, ratioOf, type Figure } from './figure'
import { fileOf } from './sample-file'

/*
 * What a difference costs, as a ratio to microdiff over the same two contents. Ours are as the product makes them when a file
 * comes in: the first out of the canonical text that is stored, the second out of the file. microdiff's are what its users
 * have: plain objects of JSON.parse, absent keys left out; making either is not in the time. microdiff pairs rows by index and
 * knows no field. On an inserted row both it and the flat reading report every value behind it, and more than half of our time
 * goes into making records, of eleven values where microdiff's have four: weight, unit, delta and percent are worked out for
 * each. So that list has an aim of its own; the renumbered reading, which says it in a run and a row, is what is asked for there.
 */

const aim = 0.15
const aimOfLongList = 0.3

type Table = readonly Move[]

/** Two kinds of rows, each kind with the same fields throughout. */
function alike(move: number): Move {
  const common = { move, label: `Station ${move % 12}`, target: (move * 37 % 1950) / 10, speed: 100 + move * 7 % 400, acceleration: 2000 + move % 5 * 250 }
  if (move % 4 !== 3) return { ...common, kind: 'absolute', window: 0.1 }
  return { ...common, kind: 'press', forceLimit: 30 + move % 40, approach: common.target - 2, deceleration: 2500 }
}

/** As a table that several people wrote over the years: optional fields where somebody needed them, in some forty combinations. */
function mixed(move: number): Move {
  const row = alike(move)
  return {
    ...row,
    ...move % 7 === 2 ? { comment: 'belt running' } : {},
    ...move % 3 === 0 ? { deceleration: 1800 + move % 4 * 100 } : {},
    ...move % 2 === 0 ? { window: 0.25 } : {},
    ...move % 6 === 1 ? { next: move - 1 } : {},
    ...move % 12 === 1 ? { dwell: 40 } : {},
  }
}

/** Another speed in `count` rows that lie evenly in the table. */
const edited = (count: number) => (moves: Table): Table => {
  const chosen = new Set(Array.from({ length: count }, (_, k) => Math.floor((k + 0.5) * moves.length / count)))
  return moves.map((move, index) => chosen.has(index) ? { ...move, speed: move.speed + 5 } : move)
}

/** A row that comes in after the first third; the rest moves on by one. */
function inserted(moves: Table): Table {
  const at = Math.floor(moves.length / 3)
  const row: Move = { move: at, label: 'New', kind: 'absolute', target: 77.25, speed: 333, acceleration: 1234 }
  return [...moves.slice(0, at), row, ...moves.slice(at).map(move => ({ ...move, move: move.move + 1 }))]
}

const cases = [
  { name: '1 change', row: alike, change: edited(1) },
  { name: '5 changes', row: alike, change: edited(5) },
  { name: 'a row inserted', row: alike, change: inserted },
  { name: '1 change, mixed rows', row: mixed, change: edited(1) },
  { name: '5 changes, mixed rows', row: mixed, change: edited(5) },
]

/** Ratios to microdiff for 16, 64 and 256 moves, and what is said of one inserted row. */
export async function measureDiff(): Promise<Figure[]> {
  const figures: Figure[] = []
  for (const { name, row, change } of cases) {
    for (const rows of [16, 64, 256]) {
      const table = Array.from({ length: rows }, (_, move) => row(move))
      const before = contentOfText(canonicalText(contentOf(table)))
      const after = contentOf(change(table))
      const [plainBefore, plainAfter] = [plainOf(before), plainOf(after)]
      const toMicrodiff = (work: (before: Content, after: Content) => unknown) =>
        ratioOf(() => work(before, after), () => microdiff(plainBefore, plainAfter), 15, Math.ceil(16000 / rows))
      figures.push(atMost(change === inserted ? `flat list of a row inserted among ${rows}, an aim of our own` : `flat difference, ${rows} moves, ${name}`, toMicrodiff(diffContents), change === inserted ? aimOfLongList : aim))
      if (rows === 256) figures.push(atMost(`renumbered difference, ${rows} moves, ${name}`, toMicrodiff(diffRenumbered), 2))
      if (change === inserted) figures.push(atMost(`said of a row inserted among ${rows}`, saidOf(before, after), 2, 'runs and rows'))
    }
  }
  return figures
}

const plainOf = (content: Content) => JSON.parse(canonicalText(content)) as unknown[]

/** As it comes out of a file, no object shared with another content. */
function contentOf(moves: Table): Content {
  const outcome = readSettings(fileOf(moves))
  if (!outcome.ok) throw new Error(JSON.stringify(outcome.errors))
  return outcome.value.content
}

/** Runs, rows that come or go, and edits of rows that stay, in the renumbered reading; Infinity where there is none. */
function saidOf(before: Content, after: Content): number {
  const reading = diffRenumbered(before, after)
  if (!reading) return Infinity
  const alone = new Set(reading.pairs.filter(pair => pair.before === undefined || pair.after === undefined).map(pair => pair.after ?? pair.before))
  return reading.renumbered.length + alone.size + reading.changes.filter(change => !alone.has(change.row)).length
}
