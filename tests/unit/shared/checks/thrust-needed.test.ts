import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { thrustNeeded } from '../../../../shared/checks/thrust-needed'
import type { Nameplate } from '../../../../shared/settings/nameplate'
import type { Move, Setup } from '../../../../shared/settings/types'
import { absolute, judgeInput, linear, plate, press, relative, rotary, told, unused } from '../../../support/check-input'

// 9 kg and 1 kg of the unit, a rotor that weighs nothing: 10 kg. Rated thrust 300 N.
const nameplate = plate({ ratedThrust: 300, movingMass: 1, rotorInertia: 0, lead: 10 })
const axis = (setup: Setup, moves: readonly Move[], more: Partial<Nameplate> = {}) =>
  judgeInput(linear({ payloadMass: 9, mountingAngle: 0, frictionForce: 0, ...setup }, moves), { nameplate: { ...nameplate, ...more } })

describe('thrust-needed', () => {
  it('is silent up to 80 % of the limit, that included: 10 kg at 2400 mm/s² are 24 N of 10 % = 30 N', () => {
    expect(told(thrustNeeded, axis({ thrustLimit: 10 }, [absolute(1, 100, { acceleration: 2000 })]))).toEqual([])
    expect(told(thrustNeeded, axis({ thrustLimit: 10 }, [absolute(1, 100, { acceleration: 2400 })]))).toEqual([])
  })

  it('warns above 80 % and still at the limit itself: 25 N are 83.33 %, 30 N are 100 %', () => {
    const input = axis({ thrustLimit: 10 }, [relative(4, 100, { acceleration: 2500, deceleration: 2000 })])
    expect(told(thrustNeeded, input)).toEqual(['warn: Move 4 needs 25 N towards plus to speed up, 83.33 % of the 30 N that its limit leaves.'])
    const [found] = thrustNeeded.judge(input)
    expect(found).toMatchObject({ at: ['/moves/0/acceleration', '/setup/thrustLimit'], values: { move: 4, phase: 'accelerate', need: 25, limit: 30 } })
    expect(found!.values.percent).toBeCloseTo(83.3333333, 6)
    expect(told(thrustNeeded, axis({ thrustLimit: 10 }, [relative(4, 100, { acceleration: 2401, deceleration: 2000 })]))).toHaveLength(1)
    expect(told(thrustNeeded, axis({ thrustLimit: 10 }, [relative(4, 100, { acceleration: 3000, deceleration: 2000 })]))[0]).toMatch(/^warn: .*, 100 % of the 30 N/)
  })

  it('stops above the limit, and leads with braking before speeding up', () => {
    const input = axis({ thrustLimit: 10 }, [relative(4, 100, { acceleration: 4500, deceleration: 6000 })])
    expect(told(thrustNeeded, input)).toEqual(['stop: Move 4 needs 60 N towards minus to brake, 200 % of the 30 N that its limit leaves, and too much to speed up as well.'])
    expect(thrustNeeded.judge(input)[0]!.at).toEqual(['/moves/0/deceleration', '/moves/0/acceleration', '/setup/thrustLimit'])
  })

  it('leads with holding: upright 98.0665 N of 30 % = 90 N', () => {
    expect(told(thrustNeeded, axis({ thrustLimit: 30, mountingAngle: 90 }, [relative(4, 100)])))
      .toEqual(['stop: Move 4 needs 98.07 N towards plus to hold the load, 109 % of the 90 N that its limit leaves, and too much to speed up as well.'])
  })

  it('judges a move that nobody names both ways: down it brakes with 98.0665 + 20 = 118.0665 N of 39 % = 117 N', () => {
    const input = (moves: readonly Move[]) => axis({ thrustLimit: 39, mountingAngle: 90 }, moves)
    expect(told(thrustNeeded, input([absolute(4, 100)]))[0]).toMatch(/^stop: Move 4 needs 118.1 N towards plus to brake, 100.9 % .* and too much to speed up as well\.$/)
    // From 0 to 100 it only goes up; from 150 only down.
    expect(told(thrustNeeded, input([absolute(1, 0, { next: 4, acceleration: 1 }), absolute(4, 100)]))[1]).toMatch(/^stop: Move 4 needs 118.1 N towards plus to speed up, /)
    expect(told(thrustNeeded, input([absolute(1, 150, { next: 4, acceleration: 1 }), absolute(4, 100)]))[1]).toMatch(/^stop: Move 4 needs 118.1 N towards plus to brake, 100.9 % of the 117 N that its limit leaves\.$/)
  })

  it('goes by the sign of the thrust: braking on the way up with 12000 mm/s² pulls down with 120 − 98.0665 = 21.9335 N', () => {
    const setup = { thrustLimit: 100, thrustLimitNegative: 5, mountingAngle: 90 }
    const input = axis(setup, [relative(4, 100, { deceleration: 12000 })])
    expect(told(thrustNeeded, input)).toEqual(['stop: Move 4 needs 21.93 N towards minus to brake, 146.2 % of the 15 N that its limit leaves.'])
    expect(thrustNeeded.judge(input)[0]!.at).toEqual(['/moves/0/deceleration', '/setup/thrustLimitNegative'])
  })

  it('takes the sign that is nearer to its limit, not the larger thrust: at 3 deg 25.1324 N of 300 N and 14.8676 N of 15 N', () => {
    // 98.0665·sin 3° = 5.1324 N for or against the 20 N of 2000 mm/s².
    expect(told(thrustNeeded, axis({ thrustLimit: 100, thrustLimitNegative: 5, mountingAngle: 3 }, [absolute(4, 100)])))
      .toEqual(['warn: Move 4 needs 14.87 N towards minus to brake, 99.12 % of the 15 N that its limit leaves.'])
  })

  it('counts the rotor and the friction: mR = 19.7392088 kg and 5 N', () => {
    // (10 + 19.7392088)·2 + 5 = 64.4784 N of 25 % = 75 N: 85.97 %.
    const input = axis({ thrustLimit: 25, frictionForce: 5 }, [relative(4, 100)], { rotorInertia: 0.5 })
    expect(told(thrustNeeded, input)).toEqual(['warn: Move 4 needs 64.48 N towards plus to speed up, 85.97 % of the 75 N that its limit leaves.'])
  })

  it('says what it counts as nothing', () => {
    const input = judgeInput(linear({ payloadMass: 10, mountingAngle: 0, thrustLimit: 5 }, [relative(4, 100)]), { nameplate: plate({ ratedThrust: 300 }) })
    expect(told(thrustNeeded, input)[0]).toMatch(/, without the moving mass of the unit, the rotor and friction\.$/)
  })

  it('takes the limit of the move itself, and that of a press only from its approach on', () => {
    expect(told(thrustNeeded, axis({ thrustLimit: 80 }, [relative(4, 100, { forceLimit: 6 })])))
      .toEqual(['stop: Move 4 needs 20 N towards minus to brake, 111.1 % of the 18 N that its limit leaves, and too much to speed up as well.'])
    expect(told(thrustNeeded, axis({ thrustLimit: 80 }, [press(4, 100, 150, { forceLimit: 6 })]))).toEqual([])
    // From its approach on a press is not this rule's: it starts there, and no thrust is asked for.
    expect(told(thrustNeeded, axis({ thrustLimit: 6 }, [absolute(1, 100, { next: 4, acceleration: 1 }), press(4, 100, 150)]))).toEqual([])
  })

  it('turns: 100 kg·cm² at 3600 deg/s² and 0.3 N·m are 0.928318531 N·m of 1 N·m', () => {
    const setup = { payloadInertia: 100, mountingAngle: 0, frictionTorque: 0.3, thrustLimit: 100 }
    const input = judgeInput(rotary(setup, [relative(4, 100, { acceleration: 3600, deceleration: 100 })]), { nameplate: plate({ axisKind: 'rotary', ratedThrust: 1, rotorInertia: 0 }) })
    expect(told(thrustNeeded, input)).toEqual(['warn: Move 4 needs 0.9283 N·m towards plus to speed up, 92.83 % of the 1 N·m that its limit leaves.'])
  })

  it('holds an unbalance either way: 0.5 N·m of 40 %', () => {
    const setup = { payloadInertia: 1, mountingAngle: 90, unbalanceTorque: 0.5, frictionTorque: 0, thrustLimit: 40 }
    const input = judgeInput(rotary(setup, [absolute(4, 100)]), { nameplate: plate({ axisKind: 'rotary', ratedThrust: 1, rotorInertia: 0 }) })
    expect(told(thrustNeeded, input)[0]).toMatch(/^stop: Move 4 needs 0.5 N·m towards plus to hold the load, 125 % of the 0.4 N·m that its limit leaves/)
  })

  it('knows a limit of nothing', () => {
    const [found] = thrustNeeded.judge(axis({ thrustLimit: 0, mountingAngle: 90 }, [relative(4, 100)]))
    expect(found!.message).toMatch(/^Move 4 needs 98.07 N towards plus to hold the load, and its limit leaves none/)
    expect(found!.values).not.toHaveProperty('percent')
  })

  it('names what is missing', () => {
    expect(told(thrustNeeded, judgeInput(linear({}, [absolute(1, 0)])))).toEqual(['unknown: Thrust cannot be judged without payloadMass, mountingAngle and nameplate.ratedThrust.'])
    expect(told(thrustNeeded, judgeInput(rotary({}, [absolute(1, 0)]), { nameplate: plate({ ratedThrust: 1 }) }))).toEqual(['unknown: Thrust cannot be judged without payloadInertia.'])
    const open = axis({ thrustLimitPositive: 50 }, [relative(4, 100)])
    expect(told(thrustNeeded, open)).toEqual(['unknown: Thrust cannot be judged without thrustLimit.'])
    expect(thrustNeeded.judge(open)[0]!.at).toEqual(['/moves/0'])
  })

  it('does not need a limit where the unit tells its peak', () => {
    expect(told(thrustNeeded, axis({}, [relative(4, 100)], { peakThrust: 24 }))[0]).toMatch(/^warn: .*83.33 % of the 24 N/)
  })

  it('does not apply without moves', () => {
    expect(told(thrustNeeded, axis({}, [unused(1)]))).toEqual(['not applicable'])
  })

  it('never says more with a higher limit, nor less with more payload', () => {
    const rank = (setup: Setup) => told(thrustNeeded, axis(setup, [absolute(1, 50), relative(2, -20)])).map(line => line.startsWith('stop') ? 2 : 1).reduce((sum, one) => sum + one, 0)
    fc.assert(fc.property(fc.integer({ min: 1, max: 100 }), fc.integer({ min: 0, max: 50 }), fc.integer({ min: 0, max: 30 }), fc.integer({ min: 0, max: 20 }), fc.constantFrom(-90, 0, 40), (thrustLimit, higher, payloadMass, heavier, mountingAngle) => {
      const here = rank({ thrustLimit, payloadMass, mountingAngle })
      expect(rank({ thrustLimit: thrustLimit + higher, payloadMass, mountingAngle })).toBeLessThanOrEqual(here)
      expect(rank({ thrustLimit, payloadMass: payloadMass + heavier, mountingAngle })).toBeGreaterThanOrEqual(here)
    }))
  })
})
