import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { brakeVertical } from '../../../../shared/checks/brake-vertical'
import type { Nameplate } from '../../../../shared/settings/nameplate'
import type { Setup } from '../../../../shared/settings/types'
import { judgeInput, linear, plate, rotary, told } from '../../../support/check-input'

const braked = { brakeFitted: true, brakeCloseTime: 40, brakeHolding: 300, movingMass: 2 } as const
const upright = { mountingAngle: 90, payloadMass: 8, frictionForce: 20, brakeFitted: true, brakeEngageDelay: 60, onEnableLoss: 'stop-and-release' } as const
const hanging = (setup: Setup, more: Partial<Nameplate> = {}) => judgeInput(linear({ ...upright, ...setup }), { nameplate: plate({ ...braked, ...more }) })
const bare = (setup: Setup = {}) => hanging({ brakeFitted: false, ...setup }, { brakeFitted: false })

// m g s = (8 + 2) · 9.80665 · sin 90° = 98.0665 N, above a friction of 20 N; 1.5 times as much is 147.09975 N.
describe('brake-vertical', () => {
  it('is silent for a brake of 300 N that closes in 40 ms and is given 60 ms', () => {
    expect(told(brakeVertical, hanging({}))).toEqual([])
  })

  it('stops a drive that lets go without a brake', () => {
    expect(told(brakeVertical, bare())).toEqual([
      'stop: Gravity drives the axis back with 98.07 N, and on enable loss the drive lets go (stop-and-release) with no brake to hold it.',
    ])
    const [found] = brakeVertical.judge(bare({ onEnableLoss: 'release' }))
    expect(found).toMatchObject({ at: ['/setup/onEnableLoss', '/setup/brakeFitted'], values: { onEnableLoss: 'release' } })
    expect(found!.values.pull).toBeCloseTo(98.0665, 9)
    expect(told(brakeVertical, bare({ onEnableLoss: 'stop-and-hold' }))).toEqual([])
  })

  it('counts no brake that drive or nameplate denies', () => {
    expect(told(brakeVertical, hanging({ brakeFitted: true }, { brakeFitted: false }))).toHaveLength(1)
    expect(told(brakeVertical, hanging({ brakeFitted: false }, { brakeFitted: true }))).toHaveLength(1)
  })

  it('stops a delay of 30 ms for a brake that takes 40 ms, and lets 40 ms pass', () => {
    expect(told(brakeVertical, hanging({ brakeEngageDelay: 30 }))).toEqual([
      'stop: Gravity drives the axis back with 98.07 N, and the drive lets go 30 ms after it calls the brake, which takes 40 ms to close.',
    ])
    expect(told(brakeVertical, hanging({ brakeEngageDelay: 40 }))).toEqual([])
  })

  it('warns below 1.5 times the pull: 147 N < 147.09975 N', () => {
    const input = hanging({}, { brakeHolding: 147 })
    expect(told(brakeVertical, input)).toEqual([
      'warn: Gravity drives the axis back with 98.07 N; the brake holds 147 N, less than the 147.1 N that are 1.5 times as much.',
    ])
    expect(told(brakeVertical, hanging({}, { brakeHolding: 147.1 }))).toEqual([])
  })

  it('is silent where friction holds the load: 98.0665 N is not above 98.0665 N', () => {
    expect(told(brakeVertical, bare({ frictionForce: 98.0665 }))).toEqual([])
    expect(told(brakeVertical, bare({ frictionForce: 98.066 }))).toHaveLength(1)
  })

  it('goes by a slope of 5 degrees where nobody measured the friction', () => {
    expect(told(brakeVertical, bare({ frictionForce: undefined, mountingAngle: -4.999 }))).toEqual([])
    // 10 · 9.80665 · sin 5° = 8.547 N.
    expect(told(brakeVertical, bare({ frictionForce: undefined, mountingAngle: -5 }))[0]).toMatch(/drives the axis back with 8\.547 N/)
    expect(told(brakeVertical, bare({ frictionForce: undefined, payloadMass: undefined }))[0]).toMatch(/^stop: Gravity drives the axis back, and on/)
  })

  it('says so where the moving mass of the unit is not known: 8 · 9.80665 = 78.45 N', () => {
    expect(told(brakeVertical, hanging({ brakeFitted: false }, { movingMass: undefined }))[0]).toMatch(/back with 78\.45 N, without the moving mass of the unit, and/)
  })

  it('holds the unbalance of a rotary axis against its friction: 2 N·m · sin 30° = 1 N·m', () => {
    const tilted = (frictionTorque: number) => judgeInput(rotary({ mountingAngle: 30, unbalanceTorque: 2, frictionTorque, brakeFitted: false, onEnableLoss: 'release' }))
    expect(told(brakeVertical, tilted(0.9))[0]).toMatch(/back with 1 N·m, and on enable loss/)
    expect(told(brakeVertical, tilted(1.1))).toEqual([])
  })

  it('names what is missing', () => {
    expect(told(brakeVertical, judgeInput(linear()))).toEqual(['unknown: Whether gravity drives the axis back cannot be judged without mountingAngle.'])
    // The unit alone pulls with 2 · 9.80665 = 19.6 N, below the friction of 20 N: it hangs on the payload.
    expect(brakeVertical.judge(hanging({ payloadMass: undefined }))[0]!.missing).toEqual(['payloadMass'])
    expect(brakeVertical.judge(judgeInput(linear({ mountingAngle: 90, frictionForce: 0, payloadMass: 1 })))[0]!.missing).toEqual(['brakeFitted'])
    expect(brakeVertical.judge(bare({ onEnableLoss: undefined }))[0]!.missing).toEqual(['onEnableLoss'])
    expect(brakeVertical.judge(hanging({ brakeEngageDelay: undefined, payloadMass: undefined, frictionForce: 1 }, { brakeCloseTime: undefined, brakeHolding: undefined }))[0]!.missing)
      .toEqual(['brakeEngageDelay', 'nameplate.brakeCloseTime', 'nameplate.brakeHolding', 'payloadMass'])
  })

  it('does not apply to a level axis, nor to a table without unbalance', () => {
    expect(told(brakeVertical, bare({ mountingAngle: 0 }))).toEqual(['not applicable'])
    expect(told(brakeVertical, judgeInput(rotary({ mountingAngle: 90 })))).toEqual(['not applicable'])
  })

  it('says the same of an axis that points down as of one that points up, and more payload takes no stop back', () => {
    fc.assert(fc.property(fc.integer({ min: 1, max: 90 }), fc.integer({ min: 0, max: 40 }), fc.integer({ min: 0, max: 200 }), (mountingAngle, payloadMass, frictionForce) => {
      const stops = (setup: Setup) => told(brakeVertical, bare({ payloadMass, frictionForce, mountingAngle, ...setup }))
      expect(stops({ mountingAngle: -mountingAngle })).toEqual(stops({}))
      expect(stops({ payloadMass: payloadMass + 5 }).length).toBeGreaterThanOrEqual(stops({}).length)
    }))
  })
})
