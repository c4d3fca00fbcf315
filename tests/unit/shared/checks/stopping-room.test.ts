import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { stoppingRoom } from '../../../../shared/checks/stopping-room'
import type { Nameplate } from '../../../../shared/settings/nameplate'
import type { Move, Setup } from '../../../../shared/settings/types'
import { absolute, judgeInput, linear, plate, press, relative, rotary, told, unused } from '../../../support/check-input'

// Home at the lower hard stop, which reads −homeOffset = −1.5: hard stops −1.5 and −1.5 + 200 + 2·1 = 200.5 mm.
const homing = { homingMethod: 'hard-stop', homingDirection: 'negative', homeOffset: 1.5 } as const
const nameplate = plate({ ratedThrust: 300, hardMargin: 1, movingMass: 1, rotorInertia: 0, lead: 10 })
const axis = (setup: Setup, moves: readonly Move[], more: Partial<Nameplate> = {}) => judgeInput(linear({
  softLimitMin: 0, softLimitMax: 198, quickStopDeceleration: 2000, payloadMass: 9, mountingAngle: 0, frictionForce: 0, thrustLimit: 100, ...homing, ...setup,
}, moves), { nameplate: { ...nameplate, ...more } })
/** 0 → target, so that only the way up counts. */
const up = (target: number, rest: Partial<Move> = {}) => [absolute(1, 0, { next: 2, speed: 1, acceleration: 1 }), absolute(2, target, rest)]

