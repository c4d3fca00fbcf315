import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { motionAt, profile } from '../../../../shared/motion/profile'
import { furthestStop, stoppingDistance, thrustDeceleration } from '../../../../shared/motion/stopping'
import { rotaryEffort } from '../../../../shared/motion/rotary-torque'
import { linearEffort } from '../../../../shared/motion/thrust'
import { absolute, press } from '../../../support/check-input'

describe('stoppingDistance', () => {
  it('agrees with a road: OpenStax University Physics 1, section 3.4, Example 3.10: 30.0 m/s, 64.3 m dry, 90.0 m wet', () => {
    for (const [b, stop] of [[7, 64.3], [5, 90]] as const) expect(Math.abs(stoppingDistance(30, b) - stop)).toBeLessThanOrEqual(0.05)
    // With a reaction of 0.500 s: 79.3 m and 105 m.
    expect(Math.abs(stoppingDistance(30, 7) + 15 - 79.3)).toBeLessThanOrEqual(0.05)
    expect(Math.abs(stoppingDistance(30, 5) + 15 - 105)).toBeLessThanOrEqual(0.5)
  })

  it('agrees with a woodpecker: same section, 0.600 m/s stopped in 2.00 mm by 9.18 g of 9.80 m/s²', () => {
    expect(stoppingDistance(600, 9.18 * 9800)).toBeCloseTo(2, 2)
  })

  it('agrees with a ramp: same section, Example 3.11: 2.00 m/s² for 10.0 s after 10.0 m/s cover 200 m', () => {
    // The same way back: from 30.0 m/s to 10.0 m/s.
    expect(stoppingDistance(30, 2) - stoppingDistance(10, 2)).toBeCloseTo(200, 9)
  })

  it('needs no way from rest and has no end without brakes', () => {
    expect(stoppingDistance(0, 0)).toBe(0)
    expect(stoppingDistance(5, 0)).toBe(Infinity)
  })
})

describe('thrustDeceleration', () => {
  const upright = linearEffort({ mass: 10, turningMass: 10, mountingAngle: 90, friction: 20 })

  it('has weight and friction for it on the way up: (100 + 98.0665 + 20)/20 = 10.903325 m/s²', () => {
    expect(thrustDeceleration(upright, 100, 1)).toBeCloseTo(10903.325, 6)
  })

  it('has the weight against it on the way down: (100 − 98.0665 + 20)/20 = 1.096675 m/s²', () => {
    expect(thrustDeceleration(upright, 100, -1)).toBeCloseTo(1096.675, 6)
  })

  it('is none where the load runs on: 70 − 98.0665 + 20 < 0', () => {
    expect(thrustDeceleration(upright, 70, -1)).toBe(0)
  })

  it('is without end where nothing has mass', () => {
    expect(thrustDeceleration(linearEffort({ mass: 0, turningMass: 0, mountingAngle: 90, friction: 0 }), 1, 1)).toBe(Infinity)
    expect(thrustDeceleration(upright, Infinity, 1)).toBe(Infinity)
  })

  it('takes the unbalance at its worst: (1 − 0.4)/(0.01·π/180) deg/s²', () => {
    const effortOf = rotaryEffort({ inertia: 100, rotorInertia: 0, gearRatio: 1, unbalance: 0.4, tilt: 90, friction: 0 })
    for (const way of [1, -1] as const) expect(thrustDeceleration(effortOf, 1, way)).toBeCloseTo(0.6 / (0.01 * Math.PI / 180), 6)
  })

  it('is what the thrust formula gives back: the thrust at that deceleration is the limit', () => {
    fc.assert(fc.property(fc.integer({ min: 1, max: 50 }), fc.integer({ min: -90, max: 90 }), fc.integer({ min: 1, max: 900 }), fc.constantFrom(1 as const, -1 as const), (mass, mountingAngle, limit, way) => {
      const effortOf = linearEffort({ mass, turningMass: 4, mountingAngle, friction: 15 })
      const b = thrustDeceleration(effortOf, limit, way)
      fc.pre(b > 0)
      expect(effortOf(-way * b, way).most).toBeCloseTo(-way * limit, 6)
    }))
  })
})

describe('furthestStop', () => {
  // 0 → 100 at 250 mm/s, 2000 mm/s²: braking begins at 84.375, at 250 mm/s.
  const there = profile(absolute(1, 100), 0)

  it('lies beyond the target where the quick stop is softer: 84.375 + 250²/2000 = 115.625 mm', () => {
    expect(furthestStop(there, 1000, 1)).toBeCloseTo(115.625, 9)
  })

  it('is the target where it is as hard or harder', () => {
    expect(furthestStop(there, 2000, 1)).toBeCloseTo(100, 9)
    expect(furthestStop(there, 9000, 1)).toBeCloseTo(100, 9)
  })

  it('looks towards minus on the way back: 15.625 − 31.25 = −15.625 mm', () => {
    const back = profile(absolute(1, 0), 100)
    expect(furthestStop(back, 1000, -1)).toBeCloseTo(-15.625, 9)
    expect(furthestStop(back, 1000, 1)).toBe(-Infinity)
    expect(furthestStop(there, 1000, -1)).toBe(Infinity)
  })

  it('has no end where nothing brakes', () => {
    expect(furthestStop(there, 0, 1)).toBe(Infinity)
  })

  it('is the furthest of stops tried all along the way', () => {
    const above = fc.integer({ min: 1, max: 3000 })
    fc.assert(fc.property(above, above, above, above, fc.boolean(), (speed, acceleration, deceleration, b, pressing) => {
      const move = pressing ? press(1, 60, 80, { speed, acceleration, deceleration }) : absolute(1, 80, { speed, acceleration, deceleration })
      const one = profile(move, 0)
      let tried = -Infinity
      for (let step = 0; step < 400; step++) {
        const { x, v } = motionAt(one, one.duration * step / 400)
        tried = Math.max(tried, x + stoppingDistance(v, b))
      }
      const told = furthestStop(one, b, 1)
      expect(told).toBeGreaterThanOrEqual(tried - 1e-6)
      expect(told - tried).toBeLessThanOrEqual(0.05 * (1 + speed / b) * Math.max(80, told))
    }), { numRuns: 60 })
  })
})
