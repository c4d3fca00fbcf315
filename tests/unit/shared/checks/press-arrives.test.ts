import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { pressArrives } from '../../../../shared/checks/press-arrives'
import type { Nameplate } from '../../../../shared/settings/nameplate'
import type { Setup } from '../../../../shared/settings/types'
import { absolute, judgeInput, linear, plate, press, rotary, told } from '../../../support/check-input'

// 5 kg and a unit of 0 kg: 49.03325 N upright; friction 10 N; 100 % are 300 N.
const plateFor = (more: Partial<Nameplate> = {}) => plate({ ratedThrust: 300, movingMass: 0, rotorInertia: 0, lead: 10, ...more })
const pushes = (forceLimit: number | undefined, towards: number, setup: Setup = {}, more: Partial<Nameplate> = {}) => judgeInput(
  linear({ payloadMass: 5, mountingAngle: 90, frictionForce: 10, ...setup }, [press(6, 100, towards, { forceLimit })]), { nameplate: plateFor(more) })

describe('press-arrives', () => {
  it('is silent for a press that lifts its load: 30 % = 90 N of 59.03325 N', () => {
    expect(told(pressArrives, pushes(30, 150))).toEqual([])
  })

  it('stops one that is weaker: 15 % = 45 N of 59.03325 N', () => {
    const input = pushes(15, 150)
    expect(told(pressArrives, input)).toEqual(['stop: Press 6 pushes with 15 %, 45 N, and needs more than 59.03 N to get to the part: it never arrives.'])
    const [found] = pressArrives.judge(input)
    expect(found).toMatchObject({ at: ['/moves/0/forceLimit', '/setup/mountingAngle'], values: { move: 6, forceLimit: 15, thrust: 45 } })
    expect(found!.values.need).toBeCloseTo(59.03325, 9)
  })

  it('never arrives with just what weight and friction take: on the level 10 N of friction, 10 N of thrust', () => {
    const level = (percent: number) => told(pressArrives, pushes(percent, 150, { mountingAngle: 0 }, { ratedThrust: 100 }))
    expect(level(10)).toHaveLength(1)
    expect(level(10.000001)).toEqual([])
  })

  it('gets down by itself, and holds the load back only where the limit acts both ways: 39.03325 N pull', () => {
    expect(told(pressArrives, pushes(10, 50))).toEqual([])
    expect(told(pressArrives, pushes(10, 50, {}, { forceLimitActsBothWays: true })))
      .toEqual(['stop: Press 6 pushes with 10 %, 30 N both ways, and the load pulls with 39.03 N: it runs away.'])
    expect(told(pressArrives, pushes(14, 50, {}, { forceLimitActsBothWays: true }))).toEqual([])
  })

  it('pulls with exactly the limit and is held: 5·9.80665 − 19.03325 = 30 N', () => {
    expect(told(pressArrives, pushes(10, 50, { frictionForce: 19.03325 }, { forceLimitActsBothWays: true }))).toEqual([])
    expect(told(pressArrives, pushes(10, 50, { frictionForce: 19.03 }, { forceLimitActsBothWays: true }))).toHaveLength(1)
  })

  it('counts up and down by the mounting, not by the sign of the way: −90 deg and towards minus is up', () => {
    expect(told(pressArrives, pushes(15, 50, { mountingAngle: -90 }))).toHaveLength(1)
    expect(told(pressArrives, pushes(15, 150, { mountingAngle: -90 }))).toEqual([])
  })

  it('says what it counts as nothing', () => {
    const input = judgeInput(linear({ payloadMass: 5, mountingAngle: 90 }, [press(6, 100, 150, { forceLimit: 1 })]), { nameplate: plate({ ratedThrust: 300 }) })
    expect(told(pressArrives, input)[0]).toMatch(/to get to the part, without the moving mass of the unit, the rotor and friction: it never arrives\.$/)
  })

  it('turns against friction and the worst of the unbalance: 0.2 + 0.3 N·m of 45 % of 1 N·m', () => {
    const setup = { payloadInertia: 1, mountingAngle: 90, unbalanceTorque: 0.3, frictionTorque: 0.2 }
    const turning = (forceLimit: number, towards: number) => told(pressArrives, judgeInput(rotary(setup, [press(6, 100, towards, { forceLimit })]),
      { nameplate: plate({ axisKind: 'rotary', ratedThrust: 1, rotorInertia: 0 }) }))
    for (const towards of [50, 150]) {
      expect(turning(45, towards)).toEqual(['stop: Press 6 pushes with 45 %, 0.45 N·m, and needs more than 0.5 N·m to get to the part: it never arrives.'])
      expect(turning(55, towards)).toEqual([])
    }
  })

  it('warns of a press that cannot rest at its target without a part: 10²/4000 = 0.025 mm of 0.02 mm', () => {
    const short = (target: number) => told(pressArrives, judgeInput(
      linear({ payloadMass: 5, mountingAngle: 0, frictionForce: 0 }, [press(6, 100, target)]), { nameplate: plateFor() }))
    expect(short(100.02)).toEqual(['warn: Press 6 needs 0.025 mm to stop from 10 mm/s, and has 0.02 mm from its approach to its target: without a part it runs on beyond.'])
    expect(short(100.025)).toEqual([])
  })

  it('names what is missing, and leaves a press without a way to another rule', () => {
    expect(told(pressArrives, judgeInput(linear({}, [press(6, 100, 150)])))).toEqual(['unknown: Whether a press arrives cannot be judged without payloadMass, mountingAngle and nameplate.ratedThrust.'])
    expect(told(pressArrives, pushes(undefined, 150))).toEqual(['unknown: Whether a press arrives cannot be judged without forceLimit.'])
    expect(told(pressArrives, pushes(1, 100))).toEqual([])
  })

  it('does not apply without a press', () => {
    expect(told(pressArrives, judgeInput(linear({}, [absolute(1, 5)])))).toEqual(['not applicable'])
  })

  it('arrives with more thrust wherever it arrives with less', () => {
    fc.assert(fc.property(fc.integer({ min: 1, max: 60 }), fc.integer({ min: 1, max: 60 }), fc.integer({ min: -90, max: 90 }), fc.constantFrom(50, 150), fc.boolean(), (limit, more, mountingAngle, towards, forceLimitActsBothWays) => {
      const stops = (percent: number) => told(pressArrives, pushes(percent, towards, { mountingAngle }, { forceLimitActsBothWays })).length
      expect(stops(limit + more)).toBeLessThanOrEqual(stops(limit))
    }))
  })
})
