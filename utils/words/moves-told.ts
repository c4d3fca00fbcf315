import type { FieldChange, Renumbering, RowPair } from '#shared/diff/types'
import type { Content, Move, Weight } from '#shared/settings/types'
import { cellsByMove } from './rows'

/*
 * The move tables of two contents as one: each row with its partner, and the runs that only changed their number said in
 * one line.
 */

export interface ToldRow {
  readonly key: string
  readonly was?: Move
  readonly is?: Move
  readonly state: 'same' | 'changed' | 'new' | 'gone' | 'moved'
  readonly weight?: Weight
  readonly cells: ReadonlyMap<string, FieldChange>
  /** Index of the run it belongs to, for rows that only moved. */
  readonly run?: number
}

export interface ToldRun {
  readonly renumbering: Renumbering
  /** Rows of the run that also changed otherwise. */
  readonly changed: number
}

export interface MovesTold { readonly rows: readonly ToldRow[], readonly runs: readonly ToldRun[] }

/** Pairs by number, in order, for the flat reading. */
export function flatPairs(before: Content, after: Content): RowPair[] {
  const [was, is] = [new Set(before.moves.map(move => move.move)), new Set(after.moves.map(move => move.move))]
  return [...new Set([...was, ...is])].sort((a, b) => a - b).map(move => ({ ...(was.has(move) && { before: move }), ...(is.has(move) && { after: move }) }))
}

const heaviest = (changes: Iterable<FieldChange>): Weight | undefined => {
  const found = new Set([...changes].map(change => change.weight))
  return (['harm', 'motion', 'text'] as const).find(weight => found.has(weight))
}

export function tellMoves(before: Content, after: Content, pairs: readonly RowPair[], changes: readonly FieldChange[], renumbered: readonly Renumbering[]): MovesTold {
  const cells = cellsByMove(changes)
  const find = (content: Content, move: number | undefined) => move === undefined ? undefined : content.moves.find(other => other.move === move)
  const runOf = (pair: RowPair) => renumbered.findIndex(run => pair.before !== undefined && pair.after === pair.before + run.by && pair.before >= run.first && pair.before <= run.last)
  const rows = pairs.map((pair): ToldRow => {
    const [was, is] = [find(before, pair.before), find(after, pair.after)]
    const own = (pair.before !== undefined && pair.after !== undefined && cells.get(pair.after)) || new Map<string, FieldChange>()
    const weight = heaviest(own.values())
    const run = runOf(pair)
    const moved = pair.before !== pair.after
    const state = !was ? 'new' : !is ? 'gone' : own.size > 0 ? 'changed' : moved ? 'moved' : 'same'
    return { key: `${pair.before ?? '-'} ${pair.after ?? '-'}`, state, cells: own, ...(was && { was }), ...(is && { is }), ...(weight && { weight }), ...(run >= 0 && { run }) }
  })
  return { rows, runs: renumbered.map((renumbering, index) => ({ renumbering, changed: rows.filter(row => row.run === index && row.state === 'changed').length })) }
}

/** '3–7' or '3'. */
export const runWords = (first: number, last: number) => first === last ? String(first) : `${first}–${last}`

const many = (count: number, word: string) => count === 0 ? [] : [`${count} ${word}`]

/** '9 rows, 8 before: 2 changed, 1 new, 5 under another number, 1 as before'. */
export function movesSentence(told: MovesTold, before: number, after: number): string {
  const count = (state: ToldRow['state']) => told.rows.filter(row => row.state === state).length
  const parts = [...many(count('changed'), 'changed'), ...many(count('new'), 'new'), ...many(count('gone'), 'gone'), ...many(count('moved'), 'under another number'), ...many(count('same'), 'as before')]
  const head = before === after ? `${after} ${after === 1 ? 'row' : 'rows'}` : `${after} ${after === 1 ? 'row' : 'rows'}, ${before} before`
  return parts.length ? `${head}: ${parts.join(', ')}` : head
}
