import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { thrustRms } from '../../../../shared/checks/thrust-rms'
import type { JudgeInput } from '../../../../shared/checks/types'
import type { Nameplate } from '../../../../shared/settings/nameplate'
import type { Move, Setup } from '../../../../shared/settings/types'
import { absolute, judgeInput, linear, plate, press, relative, rotary, told } from '../../../support/check-input'

// 9 kg and 1 kg of the unit: 10 kg, 20 N at 2000 mm/s². 100 mm at 250 mm/s take 0.525 s, 0.25 s of it on ramps.
const plateFor = (ratedThrust: number | undefined, more: Partial<Nameplate> = {}) => plate({ ratedThrust, movingMass: 1, rotorInertia: 0, lead: 10, ...more })
const axis = (ratedThrust: number, moves: readonly Move[], setup: Setup = {}, duty?: JudgeInput['axis']['duty']): JudgeInput => ({
  ...judgeInput(linear({ payloadMass: 9, mountingAngle: 0, frictionForce: 0, ...setup }, moves), { nameplate: plateFor(ratedThrust) }),
  axis: { axisKind: 'linear', flags: [], ...duty ? { duty } : {} },
})
const toAndFro = (rest: Partial<Move> = {}) => [absolute(1, 100, { next: 2, ...rest }), absolute(2, 0, { next: 1, ...rest })]

