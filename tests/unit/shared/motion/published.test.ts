import { unit } from 'mathjs'
import { describe, expect, it } from 'vitest'
import { motionAt, profile } from '../../../../shared/motion/profile'
import { backDrivingTorque, drivingTorque, screwTurns, standingTorque } from '../../../../shared/motion/screw'
import { stoppingDistance } from '../../../../shared/motion/stopping'
import { thrust } from '../../../../shared/motion/thrust'
import { absolute } from '../../../support/check-input'

/* Published cases that other tests of motion do not hold; tolerances are half of the last printed digit unless said. */

const level = { mass: 1, turningMass: 0, mountingAngle: 0, friction: 0 }
/** The book takes g = 9.80 m/s². */
const book = 9.8 / 9.80665
const near = (value: number, printed: number, tolerance: number) => expect(Math.abs(value - printed)).toBeLessThanOrEqual(tolerance)

describe('a slope in a physics book', () => {
  it('OpenStax University Physics 1, section 6.2, Example 6.11: 62 kg, 25 deg, 45.0 N of friction: µ = 0.082', () => {
    // The weight across the slope is the weight along one of 65 deg.
    const across = thrust({ ...level, mass: 62, mountingAngle: 65 }, 0, 0) * book
    near(45 / across, 0.082, 0.0005)
  })

  it('OpenStax College Physics 2e, section 4.5, Example 4.5: 60.0 kg on 25 deg lie with 532 N (the book cuts 532.9)', () => {
    near(thrust({ ...level, mass: 60, mountingAngle: 65 }, 0, 0) * book, 532, 1)
  })

  it('same section: 4.14 m/s² down the slope, and the thrust that lets it slide freely is none', () => {
    near(thrust({ ...level, mass: 60, mountingAngle: 25 }, -4140, -1) * book, 0, 60 * 0.005 + 0.2)
  })

  it('OpenStax University Physics 1, section 6.2, Example 6.10: at rest up to 0.700 · 20.0 kg · g = 137 N hold', () => {
    near(0.7 * thrust({ ...level, mass: 20, mountingAngle: 90 }, 0, 0) * book, 137, 0.5)
  })
})

describe('constant acceleration in a physics book', () => {
  it('OpenStax University Physics 1, section 3.4, woodpecker: 0.600 m/s to rest in 2.00 mm take 6.67·10⁻³ s', () => {
    // b = v²/(2·d) = 90 m/s²; the second half of a move that brakes so: its last 2 mm.
    expect(stoppingDistance(600, 90_000)).toBe(2)
    const { segments, duration } = profile(absolute(1, 100, { speed: 600, acceleration: 90_000 }), 0)
    near(duration - (segments.at(-1)?.t0 ?? NaN), 0.00667, 0.000005)
  })

  it('same section, Example 3.11: from 10.0 m/s at 2.00 m/s² 200 m take 10.0 s', () => {
    // The same stretch of a ramp from rest: it passes 25 m at 10 m/s, after 5 s.
    const ramp = profile(absolute(1, 1000, { speed: 100, acceleration: 2 }), 0)
    expect(motionAt(ramp, 5)).toEqual({ x: 25, v: 10 })
    near(motionAt(ramp, 15).x - 25, 200, 0.5)
  })
})

describe('moves given by their times', () => {
  it('a fluid-power article on fixed-time profiles (stored copy, author not stated): 43.6 in in 2.15 s, ramps 0.3 s and 0.45 s: 1.4 s at 24.56 in/s', () => {
    const speed = 43.6 / (2.15 - (0.3 + 0.45) / 2)
    near(speed, 24.56, 0.005)
    const { segments, duration } = profile(absolute(1, 43.6, { speed, acceleration: speed / 0.3, deceleration: speed / 0.45 }), 0)
    expect(segments.map(({ t0, t1 }) => t1 - t0)).toEqual([expect.closeTo(0.3, 9), expect.closeTo(1.4, 9), expect.closeTo(0.45, 9)])
    expect(duration).toBeCloseTo(2.15, 9)
  })

  it('"How to Pick Motors for Linear Motion", Machine Design, 7 Aug 2013: 9 kg lifted by 0.2 m in 1 s are 17.64 W', () => {
    // 88.2 N, g taken as 9.80, over 0.2 m.
    near(thrust({ ...level, mass: 9, mountingAngle: 90 }, 0, 0) * book * 0.2, 17.64, 0.005)
  })
})

