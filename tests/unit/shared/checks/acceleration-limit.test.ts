import { describe, expect, it } from 'vitest'
import { accelerationLimit } from '../../../../shared/checks/acceleration-limit'
import { absolute, judgeInput, linear, plate, rotary, told, unused } from '../../../support/check-input'

const nameplate = plate({ maxAcceleration: 5000 })
const accelerations = (setup = {}, ...moves: Parameters<typeof linear>[1] & object) => told(accelerationLimit, judgeInput(linear(setup, moves), { nameplate }))

describe('acceleration-limit', () => {
  it('is silent up to the acceleration of the unit, that value included', () => {
    expect(accelerations({}, absolute(1, 0, { acceleration: 5000, deceleration: 5000 }))).toEqual([])
  })

  it('stops above it, once where braking is as accelerating: 5500 − 5000 = 500 mm/s²', () => {
    expect(accelerations({}, absolute(1, 0, { acceleration: 5500 })))
      .toEqual(['stop: Move 1: an acceleration of 5500 mm/s² is 500 mm/s² above the 5000 mm/s² that the unit can do.'])
    const input = judgeInput(linear({}, [absolute(1, 0, { deceleration: 6000 })]), { nameplate })
    expect(accelerationLimit.judge(input)).toMatchObject([{ level: 'stop', at: ['/moves/0/deceleration'], values: { move: 1, value: 6000, limit: 5000 } }])
  })

  it('lets the acceleration of the unit and those of the setup pass, and not a millionth more', () => {
    const own = { accelerationLimit: 4000, decelerationLimit: 3000 }
    expect(accelerations(own, absolute(1, 0, { acceleration: 4000, deceleration: 3000 }))).toEqual([])
    expect(accelerations({}, absolute(1, 0, { acceleration: 5000.000001 }))).toEqual(['stop: Move 1: an acceleration of 5000.000001 mm/s² is 0.000001 mm/s² above the 5000 mm/s² that the unit can do.'])
    expect(accelerations(own, absolute(1, 0, { acceleration: 4000.000001, deceleration: 3000.000001 })).map(line => line.slice(0, 30))).toEqual(['warn: Move 1: an acceleration o', 'warn: Move 1: a deceleration of'].map(line => line.slice(0, 30)))
  })

  it('judges homing and the setup’s own limits, the quick stop aside', () => {
    expect(accelerations({ homingAcceleration: 5001, accelerationLimit: 5002, decelerationLimit: 5003, quickStopDeceleration: 20000 }).map(line => line.slice(0, 40))).toEqual([
      'stop: The homing acceleration of 5001 mm', 'stop: The acceleration limit of 5002 mm/', 'stop: The deceleration limit of 5003 mm/',
    ])
  })

  it('warns of moves that the setup clips, each way by its own limit', () => {
    const setup = { accelerationLimit: 1000, decelerationLimit: 3000, quickStopDeceleration: 9000 }
    expect(accelerations(setup, absolute(1, 0, { acceleration: 1000, deceleration: 3000 }))).toEqual([])
    expect(accelerations(setup, absolute(1, 0, { acceleration: 1500, deceleration: 3500 }))).toEqual([
      'warn: Move 1: an acceleration of 1500 mm/s² is above the setup\'s limit of 1000 mm/s²: the drive clips it and the move takes longer than it says.',
      'warn: Move 1: a deceleration of 3500 mm/s² is above the setup\'s limit of 3000 mm/s²: the drive clips it and the move takes longer than it says.',
    ])
  })

  it('counts the acceleration as deceleration where a move has none of its own', () => {
    const input = judgeInput(linear({ decelerationLimit: 1000 }, [absolute(1, 0, { acceleration: 2000 })]), { nameplate })
    expect(accelerationLimit.judge(input)).toMatchObject([{ level: 'warn', at: ['/moves/0/acceleration', '/setup/decelerationLimit'], values: { value: 2000, limit: 1000 } }])
  })

  it('speaks degrees on a rotary axis and names what is missing', () => {
    expect(told(accelerationLimit, judgeInput(rotary({}, [absolute(1, 0)])))).toEqual(['unknown: Accelerations cannot be judged without nameplate.maxAcceleration.'])
    expect(told(accelerationLimit, judgeInput(rotary({}, [absolute(1, 0, { acceleration: 5001 })]), { nameplate }))[0]).toMatch(/5001 deg\/s² is 1 deg\/s² above/)
  })

  it('does not apply where nothing accelerates', () => {
    expect(accelerations({ quickStopDeceleration: 9000 }, unused(1))).toEqual(['not applicable'])
  })
})
