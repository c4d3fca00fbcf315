import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { applyFlat } from '../../../../shared/diff/apply'
import { applyRenumbered } from '../../../../shared/diff/apply-renumbered'
import { diffContents } from '../../../../shared/diff/diff'
import { invertFlat, invertRenumbered } from '../../../../shared/diff/invert'
import { diffRenumbered } from '../../../../shared/diff/renumber'
import type { FieldChange } from '../../../../shared/diff/types'
import { weights } from '../../../../shared/settings/types'
import { arbitraryContent, arbitraryPair } from '../../../support/arbitrary-content'

const anyTwo = fc.oneof(arbitraryPair(), fc.tuple(arbitraryContent(), arbitraryContent()))
/** A row comes or goes with its kind: its pointer up to the row is that of a change of kind from or to nothing. */
function isOfComeOrGone(change: FieldChange, changes: readonly FieldChange[]): boolean {
  const row = change.at.slice(0, change.at.lastIndexOf('/'))
  return changes.some(other => other.at === `${row}/kind` && (change.after === undefined
    ? other.after === undefined
    : other.before === undefined && change.before === undefined))
}
const many = { numRuns: 400 }

describe('the flat reading', () => {
  it('leads from the first content to the second', () => {
    fc.assert(fc.property(anyTwo, ([a, b]) => {
      expect(applyFlat(a, diffContents(a, b))).toStrictEqual(b)
    }), many)
  })

  it('is empty between equal contents', () => {
    fc.assert(fc.property(arbitraryContent(), (a) => {
      expect(diffContents(a, structuredClone(a))).toEqual([])
    }), many)
  })

  it('is its own inverse when the contents are exchanged', () => {
    fc.assert(fc.property(anyTwo, ([a, b]) => {
      expect(invertFlat(diffContents(a, b))).toStrictEqual(diffContents(b, a))
    }), many)
  })

  it('comes sorted by weight', () => {
    fc.assert(fc.property(anyTwo, ([a, b]) => {
      const ranks = diffContents(a, b).map(change => weights.indexOf(change.weight))
      expect(ranks).toEqual([...ranks].sort((x, y) => x - y))
    }), many)
  })
})

describe('the renumbered reading', () => {
  it('leads from the first content to the second', () => {
    let told = 0
    fc.assert(fc.property(arbitraryPair({ most: 14 }), ([a, b]) => {
      const reading = diffRenumbered(a, b)
      if (!reading) return
      told += 1
      expect(applyRenumbered(a, reading)).toStrictEqual(b)
    }), { numRuns: 1500 })
    expect(told).toBeGreaterThan(300)
  })

  it('says less than the flat one, or nothing', () => {
    fc.assert(fc.property(arbitraryPair(), ([a, b]) => {
      const reading = diffRenumbered(a, b)
      if (!reading) return
      const flatRows = new Set([...a.moves, ...b.moves].map(row => row.move)).size - a.moves.filter(row => b.moves.some(other => other.move === row.move)).length
      const told = (changes: readonly FieldChange[], comeOrGone: number) =>
        comeOrGone + changes.filter(change => change.section === 'move' && !isOfComeOrGone(change, changes)).length
      const alone = reading.pairs.filter(pair => pair.before === undefined || pair.after === undefined).length
      expect(reading.renumbered.length + told(reading.changes, alone)).toBeLessThan(told(diffContents(a, b), flatRows))
    }), many)
    fc.assert(fc.property(arbitraryContent(), (a) => {
      expect(diffRenumbered(a, a)).toBeUndefined()
    }))
  })

  it('is its own inverse when the contents are exchanged', () => {
    fc.assert(fc.property(arbitraryPair({ most: 14 }), ([a, b]) => {
      const reading = diffRenumbered(a, b)
      expect(reading && invertRenumbered(reading)).toStrictEqual(diffRenumbered(b, a))
    }), { numRuns: 1500 })
  })
})