describe('power screws of handbooks', () => {
  const poundInch = unit(1, 'lbf inch').toNumber('N m')
  /** η of raising with a thread of half angle φ: tan λ·(cos φ − µ·tan λ)/(cos φ·tan λ + µ). */
  const efficiency = (lead: number, diameter: number, friction: number, halfAngle: number) => {
    const climb = lead / (Math.PI * diameter), cosine = Math.cos(halfAngle * Math.PI / 180)
    return climb * (cosine - friction * climb) / (cosine * climb + friction)
  }

  it('Mott, Machine Elements in Mechanical Design, 4th ed., Example 17-1: 12500 lbf, lead 0.25 in, pitch diameter 1.3429 in, µ 0.15, Acme: 3.39 deg, 1809 lbf·in', () => {
    near(Math.atan(0.25 / (Math.PI * 1.3429)) * 180 / Math.PI, 3.39, 0.005)
    const newtonMetres = drivingTorque(unit(12500, 'lbf').toNumber('N'), 6.35, efficiency(0.25, 1.3429, 0.15, 14.5))
    // Read from a scanned page that is 0.3 % off: 1814.4 by the formula.
    near(newtonMetres / poundInch, 1809, 6)
  })

  it('Shigley, Mechanical Engineering Design, Example 8-1 (from memory): 6.4 kN, 32 mm × 4 mm, two starts, µ 0.08, collar 40 mm: 26.18 N·m up', () => {
    // Two starts of 4 mm: lead 8 mm; pitch diameter 30 mm; the collar takes µ·F·d/2 = 10.24 N·m of it.
    const collar = 0.08 * 6400 * 0.04 / 2
    near(drivingTorque(6400, 8, efficiency(8, 30, 0.08, 0)) + collar, 26.18, 0.01)
    // e = F·lead/(2π·T) = 0.311: what is left of the work of one turn.
    near(standingTorque(6400, 8) / 26.18, 0.311, 0.0005)
  })

  it('Shigley, same example, down: 9.77 N·m, the screw driven back by the load less what friction takes', () => {
    const climb = 8 / (Math.PI * 30)
    // η driven back: tan(λ − ρ)/tan λ, negative where the screw holds itself; the torque to lower is then its opposite.
    const back = Math.tan(Math.atan(climb) - Math.atan(0.08)) / climb
    near(10.24 - backDrivingTorque(6400, 8, back), 9.77, 0.01)
  })

  it('3000 turns a minute at a lead of 10 mm are 500 mm/s (ipm = L·rpm, a public list of formulas)', () => {
    expect([screwTurns(500, 10), screwTurns(1, 60), screwTurns(0, 10)]).toEqual([3000, 1, 0])
  })
})

describe('moves worked by hand from the area under the speed', () => {
  it.each([
    ['100 mm at 250 mm/s, 3000 mm/s²', 100, 250, 3000, 3000, 0.483333, 10.416667],
    ['5 mm: 122.474 mm/s at most', 5, 250, 3000, 3000, 0.0816497, 2.5],
    ['300 mm at 500 mm/s, 5000 up and 2500 mm/s² down', 300, 500, 5000, 2500, 0.75, 50],
    ['42.5 mm back at 100 mm/s, 1000 and 4000 mm/s²', -42.5, 100, 1000, 4000, 0.4875, 1.25],
    ['nowhere', 0, 100, 1000, 1000, 0, 0],
  ])('%s', (_words, distance, speed, acceleration, deceleration, seconds, stop) => {
    const { duration, peakSpeed } = profile(absolute(1, distance, { speed, acceleration, deceleration }), 0)
    near(duration, seconds, 5e-7)
    near(stoppingDistance(peakSpeed, deceleration), stop, 5e-7)
  })

  it('just between triangle and trapezium, 20.8333 mm: 1/6 s, and a hair more or less changes it by a hair', () => {
    const seconds = (distance: number) => profile(absolute(1, distance, { speed: 250, acceleration: 3000 }), 0).duration
    for (const distance of [62.5 / 3 - 1e-6, 62.5 / 3, 62.5 / 3 + 1e-6]) near(seconds(distance), 1 / 6, 1e-8)
  })
})
