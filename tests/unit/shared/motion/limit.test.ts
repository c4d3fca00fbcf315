import { describe, expect, it } from 'vitest'
import { limitForce, limitPercent, peakPercent, ratedPercent } from '../../../../shared/motion/limit'

const rated = { ratedThrust: 300, peakThrust: 600 } as const
const peak = { ...rated, forceBase: 'peak-thrust' } as const

describe('limitPercent', () => {
  it('is the lowest of the general limit, that of the sign, and what the unit can do', () => {
    const setup = { thrustLimit: 120, thrustLimitPositive: 80, thrustLimitNegative: 150 }
    expect(limitPercent(1, setup, rated)).toBe(80)
    expect(limitPercent(-1, setup, rated)).toBe(120)
    // 100·600/300 = 200 % where 100 % is rated thrust, 100 % where it is the peak.
    expect(limitPercent(1, { thrustLimit: 500 }, rated)).toBe(200)
    expect(limitPercent(1, { thrustLimit: 500 }, peak)).toBe(100)
  })

  it('is narrowed by the limit of a move, never widened', () => {
    expect(limitPercent(1, { thrustLimit: 80 }, rated, 45)).toBe(45)
    expect(limitPercent(1, { thrustLimit: 80 }, rated, 90)).toBe(80)
  })

  it('leaves out what is not given, down to no limit at all', () => {
    expect(limitPercent(-1, { thrustLimitPositive: 80 }, { ratedThrust: 300 })).toBe(Infinity)
    expect(limitPercent(1, { thrustLimitPositive: 80 })).toBe(80)
  })
})

describe('limitForce', () => {
  it('is the share of the force base: 80 % of 300 N are 240 N, of 600 N 480 N', () => {
    expect(limitForce(1, { thrustLimit: 80 }, rated)).toBe(240)
    expect(limitForce(1, { thrustLimit: 80 }, peak)).toBe(480)
  })

  it('is not known without the force base', () => {
    expect(limitForce(1, { thrustLimit: 80 })).toBeUndefined()
    expect(limitForce(1, { thrustLimit: 80 }, { peakThrust: 600 })).toBeUndefined()
  })

  it('ends at what the unit can do: 500 % of 300 N are 1500 N, the unit does 600 N', () => {
    expect(limitForce(1, { thrustLimit: 500 }, rated)).toBe(600)
  })
})

describe('what 100 % leaves', () => {
  it('is peak and rated in the unit of the settings', () => {
    expect([peakPercent(rated), ratedPercent(rated)]).toEqual([200, 100])
    expect([peakPercent(peak), ratedPercent(peak)]).toEqual([100, 50])
    expect([peakPercent(), ratedPercent()]).toEqual([Infinity, 100])
    expect(ratedPercent({ peakThrust: 600, forceBase: 'peak-thrust' })).toBe(100)
  })
})
