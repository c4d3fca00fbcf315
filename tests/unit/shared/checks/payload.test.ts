import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { payload } from '../../../../shared/checks/payload'
import { judgeInput, linear, plate, rotary, told } from '../../../support/check-input'

const nameplate = plate({ maxPayloadLevel: 30, maxPayloadVertical: 12 })
const carries = (payloadMass: number | undefined, mountingAngle: number | undefined, plateFor = nameplate) =>
  told(payload, judgeInput(linear({ payloadMass, mountingAngle }), { nameplate: plateFor }))

describe('payload', () => {
  it('lets the level and the upright maximum pass, each at its angle', () => {
    expect(carries(30, 0)).toEqual([])
    expect(carries(12, 90)).toEqual([])
    expect(carries(12, -90)).toEqual([])
  })

  it('stops more than that: 13 − 12 = 1 kg', () => {
    const input = judgeInput(linear({ payloadMass: 13, mountingAngle: 90 }), { nameplate })
    expect(told(payload, input)).toEqual(['stop: The payload of 13 kg is 1 kg more than the 12 kg that the unit may carry at 90 deg.'])
    expect(payload.judge(input)).toMatchObject([{ at: ['/setup/payloadMass'], values: { load: 13, permitted: 12 } }])
    expect(carries(30.000001, 0)).toHaveLength(1)
  })

  it('turns at the maximum: 12 kg pass upright, 12.000001 kg do not; 30 and 30.000001 kg on the level', () => {
    expect([carries(12, 90), carries(12, -90), carries(30, 0)]).toEqual([[], [], []])
    expect([carries(12.000001, 90), carries(12.000001, -90), carries(30.000001, 0)].map(lines => lines.length)).toEqual([1, 1, 1])
  })

  it('lies between the two on a slope: at 30 deg 1/(0.5/30 + 0.5/12) = 17.142857 kg', () => {
    expect(carries(17.142857, 30)).toEqual([])
    expect(carries(17.2, 30)).toEqual(['stop: The payload of 17.2 kg is 0.05714 kg more than the 17.14 kg that the unit may carry at 30 deg.'])
    expect(carries(17.2, -30)).toHaveLength(1)
  })

  it('passes within the smaller maximum where the angle is not known, and asks for the angle above it', () => {
    expect(carries(12, undefined)).toEqual([])
    expect(carries(12.5, undefined)).toEqual(['unknown: The payload cannot be judged without mountingAngle.'])
    expect(carries(500, undefined)).toEqual(['unknown: The payload cannot be judged without mountingAngle.'])
  })

  it('names what is missing, and only what counts at that angle', () => {
    expect(carries(undefined, 90)).toEqual(['unknown: The payload cannot be judged without payloadMass.'])
    expect(carries(5, 0, plate({ maxPayloadLevel: 30 }))).toEqual([])
    expect(carries(5, 90, plate({ maxPayloadLevel: 30 }))).toEqual(['unknown: The payload cannot be judged without nameplate.maxPayloadVertical.'])
    expect(carries(5, 30, plate())).toEqual(['unknown: The payload cannot be judged without nameplate.maxPayloadLevel and nameplate.maxPayloadVertical.'])
    expect(told(payload, judgeInput(linear()))).toEqual(['unknown: The payload cannot be judged without payloadMass, mountingAngle, nameplate.maxPayloadLevel and nameplate.maxPayloadVertical.'])
  })

  it('goes by inertia on a rotary axis: 45 − 40 = 5 kg·cm²', () => {
    const turns = (payloadInertia?: number, maxPayloadInertia?: number) =>
      told(payload, judgeInput(rotary({ payloadInertia }), { nameplate: plate({ axisKind: 'rotary', maxPayloadInertia }) }))
    expect(turns(40, 40)).toEqual([])
    expect(turns(45, 40)).toEqual(['stop: The payload inertia of 45 kg·cm² is 5 kg·cm² more than the 40 kg·cm² that the unit may carry.'])
    expect(turns()).toEqual(['unknown: The payload cannot be judged without payloadInertia and nameplate.maxPayloadInertia.'])
  })

  it('permits no more the steeper it stands', () => {
    const angle = fc.integer({ min: 0, max: 90 })
    fc.assert(fc.property(angle, angle, fc.integer({ min: 1, max: 40 }), (one, other, mass) => {
      const [flat, steep] = [Math.min(one, other), Math.max(one, other)]
      if (carries(mass, steep).length === 0) expect(carries(mass, flat)).toEqual([])
      expect(carries(mass, -steep).length).toBe(carries(mass, steep).length)
    }))
  })
})
