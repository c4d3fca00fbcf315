import { describe, expect, it } from 'vitest'
import { changesInWords, countsOf, glyphOf, worstLevel } from '../../../../utils/upload/glyph'
import { change, check, placed, read } from './files'

describe('the strip of a file', () => {
  it.each([
    ['identical', placed('A', { identical: true }), { state: 'in-line', label: 'identical' }],
    ['the same as known-good', placed('A', { sameAsKnownGood: true }), { state: 'in-line', label: 'the same as known-good v7' }],
    ['the first', placed('A', { base: null }), { state: 'new' }],
    ['more, harm at worst', placed('A', { changes: [change('text'), change('harm')] }), { state: 'off', weight: 'harm', sense: 'more', label: 'off: 1 harm, 1 text' }],
    ['less', placed('A', { changes: [{ ...change('motion'), delta: -3 }] }), { state: 'off', weight: 'motion', sense: 'less' }],
    ['not readable', { state: 'unreadable', errors: [], more: 0 }, { state: 'never-read', label: 'not readable' }],
    ['axis not known', { state: 'unplaced', read, problem: 'serial-unknown', tag: null }, { state: 'unmarked', label: 'axis not known' }],
    ['being read', { state: 'waits' }, { state: 'unmarked', label: 'being read' }],
  ] as const)('%s', (_, reading, glyph) => expect(glyphOf(reading)).toMatchObject(glyph))

  it('counts by weight', () => expect(countsOf([change('harm'), change('harm'), change('text')])).toEqual({ harm: 2, motion: 0, text: 1 }))
})

describe('the worst check of a file', () => {
  it('is a stop before a warn; notes stay folded', () => {
    expect(worstLevel(placed('A', { checks: [check('warn'), check('stop'), check('stop')] }))).toEqual({ level: 'stop', count: 2 })
    expect(worstLevel(placed('A', { checks: [check('note'), check('warn')] }))).toEqual({ level: 'warn', count: 1 })
    expect(worstLevel(placed('A', { checks: [check('note'), check('unknown')] }))).toBeNull()
  })
  it('is not told of a file seen again, and unknown where there is no axis', () => {
    expect(worstLevel(placed('A', { identical: true, checks: [check('stop')] }))).toBeNull()
    expect(worstLevel({ state: 'unplaced', read, problem: 'not-fitted', tag: null })).toEqual({ level: 'unknown', count: 1 })
  })
})

describe('the changes of a file', () => {
  it('are words where a count says less, and counts otherwise', () => {
    expect(changesInWords(placed('A', { changes: [change('harm', true, 'homeOffset')] }))).toBe('home offset alone')
    expect(changesInWords(placed('A', { changes: [] }))).toBe('nothing')
    expect(changesInWords(placed('A', { base: null }))).toBe('the first')
    expect(changesInWords(placed('A', { changes: [change('harm')] }))).toBeNull()
  })
})
