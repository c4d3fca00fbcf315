import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { amount, difference, sameValue, unitBeside } from '../../../../shared/diff/measure'
import { canonicalNumber } from '../../../support/arbitrary-content'

describe('the difference of two numbers', () => {
  it('of canonical ones is the one of their millionths', () => {
    fc.assert(fc.property(canonicalNumber(-1e9, 1e9), canonicalNumber(-1e9, 1e9), (a, b) => {
      const millionths = (x: number) => BigInt(x.toFixed(6).replace('.', ''))
      const exact = millionths(b) - millionths(a)
      expect(difference(a, b, false)).toBe(Number(exact) / 1e6)
      expect(difference(b, a, false)).toBe(0 - difference(a, b, false))
    }))
  })

  it('refuses what is no canonical number', () => {
    expect(() => difference(0.1 + 0.2, 1, false)).toThrow(expect.objectContaining({ code: 'not-canonical' }))
  })

  it('of the drive’s own is exact beyond six decimals', () => {
    expect(difference(1e-9, 3e-9, true)).toBe(2e-9)
    expect(difference(0.1, 0.3, true)).toBe(0.2)
    expect(Object.is(difference(5, 5, true), 0)).toBe(true)
  })
})

describe('values', () => {
  it('have an amount where they are numbers, and the unit that stands beside them', () => {
    expect([5, { value: 6, unit: 'A' }, '7', true, undefined].map(value => [amount(value), unitBeside(value)])).toEqual([
      [5, undefined], [6, 'A'], [undefined, undefined], [undefined, undefined], [undefined, undefined],
    ])
  })

  it('are the same by what they hold', () => {
    expect(sameValue({ value: 1, unit: 'A' }, { value: 1, unit: 'A' })).toBe(true)
    expect(sameValue({ value: 1, unit: 'A' }, { value: 1, unit: 'B' })).toBe(false)
    expect(sameValue({ value: 1, unit: 'A' }, { value: 2, unit: 'A' })).toBe(false)
    expect(sameValue({ value: 1, unit: 'A' }, 1)).toBe(false)
    expect(sameValue('1', 1)).toBe(false)
    expect(sameValue(undefined, undefined)).toBe(true)
  })
})
