import { describe, expect, it } from 'vitest'
import { becomes, forecast, headline } from '../../../../utils/upload/becomes'
import { change, listed, placed, read } from './files'

const seen = placed('LID-02.C', { identical: true, base: { number: 7, versionId: 1, name: null }, number: 8 })

describe('what a file becomes', () => {
  it.each([
    ['v9', placed('A', { changes: [change('motion')] }), 'routine'],
    ['v1, the first of this axis, no known-good yet', placed('A', { number: 1, base: null, knownGood: null }), 'routine'],
    ['v9, same as known-good v7', placed('A', { sameAsKnownGood: true }), 'routine'],
    ['a sighting of v7: identical', seen, 'routine'],
    ['v8, nothing changed', seen, 'as-left'],
    ['v8, nothing changed, late: older than v7, does not become current', { ...seen, late: true }, 'as-found'],
    ['v9, its clock runs ahead, the time of receipt counts', placed('A', { clockAhead: true }), 'routine'],
    ['into the tray, as it came', { state: 'unreadable', errors: [], more: 0 }, 'routine'],
    ['into the tray', { state: 'unplaced', read, problem: 'not-fitted', tag: null }, 'routine'],
    ['the vault decides', { state: 'unjudged', read, why: 'no reception' }, 'routine'],
    ['not sent: the same bytes as b.json', { state: 'twin', of: 'b.json' }, 'routine'],
  ] as const)('%s', (words, reading, occasion) => {
    expect(becomes(reading, occasion)).toBe(words)
  })
})

describe('the head', () => {
  const files = [
    ...[1, 2, 3, 4, 5, 6].map(n => listed(placed(`A-${n}`))), listed(seen),
    listed({ state: 'unreadable', errors: [], more: 0 }), listed({ state: 'unplaced', read, problem: 'serial-unknown', tag: null }),
  ]

  it('counts what will happen', () => {
    expect(headline(files, 'routine')).toBe('9 files read. 6 new versions, 1 seen again, 2 for the tray')
  })

  it('says one as one', () => {
    expect(headline([listed(placed('A'))], 'routine')).toBe('1 file read. 1 new version')
  })

  it('counts how far reading has come', () => {
    expect(headline([...files, listed({ state: 'waits' })], 'routine')).toBe('Reading 10 files. 9 read')
  })

  it('counts a file seen again as a version on any other occasion', () => {
    expect(forecast([listed(seen)], 'as-found')).toMatchObject({ versions: 1, seen: 0 })
    expect(forecast([listed(seen)], 'routine')).toMatchObject({ versions: 0, seen: 1 })
  })

  it('names what is twice and what the vault has to judge', () => {
    expect(headline([listed({ state: 'twin', of: 'a' }), listed({ state: 'unjudged', read, why: 'no reception' })], 'routine')).toBe('2 files read. 1 for the vault to judge, 1 twice in the list')
  })
})
