import fc from 'fast-check'
import { unit, type Unit } from 'mathjs'
import { describe, expect, it } from 'vitest'
import { profile } from '../../../../shared/motion/profile'
import type { Segment } from '../../../../shared/motion/ramp'
import { directionOf, linearEffort, needOf, phaseOf, sizeOf, thrust, type Direction, type LinearLoad } from '../../../../shared/motion/thrust'
import { absolute, relative } from '../../../support/check-input'

const load = (rest: Partial<LinearLoad> = {}): LinearLoad => ({ mass: 10, turningMass: 0, mountingAngle: 0, friction: 0, ...rest })

describe('thrust', () => {
  it('is mass times acceleration on the level: 10 kg at 2000 mm/s² are 20 N, turning parts of 5 kg make it 30 N', () => {
    expect(thrust(load(), 2000, 1)).toBeCloseTo(20, 12)
    expect(thrust(load({ turningMass: 5 }), 2000, 1)).toBeCloseTo(30, 12)
  })

  it('lifts without end at rest: 10 kg weigh 98.0665 N upright, half of it at 30 deg, and turning parts nothing', () => {
    expect(thrust(load({ mountingAngle: 90, turningMass: 5 }), 0, 0)).toBeCloseTo(98.0665, 10)
    expect(thrust(load({ mountingAngle: 30 }), 0, 0)).toBeCloseTo(49.03325, 10)
    expect(thrust(load({ mountingAngle: -90 }), 0, 0)).toBeCloseTo(-98.0665, 10)
  })

  it('has friction against the motion and none at rest', () => {
    // Up: 20 + 98.0665 + 7 = 125.0665 N; down, speeding up: −20 + 98.0665 − 7 = 71.0665 N.
    const upright = load({ mountingAngle: 90, friction: 7 })
    expect(thrust(upright, 2000, 1)).toBeCloseTo(125.0665, 10)
    expect(thrust(upright, -2000, -1)).toBeCloseTo(71.0665, 10)
    expect(thrust(upright, 0, 0)).toBeCloseTo(98.0665, 10)
  })

  it('agrees with a published slope: nothing pushes, and the body slides with a = g·sin θ − Ff/m', () => {
    // OpenStax University Physics 1, section 5.6, Example 5.12: 60.0 kg, 25 deg, 4.14 m/s² without and 3.39 m/s² with 45.0 N
    // of friction; the book takes g = 9.80, the weight is scaled to it.
    for (const [friction, a] of [[0, 4.14], [45, 3.39]] as const) {
      // Positive direction downhill: mountingAngle −25.
      const mass = 60, g = 9.8 / 9.80665
      const pull = -thrust(load({ mass, mountingAngle: -25 }), 0, 0) * g - friction
      expect(Math.abs(pull / mass - a)).toBeLessThanOrEqual(0.005)
      expect(thrust(load({ mass, mountingAngle: -25, friction }), pull / mass * 1000, 1)).toBeCloseTo(thrust(load({ mass, mountingAngle: -25 }), 0, 0) * (1 - g), 9)
    }
  })

  it('agrees with published friction on a slope: a = g·(sin θ − µ·cos θ)', () => {
    // OpenStax University Physics 1, section 6.2, Example 6.14: 13 deg, µ 0.20: 0.29 m/s²; check question: 10.0 deg: −0.23 m/s².
    for (const [angle, a] of [[13, 0.29], [10, -0.23]] as const) {
      const friction = 0.2 * 9.8 * Math.cos(angle * Math.PI / 180)
      const weight = -thrust(load({ mass: 1, mountingAngle: -angle }), 0, 0) * 9.8 / 9.80665
      expect(Math.abs(weight - friction - a)).toBeLessThanOrEqual(0.005)
    }
  })

  it('agrees with a published crate: 180 N on 20.0 kg against 118 N of friction give 3.10 m/s²', () => {
    // OpenStax University Physics 1, section 6.2, Example 6.10, with the friction rounded as in the book.
    expect(Math.abs(thrust(load({ mass: 20, friction: 118 }), 3100, 1) - 180)).toBeLessThanOrEqual(20 * 0.05)
  })

  it('agrees with "How to Pick Motors for Linear Motion", Machine Design, 7 Aug 2013: 9 kg upright weigh 88 N', () => {
    expect(Math.abs(thrust(load({ mass: 9, mountingAngle: 90 }), 0, 0) - 88)).toBeLessThanOrEqual(0.5)
  })

  it('has its units right by a general library for units', () => {
    const newtons = unit(10, 'kg').multiply(unit(2000, 'mm/s^2')) as Unit
    expect(thrust(load(), 2000, 1)).toBeCloseTo(newtons.toNumber('N'), 9)
  })

  it('turns its sign with the axis', () => {
    const direction = fc.constantFrom<Direction>(1, -1, 0)
    fc.assert(fc.property(fc.integer({ min: 0, max: 100 }), fc.integer({ min: -90, max: 90 }), fc.integer({ min: -9000, max: 9000 }), direction, (mass, mountingAngle, a, way) => {
      const one = load({ mass, mountingAngle, turningMass: 3, friction: 12 })
      expect(thrust({ ...one, mountingAngle: -mountingAngle }, -a, -way as Direction)).toBeCloseTo(-thrust(one, a, way), 9)
    }))
  })
})

describe('efforts by phase and by sign', () => {
  it('tells speeding up from braking, either way', () => {
    const phases = (distance: number) => profile(relative(1, distance), 0).segments.map(segment => [phaseOf(segment), directionOf(segment)])
    expect(phases(100)).toEqual([['accelerate', 1], [undefined, 1], ['brake', 1]])
    expect(phases(-100)).toEqual([['accelerate', -1], [undefined, -1], ['brake', -1]])
  })

  it('finds rest without a direction', () => {
    const rest: Segment = { t0: 0, t1: 1, x0: 5, v0: 0, a: 0 }
    expect([phaseOf(rest), directionOf(rest)]).toEqual([undefined, 0])
  })

  it('asks of the thrust of one sign only, and of both where the torque swings', () => {
    expect([needOf({ least: 5, most: 5 }, 1), needOf({ least: 5, most: 5 }, -1)]).toEqual([5, 0])
    expect([needOf({ least: -3, most: 5 }, 1), needOf({ least: -3, most: 5 }, -1)]).toEqual([5, 3])
    expect(sizeOf({ least: -7, most: 5 })).toBe(7)
  })

  it('needs no more at constant speed than at rest or speeding up', () => {
    fc.assert(fc.property(fc.integer({ min: 0, max: 50 }), fc.integer({ min: -90, max: 90 }), fc.integer({ min: 1, max: 9000 }), fc.constantFrom<Direction>(1, -1), (mass, mountingAngle, a, way) => {
      const effortOf = linearEffort(load({ mass, mountingAngle, friction: 20, turningMass: 2 }))
      for (const sign of [1, -1] as const) {
        const cruise = needOf(effortOf(0, way), sign)
        expect(cruise).toBeLessThanOrEqual(Math.max(needOf(effortOf(0, 0), sign), needOf(effortOf(way * a, way), sign)) + 1e-9)
      }
    }))
  })

  it('brakes a falling load with more than its weight: 98.0665 + 20 − 7 = 111.0665 N', () => {
    const effortOf = linearEffort(load({ mountingAngle: 90, friction: 7 }))
    const brake = profile(absolute(1, 0), 100).segments.find(segment => phaseOf(segment) === 'brake')!
    expect(needOf(effortOf(brake.a, directionOf(brake)), 1)).toBeCloseTo(111.0665, 10)
  })
})
