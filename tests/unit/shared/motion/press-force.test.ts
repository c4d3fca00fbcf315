import { describe, expect, it } from 'vitest'
import { forceOnPart, standardGravity } from '../../../../shared/motion/press-force'

describe('forceOnPart', () => {
  it('loses weight and friction upwards: 240 − 5·9.80665 − 10 = 180.96675 N', () => {
    expect(forceOnPart(240, 1, { mass: 5, mountingAngle: 90, friction: 10 })).toBeCloseTo(180.96675, 10)
  })

  it('gains the weight downwards: 240 + 49.03325 − 10 = 279.03325 N', () => {
    expect(forceOnPart(240, -1, { mass: 5, mountingAngle: 90, friction: 10 })).toBeCloseTo(279.03325, 10)
    expect(forceOnPart(240, 1, { mass: 5, mountingAngle: -90, friction: 10 })).toBeCloseTo(279.03325, 10)
  })

  it('meets half the weight at 30 deg and none on the level', () => {
    expect(forceOnPart(240, 1, { mass: 5, mountingAngle: 30, friction: 0 })).toBeCloseTo(240 - 24.516625, 10)
    expect(forceOnPart(240, 1, { mass: 5, mountingAngle: 0, friction: 10 })).toBe(230)
  })

  it('is negative for a press that never gets to the part: 40 − 49.03325 = −9.03325 N', () => {
    expect(forceOnPart(40, 1, { mass: 5, mountingAngle: 90, friction: 0 })).toBeCloseTo(-9.03325, 10)
    // Standard gravity as NIST SP 811 gives it, exact.
    expect(standardGravity).toBe(9.80665)
  })
})
