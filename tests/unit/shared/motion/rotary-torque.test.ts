import fc from 'fast-check'
import { unit, type Unit } from 'mathjs'
import { describe, expect, it } from 'vitest'
import { inertiaAtOutput, rotaryEffort, torque, type RotaryLoad } from '../../../../shared/motion/rotary-torque'
import type { Direction } from '../../../../shared/motion/thrust'

const load = (rest: Partial<RotaryLoad> = {}): RotaryLoad => ({ inertia: 100, rotorInertia: 0, gearRatio: 1, unbalance: 0, tilt: 0, friction: 0, ...rest })

describe('torque', () => {
  it('takes deg/s² as rad/s²: 0.01 kg·m² at 3600 deg/s² = 62.8318531 rad/s² ask 0.628318531 N·m', () => {
    expect(torque(load(), 3600, 1).most).toBeCloseTo(0.628318531, 9)
    expect(torque(load(), 3600, 1)).toEqual(torque(load(), 3600, -1))
  })

  it('has its units right by a general library for units', () => {
    const inertia = unit(100, 'kg cm^2').multiply(unit(3600, 'deg/s^2')) as Unit
    // Radians have no dimension: kg·m²·rad/s² are N·m.
    expect(torque(load(), 3600, 1).most).toBeCloseTo(inertia.toNumber('kg m^2 rad / s^2'), 9)
  })

  it('counts the rotor with the square of the gear: 100 + 2·5² = 150 kg·cm²', () => {
    expect(inertiaAtOutput({ inertia: 100, rotorInertia: 2, gearRatio: 5 })).toBe(150)
    expect(torque(load({ rotorInertia: 2, gearRatio: 5 }), 3600, 1).most).toBeCloseTo(0.942477796, 9)
    expect(torque(load({ rotorInertia: 2 }), 3600, 1).most).toBeCloseTo(0.628318531 * 1.02, 9)
  })

  it('swings by the unbalance with the shaft level, by half of it at 30 deg, not at all with the shaft upright', () => {
    expect(torque(load({ unbalance: 2, tilt: 90 }), 0, 0)).toEqual({ least: -2, most: 2 })
    expect(torque(load({ unbalance: 2, tilt: 30 }), 0, 0).most).toBeCloseTo(1, 12)
    expect(torque(load({ unbalance: 2, tilt: -90 }), 0, 0)).toEqual({ least: -2, most: 2 })
    expect(torque(load({ unbalance: 2, tilt: 0 }), 0, 0).most).toBe(0)
  })

  it('has friction against the turning: 0.628318531 ± 0.5 + 0.3 and, slowing down, −0.628318531 ± 0.5 + 0.3', () => {
    const one = load({ unbalance: 0.5, tilt: 90, friction: 0.3 })
    expect(torque(one, 3600, 1).most).toBeCloseTo(1.428318531, 9)
    expect(torque(one, 3600, 1).least).toBeCloseTo(0.428318531, 9)
    expect(torque(one, -3600, 1).least).toBeCloseTo(-0.828318531, 9)
  })

  it('is as large there as back', () => {
    fc.assert(fc.property(fc.integer({ min: 0, max: 900 }), fc.integer({ min: -90, max: 90 }), fc.integer({ min: -7200, max: 7200 }), fc.constantFrom<Direction>(1, -1), (inertia, tilt, a, way) => {
      const effortOf = rotaryEffort(load({ inertia, tilt, rotorInertia: 1.9, gearRatio: 5, unbalance: 0.7, friction: 0.2 }))
      expect(effortOf(-a, -way as Direction).least).toBeCloseTo(-effortOf(a, way).most, 9)
    }))
  })

  it('is the worst of the whole turn: never less than at any angle', () => {
    fc.assert(fc.property(fc.integer({ min: 0, max: 359 }), fc.integer({ min: -90, max: 90 }), (angle, tilt) => {
      const { least, most } = torque(load({ unbalance: 3, tilt }), 1000, 1)
      const there = 0.01 * 1000 * Math.PI / 180 + 3 * Math.sin(tilt * Math.PI / 180) * Math.cos(angle * Math.PI / 180)
      expect(there).toBeLessThanOrEqual(most + 1e-12)
      expect(there).toBeGreaterThanOrEqual(least - 1e-12)
    }))
  })
})
