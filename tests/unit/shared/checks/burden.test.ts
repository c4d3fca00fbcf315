import { describe, expect, it } from 'vitest'
import { bodyOf, weigh } from '../../../../shared/checks/burden'
import { judgeInput, linear, plate, rotary } from '../../../support/check-input'

// mR = 0.5 kg·cm² at 10 mm: 5e-5·394784.176 = 19.7392088 kg.
const nameplate = plate({ ratedThrust: 300, movingMass: 1, rotorInertia: 0.5, lead: 10 })
const upright = linear({ payloadMass: 9, mountingAngle: 90, frictionForce: 7 })

describe('weigh', () => {
  it('moves payload, unit and rotor: 29.7392088 kg at 2000 mm/s², 10 kg of weight and 7 N', () => {
    const { burden, missing } = weigh(judgeInput(upright, { nameplate }))
    expect(missing).toEqual([])
    expect(burden).toMatchObject({ base: 300, unit: 'N', without: '' })
    // 59.4784176 + 98.0665 + 7 = 164.5449176 N.
    expect(burden!.effortOf(2000, 1).most).toBeCloseTo(164.5449176, 6)
  })

  it('turns payload and rotor through the gear: 100 + 2·25 = 150 kg·cm²', () => {
    const input = judgeInput(rotary({ payloadInertia: 100, mountingAngle: 0, frictionTorque: 0.1 }), { nameplate: plate({ axisKind: 'rotary', ratedThrust: 2, rotorInertia: 2, gearRatio: 5 }) })
    const { burden } = weigh(input)
    expect(burden).toMatchObject({ base: 2, unit: 'N·m', without: '' })
    // 0.015·3600·π/180 + 0.1 = 1.042477796 N·m.
    expect(burden!.effortOf(3600, 1).most).toBeCloseTo(1.042477796, 9)
  })

  it('says what it counts as nothing', () => {
    const bare = weigh(judgeInput(linear({ payloadMass: 9, mountingAngle: 90 }), { nameplate: plate({ ratedThrust: 300 }) }))
    expect(bare.burden!.without).toBe(', without the moving mass of the unit, the rotor and friction')
    const turning = weigh(judgeInput(rotary({ payloadInertia: 9 }), { nameplate: plate({ axisKind: 'rotary', ratedThrust: 2 }) }))
    expect(turning.burden!.without).toBe(', without the rotor, unbalance and friction')
  })

  it('takes a shaft of unknown tilt for level: all of the unbalance counts', () => {
    const input = judgeInput(rotary({ payloadInertia: 9, unbalanceTorque: 0.4 }), { nameplate: plate({ axisKind: 'rotary', ratedThrust: 2 }) })
    expect(weigh(input).burden!.effortOf(0, 0)).toEqual({ least: -0.4, most: 0.4 })
  })

  it('names what no thrust can do without', () => {
    expect(weigh(judgeInput(linear()))).toEqual({ missing: ['payloadMass', 'mountingAngle', 'nameplate.ratedThrust'] })
    expect(weigh(judgeInput(rotary(), { nameplate: plate({ forceBase: 'peak-thrust', ratedThrust: 2 }) }))).toEqual({ missing: ['payloadInertia', 'nameplate.peakThrust'] })
  })
})

describe('bodyOf', () => {
  it('hits with half the mass times the speed squared: ½·29.7392088·0.1² = 0.148696 J', () => {
    const body = bodyOf(judgeInput(upright, { nameplate }))
    expect(body!.impact(100)).toBeCloseTo(0.148696, 6)
    expect(body!.without).toBe('')
  })

  it('turns with all of its inertia: ½·0.015·(π/2)² = 0.0185055 J', () => {
    const body = bodyOf(judgeInput(rotary({ payloadInertia: 100 }), { nameplate: plate({ axisKind: 'rotary', rotorInertia: 2, gearRatio: 5 }) }))
    expect(body!.impact(90)).toBeCloseTo(0.0185055, 7)
  })

  it('is not known without a payload, and says what it lacks', () => {
    expect(bodyOf(judgeInput(linear(), { nameplate }))).toBeUndefined()
    expect(bodyOf(judgeInput(rotary(), { nameplate }))).toBeUndefined()
    expect(bodyOf(judgeInput(upright))!.without).toBe(', without the moving mass of the unit and the rotor')
    expect(bodyOf(judgeInput(rotary({ payloadInertia: 1 })))!.without).toBe(', without the rotor')
  })
})
