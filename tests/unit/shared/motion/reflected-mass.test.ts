import { describe, expect, it } from 'vitest'
import { linearImpact } from '../../../../shared/motion/impact'
import { reflectedMass } from '../../../../shared/motion/reflected-mass'

describe('reflectedMass', () => {
  it('is J·(2π/lead)²: 0.5 kg·cm² on 10 mm are 5e-5·(200π)² = 5e-5·394784.1760 = 19.7392088 kg', () => {
    expect(reflectedMass(0.5, 10)).toBeCloseTo(19.7392088, 7)
  })

  it('falls with the square of the lead and is 0 without a rotor', () => {
    expect(reflectedMass(0.5, 20)).toBeCloseTo(19.7392088 / 4, 7)
    expect(reflectedMass(0, 10)).toBe(0)
  })

  it('holds the energy of the turning parts: at 100 mm/s a lead of 10 mm turns 10 times a second', () => {
    // ½ J ω² with ω = 2π·10 = 62.8318531 rad/s: ½·5e-5·3947.84176 = 0.098696044 J.
    expect(linearImpact(reflectedMass(0.5, 10), 100)).toBeCloseTo(0.098696044, 9)
  })
})
