import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { contentOf, emptyContent, sortContent } from '../../../../shared/settings/content'
import { exampleFiles, pressExample } from '../../../../shared/settings/examples'
import { arbitraryContent } from '../../../support/arbitrary-content'

describe('emptyContent', () => {
  it.each(['linear', 'rotary'] as const)('has every key for a %s axis', (axisKind) => {
    expect(emptyContent(axisKind)).toStrictEqual({ axisKind, extra: {}, moves: [], setup: {}, zones: [] })
  })
})

describe('contentOf', () => {
  it('leaves out who, when, the note and the readings', () => {
    for (const file of exampleFiles) {
      expect(Object.keys(contentOf(file)).sort()).toEqual(['axisKind', 'extra', 'moves', 'setup', 'zones'])
    }
  })

  it('does not change with them', () => {
    const other = { ...pressExample, unit: { serial: 'X', model: 'Y' }, exportedAt: '2027-01-01T00:00:00Z', note: 'other', readings: { cycles: 1 } }
    expect(contentOf(other)).toEqual(contentOf(pressExample))
  })

  it('has rows in order, whatever their order in the file', () => {
    const shuffled = { ...pressExample, moves: [...pressExample.moves].reverse(), zones: [...pressExample.zones].reverse() }
    expect(contentOf(shuffled)).toEqual(contentOf(pressExample))
  })
})

describe('sortContent', () => {
  it('puts any permutation of rows back, and does it once', () => {
    const permuted = arbitraryContent().chain(content => fc.tuple(
      fc.constant(content),
      fc.shuffledSubarray([...content.moves], { minLength: content.moves.length }),
      fc.shuffledSubarray([...content.zones], { minLength: content.zones.length }),
    ))
    fc.assert(fc.property(permuted, ([content, moves, zones]) => {
      const sorted = sortContent({ ...content, moves, zones })
      expect(sorted).toEqual(content)
      return sortContent(sorted) === sorted
    }))
  })

  it('leaves its argument as it was', () => {
    const moves = [...pressExample.moves].reverse()
    const content = { ...contentOf(pressExample), moves }
    sortContent(content)
    expect(content.moves).toBe(moves)
    expect(moves.map(move => move.move)).toEqual([7, 3, 2, 1, 0])
  })
})
