import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { classify, compareSignatures } from '../../../../shared/diff/signature'
import type { Move } from '../../../../shared/settings/types'
import { arbitraryMoveBody } from '../../../support/arbitrary-content'

const move: Move = { move: 3, kind: 'press', target: 150, speed: 100, acceleration: 1000, forceLimit: 30, approach: 140, next: 4, dwell: 200 }
const arbitraryMove = fc.record({ move: fc.nat({ max: 1023 }), body: fc.oneof(arbitraryMoveBody(true), arbitraryMoveBody(true, true)) })
  .map(({ move: number, body }): Move => ({ move: number, ...body }))

describe('what a row does', () => {
  it.each([
    ['its number', { move: 9 }], ['its label', { label: 'Pick' }], ['its comment', { comment: 'slow' }], ['which row follows', { next: 5 }],
  ])('does not hang on %s', (_, other) => {
    expect(compareSignatures(move, { ...move, ...other })).toBe(0)
  })

  it.each([
    ['kind', { kind: 'absolute' }], ['target', { target: 150.000001 }], ['turn', { turn: 'shortest' }], ['speed', { speed: 101 }],
    ['acceleration', { acceleration: 1001 }], ['deceleration', { deceleration: 1000 }], ['forceLimit', { forceLimit: 31 }],
    ['approach', { approach: 139 }], ['pressSpeed', { pressSpeed: 5 }], ['window', { window: 0 }], ['that none follows', { next: undefined }],
    ['dwell', { dwell: 0 }],
  ] as const)('hangs on %s', (_, other) => {
    expect(compareSignatures(move, { ...move, ...other } as Move)).not.toBe(0)
  })

  it('is ordered: turned round, and passed on', () => {
    fc.assert(fc.property(arbitraryMove, arbitraryMove, arbitraryMove, (a, b, c) => {
      expect(Math.sign(compareSignatures(a, b))).toBe(0 - Math.sign(compareSignatures(b, a)))
      if (compareSignatures(a, b) <= 0 && compareSignatures(b, c) <= 0) expect(compareSignatures(a, c)).toBeLessThanOrEqual(0)
    }), { numRuns: 500 })
  })

  it('gets one number for equal rows and another for others', () => {
    fc.assert(fc.property(fc.array(arbitraryMove, { maxLength: 12 }), fc.array(arbitraryMove, { maxLength: 12 }), (a, b) => {
      const { before, after, count } = classify(a, b)
      const all = [...a.map((row, i) => [row, before[i]] as const), ...b.map((row, i) => [row, after[i]] as const)]
      for (const [row, id] of all) for (const [other, otherId] of all) expect(id === otherId).toBe(compareSignatures(row, other) === 0)
      expect(new Set(all.map(([, id]) => id)).size).toBe(count)
    }))
  })

  it('tells apart rows whose 32 bits are the same', () => {
    const far = 2 ** 32 / 1000
    const { before } = classify([{ ...move, target: 0 }, { ...move, target: far }], [])
    expect([...before]).toEqual([0, 1])
  })
})
