import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { diffContents } from '../../../../shared/diff/diff'
import { countByWeight, heaviest } from '../../../../shared/diff/summary'
import { emptyContent } from '../../../../shared/settings/content'
import { arbitraryContent } from '../../../support/arbitrary-content'

describe('a summary of changes', () => {
  const before = emptyContent('linear')
  const changes = diffContents(before, { ...before, setup: { jogSpeed: 1, jerk: 2 }, extra: { a: 1 } })

  it('counts by weight, zeros too', () => {
    expect(countByWeight(changes)).toEqual({ harm: 1, motion: 2, text: 0 })
    expect(countByWeight([])).toEqual({ harm: 0, motion: 0, text: 0 })
  })

  it('names the heaviest weight that occurs', () => {
    expect(heaviest(changes)).toBe('harm')
    expect(heaviest(changes.filter(change => change.weight === 'motion'))).toBe('motion')
    expect(heaviest([])).toBeUndefined()
  })

  it('counts every change once', () => {
    fc.assert(fc.property(arbitraryContent(), arbitraryContent(), (a, b) => {
      const all = diffContents(a, b)
      const { harm, motion, text } = countByWeight(all)
      expect(harm + motion + text).toBe(all.length)
      expect(heaviest(all)).toBe(all[0]?.weight)
    }), { numRuns: 50 })
  })
})
