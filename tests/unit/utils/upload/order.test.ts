import { describe, expect, it } from 'vitest'
import { groupOf, inOrder, quietByMachine } from '../../../../utils/upload/order'
import { change, check, listed, placed, read } from './files'

const stop = listed(placed('CAS-01.Z', { changes: [change('harm')], checks: [check('stop')] }))
const watched = listed(placed('LID-01.Z', { changes: [change('harm')], checks: [check('warn')] }))
const unreadable = listed({ state: 'unreadable', errors: [], more: 0 }, 'cas-01-y.csv')
const unknown = listed({ state: 'unplaced', read, problem: 'serial-unknown', tag: null }, 'new-unit.json')
const motion = listed(placed('FIL-01.D3', { changes: [change('motion', false)] }))
const text = listed(placed('LID-04.X', { changes: [change('text')] }))
const same = listed(placed('LID-02.G', { sameAsKnownGood: true, changes: [change('harm', false, 'homeOffset')] }))
const seen = listed(placed('LID-02.C', { identical: true }))
const twin = listed({ state: 'twin', of: 'lid-02-c.json' }, 'copy of lid-02-c.json')

describe('order of the files', () => {
  it('is stop, watched, unreadable, unknown, then the quiet ones from motion to twins', () => {
    const wanted = [stop, watched, unreadable, unknown, motion, text, same, seen, twin]
    expect(inOrder([...wanted].reverse())).toEqual(wanted)
  })

  it('counts figures in tags as numbers', () => {
    const tags = ['LID-10.Z', 'LID-2.Z', 'LID-1.Z'].map(tag => listed(placed(tag, { identical: true })))
    expect(inOrder(tags).map(file => file.reading.state === 'placed' && file.reading.axis.tag)).toEqual(['LID-1.Z', 'LID-2.Z', 'LID-10.Z'])
  })

  it('asks nothing about the first version of an axis, nor about an old stop in a file seen again', () => {
    expect(groupOf(placed('A', { base: null, changes: [change('harm')] }))).toBe('quiet')
    expect(groupOf(placed('A', { identical: true, checks: [check('stop')] }))).toBe('quiet')
  })

  it('asks about a stop even in the first version', () => {
    expect(groupOf(placed('A', { base: null, checks: [check('stop')] }))).toBe('stop')
  })
})

describe('the quiet ones of a long list', () => {
  it('stand one row a machine, every file once', () => {
    const files = ['LID-02.C', 'LID-10.Z', 'LID-02.G'].map(tag => listed(placed(tag)))
    const rows = quietByMachine([...files, twin])
    expect(rows.map(row => [row.line, row.files.length])).toEqual([['left out', 1], ['LID-02', 2], ['LID-10', 1]])
  })
})
