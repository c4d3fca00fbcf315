import fc from 'fast-check'
import { unit } from 'mathjs'
import { describe, expect, it } from 'vitest'
import { backDrivingTorque, drivingTorque, screwTurns, standingTorque, thrustOfTorque } from '../../../../shared/motion/screw'

describe('screwTurns', () => {
  it('turns 3000 times a minute for 500 mm/s at 10 mm a turn', () => {
    expect(screwTurns(500, 10)).toBe(3000)
  })
})

describe('torques of a screw', () => {
  it('agrees with engineeringprep.com, problem 516: 20 kN, lead 0.01 m, efficiency 70 %: 45.5 N·m', () => {
    expect(Math.abs(drivingTorque(20000, 10, 0.7) - 45.5)).toBeLessThanOrEqual(0.05)
  })

  it('agrees with engineeringtoolbox.com, Screw Jack: 225 kN, 3 mm, no friction: 107 N·m, 215 N on an arm of 0.5 m', () => {
    expect(Math.abs(drivingTorque(225000, 3) - 107)).toBeLessThanOrEqual(0.5)
    expect(Math.abs(drivingTorque(225000, 3) / 0.5 - 215)).toBeLessThanOrEqual(0.5)
  })

  it('agrees with the same page in inches: 50000 lbf, 1/8 in: 995 lbf·in, 82.9 lbf·ft', () => {
    const newtonMetres = drivingTorque(unit(50000, 'lbf').toNumber('N'), unit(0.125, 'inch').toNumber('mm'))
    const perInch = unit(1, 'lbf inch').toNumber('N m')
    expect(Math.abs(newtonMetres / perInch - 995)).toBeLessThanOrEqual(1)
    expect(Math.abs(newtonMetres / perInch / 12 - 82.9)).toBeLessThanOrEqual(0.05)
  })

  it('agrees with Statics, section 5.6, problem 2 (adaptivebooks.org): 10000 lbf, 2 threads an inch, 2 in, µ 0.2: 2840 lbf·in', () => {
    // Square thread: tan λ = lead/(π·d); efficiency η = tan λ/tan(λ + arctan µ).
    const climb = Math.atan(0.5 / (Math.PI * 2))
    const efficiency = Math.tan(climb) / Math.tan(climb + Math.atan(0.2))
    const newtonMetres = drivingTorque(unit(10000, 'lbf').toNumber('N'), unit(0.5, 'inch').toNumber('mm'), efficiency)
    expect(Math.abs(newtonMetres / unit(1, 'lbf inch').toNumber('N m') - 2840)).toBeLessThanOrEqual(10)
  })

  it('drives harder than it stands and stands harder than it is driven back: 900 N at 10 mm and 90 %', () => {
    // 900·10/(2000π) = 1.43239449; /0.9 = 1.59154943; ·0.9 = 1.28915504.
    expect(standingTorque(900, 10)).toBeCloseTo(1.43239449, 8)
    expect(drivingTorque(900, 10, 0.9)).toBeCloseTo(1.59154943, 8)
    expect(backDrivingTorque(900, 10, 0.9)).toBeCloseTo(1.28915504, 8)
  })

  it('is one torque without losses', () => {
    expect(drivingTorque(900, 10)).toBe(standingTorque(900, 10))
    expect(backDrivingTorque(900, 10)).toBe(standingTorque(900, 10))
  })

  it('comes back from torque to thrust', () => {
    const positive = fc.double({ min: 0.01, max: 1e4, noNaN: true })
    fc.assert(fc.property(positive, positive, fc.double({ min: 0.05, max: 1, noNaN: true }), (thrust, lead, efficiency) => {
      const back = thrustOfTorque(drivingTorque(thrust, lead, efficiency), lead, efficiency)
      expect(Math.abs(back / thrust - 1)).toBeLessThan(1e-12)
    }))
  })

  it('does as much work as the thrust: T·2π a turn at η = 1 is F·lead', () => {
    expect(drivingTorque(300, 20) * 2 * Math.PI).toBeCloseTo(300 * 0.02, 12)
  })
})
