import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { isAbove, minus, plus, remainder } from '../../../../shared/motion/exact'
import { canonicalNumber } from '../../../support/arbitrary-content'

describe('exact sums', () => {
  it('gives what decimals give where doubles do not', () => {
    expect([plus(0.1, 0.2), minus(212.4, 198), minus(0.3, 0.1), minus(1.1, -0.2)]).toEqual([0.3, 14.4, 0.2, 1.3])
    expect([0.1 + 0.2, 212.4 - 198, 0.3 - 0.1, 1.1 + 0.2]).not.toContain(0.3)
  })

  it('is exact over the whole range, as whole numbers of millionths show', () => {
    const value = canonicalNumber(-1e9, 1e9)
    const millionths = (x: number) => BigInt(x.toFixed(6).replace('.', ''))
    fc.assert(fc.property(value, value, (a, b) => {
      expect(millionths(plus(a, b))).toBe(millionths(a) + millionths(b))
      expect(millionths(minus(a, b))).toBe(millionths(a) - millionths(b))
    }))
  })

  it('leaves the remainder that decimals leave: 0.3 is three times 0.1, and −10 is 350 short of a turn', () => {
    expect([remainder(0.3, 0.1), remainder(-10, 360), remainder(370, 360), remainder(-360, 360)]).toEqual([0, 350, 10, 0])
  })

  it('takes a number with more decimals for the nearest millionth', () => {
    expect(minus(200.00000049, 0)).toBe(200)
  })
})

describe('isAbove', () => {
  it('takes no notice of what products lose: 3·0.1 is 0.30000000000000004, not above 0.3', () => {
    expect(3 * 0.1).toBeGreaterThan(0.3)
    expect([isAbove(3 * 0.1, 0.3), isAbove(0.3 + 1e-11, 0.3), isAbove(0.3 + 1e-8, 0.3), isAbove(-1, -2)]).toEqual([false, false, true, true])
  })

  it('goes on to the end of numbers', () => {
    expect([isAbove(5, Infinity), isAbove(Infinity, 5), isAbove(Infinity, Infinity), isAbove(5, -Infinity), isAbove(1e-300, 0)]).toEqual([false, true, false, true, true])
  })
})
