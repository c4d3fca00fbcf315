import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { diffContents } from '../../../../shared/diff/diff'
import { diffRenumbered } from '../../../../shared/diff/renumber'
import { countByWeight, heaviest } from '../../../../shared/diff/summary'
import { emptyContent } from '../../../../shared/settings/content'
import type { Move } from '../../../../shared/settings/types'
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

  it('counts a row that is new or gone once, of its heaviest weight, and an edited row field by field', () => {
    const row = (move: number, target: number, more: Partial<Move> = {}): Move => ({ move, kind: 'absolute', target, speed: 100, acceleration: 1000, ...more })
    const was = { ...before, moves: [row(0, 5), row(1, 60)] }
    const is = { ...before, moves: [row(0, 5), row(1, 70, { label: 'Over lid' }), row(2, 90, { label: 'New' })], zones: [{ zone: 1, from: 0, to: 10 }] }
    expect(countByWeight(diffContents(was, is))).toEqual({ harm: 2, motion: 1, text: 1 })
    expect(countByWeight(diffContents(is, was))).toEqual({ harm: 2, motion: 1, text: 1 })
  })

  it('counts a renumbered reading likewise: a row put in moves the others and changes none', () => {
    const row = (move: number, target: number): Move => ({ move, kind: 'absolute', target, speed: 100, acceleration: 1000 })
    const was = { ...before, moves: [row(0, 5), row(1, 60), row(2, 30), row(3, 80)] }
    const is = { ...before, moves: [row(0, 5), row(1, 12), row(2, 60), row(3, 30), row(4, 80)] }
    expect(countByWeight(diffRenumbered(was, is)?.changes ?? [])).toEqual({ harm: 1, motion: 0, text: 0 })
    expect(countByWeight(diffContents(was, is)).motion).toBe(3)
  })

  it('counts fields that a row gained or lost one by one, as long as the row stays', () => {
    const row: Move = { move: 1, kind: 'absolute', target: 60, speed: 100, acceleration: 1000 }
    const rich: Move = { ...row, label: 'Over lid', comment: 'slow', window: 0.1 }
    expect(countByWeight(diffContents({ ...before, moves: [row] }, { ...before, moves: [rich] }))).toEqual({ harm: 0, motion: 1, text: 2 })
    expect(countByWeight(diffContents({ ...before, moves: [rich] }, { ...before, moves: [row] }))).toEqual({ harm: 0, motion: 1, text: 2 })
  })

  it('tells the row that is gone from the one that has its number and is edited', () => {
    const row = (move: number, target: number, speed = 100): Move => ({ move, kind: 'absolute', target, speed, acceleration: 1000 })
    const was = { ...before, moves: [row(0, 5), row(1, 11), row(2, 12), row(3, 60), row(4, 30), row(5, 80)] }
    const is = { ...before, moves: [row(0, 5), row(1, 60), row(2, 30, 90), row(3, 80)] }
    const changes = diffRenumbered(was, is)?.changes ?? []
    expect(changes.filter(change => change.at.startsWith('/moves/2/')).map(change => change.field)).toEqual(['kind', 'target', 'speed', 'acceleration', 'speed'])
    expect(countByWeight(changes)).toEqual({ harm: 2, motion: 1, text: 0 })
  })

  it('never counts more than there are, and none only where there is none', () => {
    fc.assert(fc.property(arbitraryContent(), arbitraryContent(), (a, b) => {
      const all = diffContents(a, b)
      const { harm, motion, text } = countByWeight(all)
      expect(harm + motion + text).toBeLessThanOrEqual(all.length)
      expect(harm + motion + text === 0).toBe(all.length === 0)
      expect(heaviest(all)).toBe(all[0]?.weight)
    }), { numRuns: 50 })
  })
})
