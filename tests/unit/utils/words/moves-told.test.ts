import { describe, expect, it } from 'vitest'
import { diffContents } from '../../../../shared/diff/diff'
import type { FieldChange } from '../../../../shared/diff/types'
import { flatPairs, movesSentence, runWords, tellMoves } from '../../../../utils/words/moves-told'
import { cellsByMove, changeLines } from '../../../../utils/words/rows'
import { after, before } from './lid-press'

const pairs = [{ before: 0, after: 0 }, { before: 1, after: 1 }, { before: 2, after: 2 }, { after: 3 }, { before: 3, after: 4 }, { before: 4, after: 5 }, { before: 5, after: 6 }]
const renumbered = [{ first: 3, last: 5, by: 1, sure: true }]
const flat = diffContents(before, after)
const rowThree = Object.entries(after.moves[3] ?? {}).filter(([field]) => field !== 'move')
  .map(([field, value]): FieldChange => ({ at: `/moves/3/${field}`, section: 'move', row: 3, field, after: value, weight: field === 'label' ? 'text' : 'harm', watched: field !== 'label' }))
const told: FieldChange[] = [...flat.filter(change => change.section !== 'move' || (change.row ?? 0) < 3), ...rowThree]

describe('changeLines', () => {
  it('tells a new row as one line, its heaviest field first', () => {
    const line = changeLines(told).find(one => one.row !== undefined)
    expect(line?.row?.state).toBe('new')
    expect(line?.row?.fields).toHaveLength(rowThree.length)
    expect(line?.change.weight).toBe('harm')
  })
  it('loses no change', () => {
    const total = changeLines(told).reduce((sum, line) => sum + (line.row?.fields.length ?? 1), 0)
    expect(total).toBe(told.length)
  })
  it('keeps a row that went apart from a value that went in the row of the same number', () => {
    const gone: FieldChange[] = [
      { at: '/moves/3/kind', section: 'move', row: 3, field: 'kind', before: 'absolute', weight: 'harm', watched: true },
      { at: '/moves/3/target', section: 'move', row: 3, field: 'target', before: 96.5, weight: 'motion', watched: true },
      { at: '/moves/4/dwell', section: 'move', row: 3, field: 'dwell', before: 120, weight: 'motion', watched: true },
    ]
    expect(changeLines(gone).map(line => line.row?.fields.length ?? 0)).toEqual([2, 0])
    expect([...cellsByMove(gone)].map(([move, cells]) => [move, ...cells.keys()])).toEqual([[3, 'dwell']])
  })
})

describe('tellMoves', () => {
  const moves = tellMoves(before, after, pairs, told, renumbered)
  it('says of each row what became of it', () => {
    expect(moves.rows.map(row => row.state)).toEqual(['same', 'changed', 'changed', 'new', 'moved', 'moved', 'moved'])
    expect(moves.rows[1]?.weight).toBe('motion')
    expect(moves.rows[4]?.run).toBe(0)
  })
  it('counts in one sentence', () => {
    expect(movesSentence(moves, 6, 7)).toBe('7 rows, 6 before: 2 changed, 1 new, 3 under another number, 1 as before')
  })
  it('reads by number where that says as much', () => {
    const table = tellMoves(before, after, flatPairs(before, after), flat, [])
    expect(table.rows.map(row => row.state)).toEqual(['same', 'changed', 'changed', 'changed', 'changed', 'changed', 'new'])
  })
  it('finds nothing between equal tables', () => {
    expect(movesSentence(tellMoves(before, before, flatPairs(before, before), [], []), 6, 6)).toBe('6 rows: 6 as before')
  })
})

describe('runWords', () => {
  it('writes a run, and a single row plainly', () => {
    expect([runWords(3, 7), runWords(4, 4)]).toEqual(['3–7', '4'])
  })
})
