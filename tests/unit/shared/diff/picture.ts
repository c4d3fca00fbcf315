import { diffContents } from '../../../../shared/diff/diff'
import { diffRenumbered } from '../../../../shared/diff/renumber'
import type { FieldChange, RowPair } from '../../../../shared/diff/types'
import { moveFieldNames, moveFields } from '../../../../shared/settings/move-fields'
import { emptyContent } from '../../../../shared/settings/content'
import type { Content, Move } from '../../../../shared/settings/types'

/*
 * A difference of two move tables as a text, input and expectation in one:
 *
 *     1 → 2 | absolute 10 250→300 2000 next=4⇒5 label=A→–
 *     – → 3 | absolute 75 250 2000
 *     2 → – | absolute 20 250 2000
 *     moves 1–1 became 2–2
 *
 * One line a row of either table: number before and after, then kind, target, speed, acceleration and further fields by
 * name. `→` marks a change, `–` nothing, `⇒` a follower that went along with the row that it calls. Runs stand last.
 */

const leading = ['kind', 'target', 'speed', 'acceleration'] as const
const further = moveFieldNames.filter(name => !leading.some(known => known === name))
type Cell = string | undefined

/** Both contents that a picture shows. */
export function contentsOf(picture: string): readonly [Content, Content] {
  const rows = linesOf(picture).filter(line => line.includes('|')).map(rowOf)
  const side = (index: 0 | 1): Content => ({
    ...emptyContent('linear'),
    moves: rows.flatMap(row => row[index] ?? []).sort((a, b) => a.move - b.move),
  })
  return [side(0), side(1)]
}

/** What the renumbered reading, or the flat one where that says no more, makes of two contents. */
export function pictureOf(before: Content, after: Content): string {
  const reading = diffRenumbered(before, after) ?? { renumbered: [], pairs: pairsByNumber(before, after), changes: diffContents(before, after) }
  const runs = reading.renumbered.map(({ first, last, by, sure }) => `moves ${first}–${last} ${sure ? 'became' : 'may have become'} ${first + by}–${last + by}`)
  return [...reading.pairs.map(pair => lineOf(pair, before, after, reading.changes)), ...runs].join('\n')
}

/** A picture without the spaces that line its columns up. */
export function plain(picture: string): string {
  return linesOf(picture).join('\n')
}

function linesOf(picture: string): string[] {
  return picture.split('\n').map(line => line.trim().replaceAll(/\s+/g, ' ')).filter(line => line !== '')
}

function rowOf(line: string): readonly [Move | undefined, Move | undefined] {
  const [numbers = '', fields = ''] = line.split(' | ')
  const cells = fields.split(' ').map((cell, index): [string, string] => {
    const at = cell.indexOf('=')
    return at < 0 ? [leading[index] ?? cell, cell] : [cell.slice(0, at), cell.slice(at + 1)]
  })
  const [before, after] = numbers.split(' → ').map((number, side) => number === '–'
    ? undefined
    : {
        move: Number(number),
        ...Object.fromEntries(cells.map(([name, text]) => [name, valueOn(side, name, text)]).filter(([, value]) => value !== undefined)),
      } as Move)
  return [before, after]
}

function valueOn(side: number, name: string, text: string): string | number | undefined {
  const sides = text.split(/[→⇒]/)
  const value = sides.length === 2 ? sides[side] : text
  if (value === '–' || value === undefined) return undefined
  return !('unit' in moveFields[name as keyof typeof moveFields]) && name !== 'next' ? value : Number(value)
}

function lineOf(pair: RowPair, before: Content, after: Content, changes: readonly FieldChange[]): string {
  const was = before.moves.find(move => move.move === pair.before)
  const is = after.moves.find(move => move.move === pair.after)
  const cell = (name: keyof Move): Cell => {
    const [from, to] = [was?.[name], is?.[name]].map(value => value === undefined ? undefined : String(value))
    const told = changes.some(change => change.field === name && belongs(change, pair, before))
    if (!was || !is) return told || (from ?? to) === undefined ? from ?? to : `untold:${from ?? to}`
    if (told) return `${from ?? '–'}→${to ?? '–'}`
    return from === to ? from : `${from}⇒${to}`
  }
  const named = further.flatMap((name) => {
    const text = cell(name)
    return text === undefined ? [] : [`${name}=${text}`]
  })
  return `${pair.before ?? '–'} → ${pair.after ?? '–'} | ${[...leading.map(cell), ...named].join(' ')}`
}

/** A change points into the second table by row number, into the first by index where its value is gone. */
function belongs(change: FieldChange, pair: RowPair, before: Content): boolean {
  if (change.after !== undefined) return change.row === pair.after
  return before.moves[Number(change.at.split('/')[2])]?.move === pair.before
}

function pairsByNumber(before: Content, after: Content): RowPair[] {
  const numbers = new Set([...before.moves, ...after.moves].map(move => move.move))
  const holds = (content: Content, number: number) => content.moves.some(move => move.move === number)
  return [...numbers].sort((a, b) => a - b).map(number => ({
    ...holds(before, number) ? { before: number } : {}, ...holds(after, number) ? { after: number } : {},
  }))
}