describe('thrust-rms', () => {
  // To and fro: 20·√(0.5/1.05) = 13.801311 N.
  it('is silent up to 85 % of the rated thrust: 13.801311 N are 84.996 % of 16.2375 N', () => {
    expect(told(thrustRms, axis(20, toAndFro()))).toEqual([])
    expect(told(thrustRms, axis(16.2375, toAndFro()))).toEqual([])
  })

  it('warns above 85 % and stops above the rated thrust of an endless chain', () => {
    expect(told(thrustRms, axis(15, toAndFro()))).toEqual(['warn: Moves 1 and 2 without end need 13.8 N in the mean over 1.05 s, 92.01 % of the rated 15 N.'])
    const input = axis(12, toAndFro())
    expect(told(thrustRms, input)).toEqual(['stop: Moves 1 and 2 without end need 13.8 N in the mean over 1.05 s, 115 % of the rated 12 N.'])
    const [found] = thrustRms.judge(input)
    expect(found).toMatchObject({ at: ['/moves/0', '/moves/1'], values: { moves: [1, 2] } })
    expect(found!.values.rms).toBeCloseTo(13.801311, 6)
    expect(found!.values.time).toBeCloseTo(1.05, 12)
    expect(found!.values.percent).toBeCloseTo(115.010927, 5)
  })

  it('lets the rated thrust itself pass as a warning: a load that stands upright needs 98.0665 N all the time', () => {
    const standing = [absolute(1, 50, { next: 1, dwell: 100 })]
    expect(told(thrustRms, axis(98.0665, standing, { mountingAngle: 90 }))).toEqual(['warn: Move 1 without end needs 98.07 N in the mean over 0.1 s, 100 % of the rated 98.0665 N.'])
    expect(told(thrustRms, axis(98, standing, { mountingAngle: 90 }))[0]).toMatch(/^stop: .*100.1 % of the rated 98 N/)
  })

  it('counts dwells: with 0.475 s each the lap takes 2 s, 20·√(0.5/2) = 10 N', () => {
    const [found] = thrustRms.judge(axis(9, toAndFro({ dwell: 475 })))
    expect(found!.values.rms).toBeCloseTo(10, 9)
    expect(found!.level).toBe('stop')
  })

  it('only warns of a chain that ends, as if it began again where it ends', () => {
    // 1 → 0 from where 2 ends, then 0 → 100: the lap of above.
    const input = axis(12, [absolute(1, 0, { next: 2 }), absolute(2, 100)])
    expect(told(thrustRms, input)).toEqual(['warn: Moves 1 and 2, if begun again and again, need 13.8 N in the mean over 1.05 s, 115 % of the rated 12 N.'])
  })

  it('goes over a declared duty, its cycle time included: 1.05 s of 4.2 s, half of 13.801311 N', () => {
    const moves = [absolute(1, 100), absolute(2, 0)]
    const duty = { moves: [1, 2], cycleTime: 4200 }
    const [found] = thrustRms.judge(axis(6, moves, {}, duty))
    expect(found!.values.rms).toBeCloseTo(6.9006556, 6)
    expect(found).toMatchObject({ level: 'stop', message: 'The duty needs 6.901 N in the mean over 4.2 s, 115 % of the rated 6 N.' })
    expect(told(thrustRms, axis(10, moves, {}, duty))).toEqual([])
  })

  it('takes the moves of a duty for as long as they need where the cycle is shorter', () => {
    const [found] = thrustRms.judge(axis(12, [absolute(1, 100), absolute(2, 0)], {}, { moves: [1, 2], cycleTime: 10 }))
    expect(found!.values.time).toBeCloseTo(1.05, 12)
  })

  it('waits in a duty only where the next row is the one that follows', () => {
    const moves = [absolute(1, 100, { next: 2, dwell: 475 }), absolute(2, 0, { next: 3, dwell: 9000 }), absolute(3, 5)]
    const [found] = thrustRms.judge(axis(6, moves, {}, { moves: [1, 2], cycleTime: 1 }))
    expect(found!.values.time).toBeCloseTo(1.525, 9)
  })

  it('holds the press on: 30 % of 300 N through 10 s of dwell', () => {
    const pressing = [absolute(1, 0, { next: 2 }), press(2, 100, 100.1, { forceLimit: 30, next: 1, dwell: 10_000 })]
    const [found] = thrustRms.judge({ ...axis(300, pressing), nameplate: plateFor(300) })
    expect(found).toBeUndefined()
    const [hard] = thrustRms.judge(axis(300, pressing.map(move => ({ ...move, forceLimit: move.kind === 'press' ? 110 : undefined }))))
    // 330 N for 10 s of 11.1 s or so are more than 300 N.
    expect(hard).toMatchObject({ level: 'stop' })
    expect(hard!.values.rms).toBeGreaterThan(310)
    expect(hard!.values.rms).toBeLessThan(330)
  })

  it('lets a press that ends a duty hold on to the end of the cycle', () => {
    const moves = [absolute(1, 0), press(2, 100, 100.1, { forceLimit: 60 })]
    const [found] = thrustRms.judge(axis(180, moves, {}, { moves: [1, 2], cycleTime: 100_000 }))
    // 60 % of 180 N are 108 N nearly all the time: 60 % of the rated thrust, no more.
    expect(found).toBeUndefined()
    const [hard] = thrustRms.judge(axis(180, moves.map(move => ({ ...move, forceLimit: 90 })), {}, { moves: [1, 2], cycleTime: 100_000 }))
    expect(hard).toMatchObject({ level: 'warn' })
    expect(hard!.values.percent).toBeCloseTo(89.5, 0)
  })

  it('names what is missing, moves of a duty too', () => {
    expect(told(thrustRms, judgeInput(linear({}, toAndFro())))).toEqual(['unknown: Thrust over time cannot be judged without payloadMass, mountingAngle and nameplate.ratedThrust.'])
    expect(told(thrustRms, axis(300, [absolute(1, 100)], {}, { moves: [1, 7, 8, 7], cycleTime: 500 })))
      .toEqual(['unknown: Thrust over time cannot be judged without move 7 and move 8.'])
    const onPeak = { ...axis(300, toAndFro()), nameplate: plate({ peakThrust: 300, forceBase: 'peak-thrust' }) }
    expect(told(thrustRms, onPeak)).toEqual(['unknown: Thrust over time cannot be judged without nameplate.ratedThrust.'])
  })

  it('turns, in newton metres: 100 kg·cm² at 2000 deg/s² are 0.34906585 N·m, ·√(0.5/1.05) = 0.24087827 N·m', () => {
    const setup = { payloadInertia: 100, mountingAngle: 0, frictionTorque: 0 }
    const input = judgeInput(rotary(setup, toAndFro()), { nameplate: plate({ axisKind: 'rotary', ratedThrust: 0.25, rotorInertia: 0 }) })
    expect(told(thrustRms, input)).toEqual(['warn: Moves 1 and 2 without end need 0.2409 N·m in the mean over 1.05 s, 96.35 % of the rated 0.25 N·m.'])
  })

  it('does not apply without a chain and a duty', () => {
    expect(told(thrustRms, axis(1, [absolute(1, 100), absolute(2, 0)]))).toEqual(['not applicable'])
  })

  it('never says more with longer dwells on the level, and the same of relative steps wherever they start', () => {
    const steps = (dwell: number) => [relative(1, 60, { next: 2, dwell }), relative(2, -60, { next: 1, dwell })]
    fc.assert(fc.property(fc.integer({ min: 0, max: 900 }), fc.integer({ min: 0, max: 900 }), fc.integer({ min: 1, max: 40 }), (dwell, more, rated) => {
      expect(told(thrustRms, axis(rated, steps(dwell + more))).length).toBeLessThanOrEqual(told(thrustRms, axis(rated, steps(dwell))).length)
    }))
  })
})