describe('stopping-room', () => {
  it('is silent for a quick stop as hard as the braking: it ends at the target at the latest', () => {
    expect(told(stoppingRoom, axis({}, [absolute(1, 198), absolute(2, 0)]))).toEqual([])
  })

  it('warns of one that ends beyond the hard stop: 190 − 15.625 + 250²/(2·1000) = 205.625, 5.125 mm beyond 200.5', () => {
    const input = axis({ quickStopDeceleration: 1000 }, up(190))
    expect(told(stoppingRoom, input)).toEqual(['warn: A quick stop in move 2 from 250 mm/s ends at 205.6 mm, 5.125 mm beyond the hard stop at 200.5 mm.'])
    const [found] = stoppingRoom.judge(input)
    expect(found).toMatchObject({ at: ['/moves/1/speed', '/setup/quickStopDeceleration'], values: { move: 2, hardStop: 200.5, speed: 250 } })
    expect(found!.values.stop).toBeCloseTo(205.625, 9)
    expect(found!.values.beyond).toBeCloseTo(5.125, 9)
  })

  it('lets a stop at the hard stop itself pass: 184.875 − 15.625 + 31.25 = 200.5', () => {
    expect(told(stoppingRoom, axis({ quickStopDeceleration: 1000 }, up(184.875)))).toEqual([])
    expect(told(stoppingRoom, axis({ quickStopDeceleration: 1000 }, up(184.876)))).toHaveLength(1)
    // At a hard stop of 0 as well, where no share of it can count as lost digits.
    expect(told(stoppingRoom, axis({ homeOffset: 0, quickStopDeceleration: 100 }, [absolute(1, 0, { speed: 1, acceleration: 100 })]))).toEqual([])
  })

  it('looks at the lower stop on the way back: 5 + 15.625 − 31.25 = −10.625, 9.125 mm beyond −1.5', () => {
    const down = [absolute(1, 190, { next: 2, speed: 1, acceleration: 1 }), absolute(2, 5)]
    expect(told(stoppingRoom, axis({ quickStopDeceleration: 1000 }, down))).toEqual(['warn: A quick stop in move 2 from 250 mm/s ends at −10.62 mm, 9.125 mm beyond the hard stop at −1.5 mm.'])
  })

  it('goes by the speed that is really reached: √(2000·10) = 141.42 mm/s from 193 mm on', () => {
    const short = [absolute(1, 188, { next: 2, speed: 1, acceleration: 1 }), absolute(2, 198)]
    // At 250 mm/s it would end at 213.625; from 193 at 141.42 mm/s it ends at 193 + 10 = 203.
    const [found] = stoppingRoom.judge(axis({ quickStopDeceleration: 1000 }, short))
    expect(found!.values.speed).toBeCloseTo(Math.sqrt(20000), 9)
    expect(found!.values.stop).toBeCloseTo(203, 9)
  })

  it('brakes with what the thrust can do: 15 N give 10 kg 1500 mm/s², 9 N give 900 mm/s²', () => {
    // 5 %: 190 − 15.625 + 250²/3000 = 195.2083 mm. 3 %: 209.0972 mm.
    expect(told(stoppingRoom, axis({ quickStopDeceleration: 9000, thrustLimit: 5 }, up(190)))).toEqual([])
    const [found] = stoppingRoom.judge(axis({ quickStopDeceleration: 9000, thrustLimit: 3 }, up(190)))
    expect(found!.values.stop).toBeCloseTo(190 - 15.625 + 62500 / 1800, 9)
  })

  it('never ends where the thrust cannot hold the load: 30 N against 98.0665 N on the way down', () => {
    const down = [absolute(1, 190, { next: 2, speed: 1, acceleration: 1 }), absolute(2, 50)]
    const input = axis({ mountingAngle: 90, thrustLimit: 10 }, down)
    expect(told(stoppingRoom, input).at(-1)).toBe('warn: A quick stop in move 2 from 250 mm/s never ends: the thrust cannot brake the load before the hard stop at −1.5 mm.')
    expect(stoppingRoom.judge(input).at(-1)!.values).not.toHaveProperty('stop')
  })

  it('has the limit of the thrust against the motion: towards plus it is the negative one', () => {
    expect(told(stoppingRoom, axis({ quickStopDeceleration: 9000, thrustLimitNegative: 3 }, up(190)))).toHaveLength(1)
    expect(told(stoppingRoom, axis({ quickStopDeceleration: 9000, thrustLimitPositive: 3 }, up(190)))).toEqual([])
  })

  it('judges a move that nobody names in both directions', () => {
    const lines = told(stoppingRoom, axis({ quickStopDeceleration: 600 }, [absolute(1, 20)]))
    // Down: 20 + 15.625 − 250²/1200 = −16.458333 mm.
    expect(lines).toEqual(['warn: A quick stop in move 1 from 250 mm/s ends at −16.46 mm, 14.96 mm beyond the hard stop at −1.5 mm.'])
  })

  it('tells the furthest of several ways: from 188 to 190 it gets no quicker than 63.2 mm/s', () => {
    const ways = [absolute(1, 188, { next: 3, speed: 1, acceleration: 1 }), absolute(2, 0, { next: 3, speed: 1, acceleration: 1 }), absolute(3, 190)]
    const [found] = stoppingRoom.judge(axis({ quickStopDeceleration: 150 }, ways))
    // 190 − 15.625 + 250²/300 = 382.708 mm, and 189 + 4000/300 = 202.333 mm from nearby: both beyond.
    expect(found!.values.stop).toBeCloseTo(382.708333, 5)
  })

  it('leaves a relative move alone whose place nobody knows, and takes it where it is known', () => {
    expect(told(stoppingRoom, axis({ quickStopDeceleration: 100 }, [relative(1, 50)]))).toEqual([])
    expect(told(stoppingRoom, axis({ quickStopDeceleration: 1000 }, [absolute(1, 140, { next: 2, speed: 1, acceleration: 1 }), relative(2, 50)])))
      .toEqual(['warn: A quick stop in move 2 from 250 mm/s ends at 205.6 mm, 5.125 mm beyond the hard stop at 200.5 mm.'])
  })

  it('sees a press through to its target', () => {
    expect(told(stoppingRoom, axis({ quickStopDeceleration: 1000 }, [absolute(1, 0, { next: 2, speed: 1, acceleration: 1 }), press(2, 190, 195)]))).toHaveLength(1)
    expect(told(stoppingRoom, axis({ quickStopDeceleration: 1000 }, [absolute(1, 0, { next: 2, speed: 1, acceleration: 1 }), press(2, 150, 195)]))).toEqual([])
  })

  it('passes by the soft limits where other homing hides the hard stops, a hard margin beyond them', () => {
    const elsewhere = { homingMethod: 'limit-switch', quickStopDeceleration: 1000 } as const
    // 183.375 − 15.625 + 31.25 = 199 = 198 + 1.
    expect(told(stoppingRoom, axis(elsewhere, up(183.375)))).toEqual([])
    expect(told(stoppingRoom, axis(elsewhere, up(190)))).toEqual(['unknown: The room for a quick stop cannot be judged without place of the hard stops.'])
    expect(told(stoppingRoom, axis({ ...elsewhere, softLimitMax: undefined }, up(100)))).toHaveLength(1)
  })

  it('still warns by the deceleration asked where the load is not known, and names what is missing', () => {
    expect(told(stoppingRoom, axis({ payloadMass: undefined }, up(190)))).toEqual(['unknown: The room for a quick stop cannot be judged without payloadMass.'])
    expect(told(stoppingRoom, axis({ payloadMass: undefined, quickStopDeceleration: 1000 }, up(190))).map(line => line.slice(0, 4))).toEqual(['warn', 'unkn'])
    expect(told(stoppingRoom, axis({ quickStopDeceleration: undefined }, up(190)))).toEqual(['unknown: The room for a quick stop cannot be judged without quickStopDeceleration.'])
  })

  it('does not apply to an axis that turns on, and without moves', () => {
    expect(told(stoppingRoom, judgeInput(rotary({ modulo: 360 }, [absolute(1, 0)])))).toEqual(['not applicable'])
    expect(told(stoppingRoom, axis({}, [unused(1)]))).toEqual(['not applicable'])
  })

  it('never warns more of a harder quick stop or a stronger unit', () => {
    fc.assert(fc.property(fc.integer({ min: 100, max: 3000 }), fc.integer({ min: 0, max: 3000 }), fc.integer({ min: 5, max: 60 }), fc.integer({ min: 0, max: 40 }), fc.constantFrom(-90, 0, 90), fc.integer({ min: 0, max: 198 }), (quickStopDeceleration, harder, thrustLimit, stronger, mountingAngle, target) => {
      const warns = (setup: Setup) => told(stoppingRoom, axis({ mountingAngle, ...setup }, [absolute(1, target)])).length
      const here = warns({ quickStopDeceleration, thrustLimit })
      expect(warns({ quickStopDeceleration: quickStopDeceleration + harder, thrustLimit })).toBeLessThanOrEqual(here)
      expect(warns({ quickStopDeceleration, thrustLimit: thrustLimit + stronger })).toBeLessThanOrEqual(here)
    }))
  })
})
