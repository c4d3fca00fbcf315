import { describe, expect, it } from 'vitest'
import { forceRescale } from '../../../../shared/checks/force-rescale'
import { judge } from '../../../../shared/checks/judge'
import { payload } from '../../../../shared/checks/payload'
import { stoppingRoom } from '../../../../shared/checks/stopping-room'
import { thrustNeeded } from '../../../../shared/checks/thrust-needed'
import { thrustRms } from '../../../../shared/checks/thrust-rms'
import { profile, motionAt } from '../../../../shared/motion/profile'
import { torque } from '../../../../shared/motion/rotary-torque'
import { furthestStop } from '../../../../shared/motion/stopping'
import { thrust } from '../../../../shared/motion/thrust'
import type { Setup } from '../../../../shared/settings/types'
import { absolute, judgeInput, linear, plate, press, relative, rotary, soundPlate, soundSetup, told } from '../../../support/check-input'

/*
 * Mistakes that look right. Each test has the right number and the wrong one that the mistake would give, so that the two
 * are told apart by a rule as well as by the formula.
 */

// 9 kg and 1 kg of the unit: 10 kg, 98.0665 N upright; 100 % are 300 N.
const strong = plate({ ratedThrust: 300, movingMass: 1, rotorInertia: 0, lead: 10, hardMargin: 1 })
const hanging: Setup = { payloadMass: 9, mountingAngle: 90, frictionForce: 0 }

describe('traps', () => {
  it('deg/s² are not rad/s²: 0.01 kg·m² at 3600 deg/s² ask 0.628319 N·m, not 36 N·m, which is 57.2958 times as much', () => {
    const wheel = { inertia: 100, rotorInertia: 0, gearRatio: 1, unbalance: 0, tilt: 0, friction: 0 }
    const { most } = torque(wheel, 3600, 1)
    expect(most).toBeCloseTo(0.628318531, 9)
    expect(0.01 * 3600 / most).toBeCloseTo(57.2957795, 6)
    // Of 1 N·m that is 62.8 %: no word. Taken for rad/s² it would be 3600 %.
    const setup = { payloadInertia: 100, mountingAngle: 0, frictionTorque: 0, thrustLimit: 100 }
    const input = judgeInput(rotary(setup, [relative(4, 100, { acceleration: 3600 })]), { nameplate: plate({ axisKind: 'rotary', ratedThrust: 1, rotorInertia: 0 }) })
    expect(told(thrustNeeded, input)).toEqual([])
  })

  it('lowering a load takes thrust upwards: on the way down at 1000 mm/s² 98.0665 − 10 = 88.0665 N towards plus', () => {
    expect(thrust({ mass: 10, turningMass: 0, mountingAngle: 90, friction: 0 }, -1000, -1)).toBeCloseTo(88.0665, 9)
    expect(thrust({ mass: 10, turningMass: 0, mountingAngle: 90, friction: 7 }, 0, -1)).toBeCloseTo(91.0665, 9)
    const down = (setup: Setup) => told(thrustNeeded, judgeInput(linear({ ...hanging, ...setup }, [relative(4, -100, { acceleration: 1000 })]), { nameplate: strong }))
    // Towards minus it needs nothing, so that no limit there matters; 36 % = 108 N towards plus brake 98.0665 + 10 = 108.0665 N not.
    expect(down({ thrustLimitPositive: 50, thrustLimitNegative: 0 })).toEqual([])
    expect(down({ thrustLimitPositive: 36, thrustLimitNegative: 100 })[0]).toMatch(/^stop: Move 4 needs 108\.1 N towards plus to brake/)
  })

  it('between level and upright it is 1/P that is linear: at 30 deg 17.142857 kg of 30 and 12, not 21', () => {
    const at = (payloadMass: number) => told(payload, judgeInput(linear({ payloadMass, mountingAngle: 30 }), { nameplate: plate({ maxPayloadLevel: 30, maxPayloadVertical: 12 }) }))
    expect(at(17.14)).toEqual([])
    expect(at(17.15)).toHaveLength(1)
    // 30 − (30 − 12)·0.5 = 21 by a straight line.
    expect(at(20.99)).toHaveLength(1)
  })

  it('RMS counts holding: a load that hangs still heats the motor with 98.0665 N, a level one with nothing', () => {
    const chain = [absolute(1, 100, { next: 2, dwell: 60000 }), absolute(2, 0, { next: 1, dwell: 60000 })]
    const over = (mountingAngle: number) => told(thrustRms, judgeInput(linear({ ...hanging, mountingAngle }, chain), { nameplate: { ...strong, ratedThrust: 98 } }))
    expect(over(90)[0]).toMatch(/^stop: .*98\.\d+ N/)
    expect(over(0)).toEqual([])
  })

  it('a quick stop harder than the ramp ends before the target: at 182.375 + 7.8125 = 190.1875 mm, not at 198 + 7.8125 = 205.8125', () => {
    const way = profile(absolute(2, 198), 0)
    const brakesFrom = 198 - 250 ** 2 / 4000
    expect(motionAt(way, way.segments.at(-1)!.t0)).toEqual({ x: brakesFrom, v: 250 })
    expect(brakesFrom + 250 ** 2 / 8000).toBe(190.1875)
    expect(furthestStop(way, 4000, 1)).toBeCloseTo(198, 9)
    // The hard stop stands at 200.5 mm: before the wrong place, beyond the right one.
    const setup: Setup = { softLimitMin: 0, softLimitMax: 198, homingMethod: 'hard-stop', homingDirection: 'negative', homeOffset: 1.5, quickStopDeceleration: 4000, payloadMass: 9, mountingAngle: 0, frictionForce: 0, thrustLimit: 100 }
    expect(told(stoppingRoom, judgeInput(linear(setup, [absolute(1, 0, { next: 2 }), absolute(2, 198)]), { nameplate: strong }))).toEqual([])
  })

  it('0/0 is no time: a move to where the axis stands takes 0 s at 0 mm/s, and no rule says NaN', () => {
    for (const move of [absolute(1, 50), relative(1, 0), press(1, 50, 50)]) {
      expect(profile(move, 50)).toMatchObject({ segments: [], duration: 0, peakSpeed: 0, end: 50 })
    }
    const still = [absolute(1, 50, { next: 2 }), absolute(2, 50, { next: 3 }), relative(3, 0, { next: 4 }), press(4, 50, 50, { next: 1 })]
    const { results } = judge(judgeInput(linear(soundSetup, still), { nameplate: soundPlate, axis: { axisKind: 'linear', flags: ['press'], duty: { moves: [1, 2, 3, 4], cycleTime: 1000 } } }))
    expect(results.length).toBeGreaterThan(0)
    for (const { message, values } of results) {
      expect(message).not.toMatch(/NaN|Infinity|undefined/)
      for (const value of Object.values(values).flat()) if (typeof value === 'number') expect(value, message).not.toBeNaN()
    }
  })

  it('a % of rated thrust is another force on another unit: 38 % of 640 N are 243.2 N, of 800 N 304 N', () => {
    const brought = (forceBase: number) => told(forceRescale, judgeInput(linear({ thrustLimit: 38 }), { nameplate: plate({ ratedThrust: 800 }), broughtFrom: { forceBase, rescaled: false } }))
    expect(brought(640)[0]).toMatch(/^stop: .*243\.2 N and would be 304 N/)
    expect(brought(800)).toEqual([])
  })
})
