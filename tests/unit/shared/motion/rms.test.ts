import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { loadsOver, rms, type Load } from '../../../../shared/motion/rms'
import { linearEffort } from '../../../../shared/motion/thrust'
import { timeline } from '../../../../shared/motion/timeline'
import { absolute, press } from '../../../support/check-input'

const noPress = { pressForce: () => 0 }

describe('rms', () => {
  it('agrees with a published duty: 200 kW for 10 min and 100 kW for 20 min heat like 100·√2 = 141.4213562 kW', () => {
    // Exercise on motor rating, objectivemcq.com.
    expect(rms([{ force: 200, time: 600 }, { force: 100, time: 1200 }])).toBeCloseTo(141.4213562, 6)
  })

  it('is 0 where there is no time', () => {
    expect(rms([])).toBe(0)
    expect(rms([{ force: 5, time: 0 }])).toBe(0)
  })

  const loads = fc.array(fc.record({ force: fc.double({ min: -1e3, max: 1e3, noNaN: true }), time: fc.double({ min: 0.001, max: 10, noNaN: true }) }), { minLength: 1, maxLength: 8 })
  const seconds = (parts: readonly Load[]) => parts.reduce((sum, { time }) => sum + time, 0)

  it('of a constant is the constant', () => {
    fc.assert(fc.property(loads, fc.double({ min: 0, max: 1e3, noNaN: true }), (parts, force) => {
      expect(rms(parts.map(({ time }) => ({ force, time })))).toBeCloseTo(force, 6)
    }))
  })

  it('is at least the mean size and at most the largest', () => {
    fc.assert(fc.property(loads, (parts) => {
      const mean = parts.reduce((sum, { force, time }) => sum + Math.abs(force) * time, 0) / seconds(parts)
      expect(rms(parts)).toBeGreaterThanOrEqual(mean - 1e-9)
      expect(rms(parts)).toBeLessThanOrEqual(Math.max(...parts.map(({ force }) => Math.abs(force))) + 1e-9)
    }))
  })

  it('falls with the root of the time when the motor rests in between', () => {
    fc.assert(fc.property(loads, fc.double({ min: 0, max: 10, noNaN: true }), (parts, rest) => {
      const all = seconds(parts)
      expect(rms([...parts, { force: 0, time: rest }])).toBeCloseTo(rms(parts) * Math.sqrt(all / (all + rest)), 6)
    }))
  })
})

describe('loadsOver', () => {
  // 10 kg upright with 7 N of friction: 98.0665 N at rest.
  const upright = linearEffort({ mass: 10, turningMass: 0, mountingAngle: 90, friction: 7 })
  const level = linearEffort({ mass: 10, turningMass: 0, mountingAngle: 0, friction: 0 })

  it('has ramps, constant speed and rest: 125.0665, 105.0665, 85.0665 and 98.0665 N', () => {
    const up = timeline([absolute(1, 100, { next: 2, dwell: 200 }), absolute(2, 100)], 0)
    expect(loadsOver(up, upright, noPress).map(({ force, time }) => [Number(force.toFixed(4)), Number(time.toFixed(4))]))
      .toEqual([[125.0665, 0.125], [105.0665, 0.275], [85.0665, 0.125], [98.0665, 0.2]])
  })

  it('gives the RMS of a move by hand: 20 N for 2·0.125 s of 0.525 s are 20·√(0.25/0.525) = 13.8013 N', () => {
    expect(rms(loadsOver(timeline([absolute(1, 100)], 0), level, noPress))).toBeCloseTo(13.801311, 6)
  })

  it('lets the motor rest once a brake is set', () => {
    const waiting = timeline([absolute(1, 100, { next: 2, dwell: 200 }), absolute(2, 100)], 100)
    const loads = loadsOver(waiting, upright, { ...noPress, brakeAfter: 0.05 })
    expect(loads.map(({ time }) => time)).toEqual([expect.closeTo(0.05, 12), expect.closeTo(0.15, 12)])
    expect(loads.map(({ force }) => force)).toEqual([expect.closeTo(98.0665, 9), 0])
    // 98.0665·√(0.05/0.2) = 49.03325 N.
    expect(rms(loads)).toBeCloseTo(49.03325, 9)
    expect(rms(loadsOver(waiting, upright, noPress))).toBeCloseTo(98.0665, 9)
  })

  it('holds on with the force of the press', () => {
    const pressing = timeline([press(3, 100, 110, { next: 4, dwell: 500 }), absolute(4, 110)], 0)
    const held = loadsOver(pressing, level, { pressForce: move => move * 50, brakeAfter: 0.1 }).at(-1)!
    expect(held.force).toBe(150)
    expect(held.time).toBeCloseTo(0.5, 9)
  })

  it('is what numeric integration of F² over time gives', () => {
    const above = fc.integer({ min: 10, max: 3000 })
    fc.assert(fc.property(above, above, above, fc.integer({ min: 1, max: 500 }), fc.integer({ min: -90, max: 90 }), (speed, acceleration, deceleration, dwell, mountingAngle) => {
      const mass = 12, turningMass = 3, friction = 9
      const line = timeline([absolute(1, 90, { speed, acceleration, deceleration, next: 2, dwell }), absolute(2, 0, { speed, acceleration, deceleration })], 0)
      // Speeds at 20000 moments, accelerations from their differences: nothing of the segments but their speed is used.
      const speedAt = (time: number) => {
        const one = line.stretches.find(({ t1 }) => time < t1)
        return one ? one.v0 + one.a * (time - one.t0) : 0
      }
      const steps = 20000, slice = line.seconds / steps
      let heat = 0
      for (let n = 0; n < steps; n++) {
        const before = speedAt(n * slice), after = speedAt((n + 1) * slice)
        const force = (mass + turningMass) * (after - before) / slice / 1000 + mass * 9.80665 * Math.sin(mountingAngle * Math.PI / 180) + Math.sign(before + after) * friction
        heat += force ** 2 * slice
      }
      const told = rms(loadsOver(line, linearEffort({ mass, turningMass, mountingAngle, friction }), noPress))
      const scale = Math.max(told, 1)
      expect(Math.abs(Math.sqrt(heat / line.seconds) - told) / scale).toBeLessThan(0.02)
    }), { numRuns: 12 })
  })
})
