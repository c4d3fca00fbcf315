import { describe, expect, it } from 'vitest'
import { speedLimit } from '../../../../shared/checks/speed-limit'
import { absolute, judgeInput, linear, plate, press, told, unused } from '../../../support/check-input'

const nameplate = plate({ maxSpeed: 800 })
const speeds = (setup = {}, ...moves: Parameters<typeof linear>[1] & object) => told(speedLimit, judgeInput(linear(setup, moves), { nameplate }))

describe('speed-limit', () => {
  it('is silent up to the speed of the unit, that speed included', () => {
    expect(speeds({ jogSpeed: 50 }, absolute(1, 0, { speed: 250 }), absolute(2, 0, { speed: 800 }))).toEqual([])
  })

  it('stops above it: 900 − 800 = 100 mm/s', () => {
    const input = judgeInput(linear({}, [absolute(1, 0), absolute(5, 0, { speed: 900 })]), { nameplate })
    expect(told(speedLimit, input)).toEqual(['stop: Move 5: a speed of 900 mm/s is 100 mm/s above the 800 mm/s that the unit can do.'])
    expect(speedLimit.judge(input)).toMatchObject([{ at: ['/moves/1/speed'], values: { move: 5, value: 900, limit: 800 } }])
  })

  it('lets the speed of the unit and that of the setup pass, and not a millionth more', () => {
    expect(speeds({ speedLimit: 800 }, absolute(1, 0, { speed: 800 }))).toEqual([])
    expect(speeds({}, absolute(1, 0, { speed: 800.000001 }))).toEqual(['stop: Move 1: a speed of 800.000001 mm/s is 0.000001 mm/s above the 800 mm/s that the unit can do.'])
    expect(speeds({ speedLimit: 700 }, absolute(1, 0, { speed: 700.000001 }))[0]).toMatch(/^warn: Move 1: a speed of 700.000001 mm\/s is above the setup's limit of 700 mm\/s/)
  })

  it('judges press, homing and jog speeds and the limit itself', () => {
    const setup = { homingSpeed: 801, homingCreepSpeed: 802, speedLimit: 803, jogSpeed: 804, pressSpeed: 805 }
    expect(speeds(setup, press(2, 100, 150, { pressSpeed: 806 }))).toEqual([
      'stop: Press 2: a press speed of 806 mm/s is 6 mm/s above the 800 mm/s that the unit can do.',
      'stop: The homing speed of 801 mm/s is 1 mm/s above the 800 mm/s that the unit can do.',
      'stop: The homing creep speed of 802 mm/s is 2 mm/s above the 800 mm/s that the unit can do.',
      'stop: The speed limit of 803 mm/s is 3 mm/s above the 800 mm/s that the unit can do.',
      'stop: The jog speed of 804 mm/s is 4 mm/s above the 800 mm/s that the unit can do.',
      'stop: The press speed of 805 mm/s is 5 mm/s above the 800 mm/s that the unit can do.',
      'warn: Press 2: a press speed of 806 mm/s is above the setup\'s limit of 803 mm/s: the drive clips it and the move takes longer than it says.',
    ])
  })

  it('warns of moves that the setup clips, not of homing and jogging', () => {
    expect(speeds({ speedLimit: 200, jogSpeed: 300, homingSpeed: 300 }, absolute(1, 0, { speed: 200 }), absolute(2, 0, { speed: 250 })))
      .toEqual(['warn: Move 2: a speed of 250 mm/s is above the setup\'s limit of 200 mm/s: the drive clips it and the move takes longer than it says.'])
  })

  it('warns of the setup’s own press speed once for each press that uses it', () => {
    const input = judgeInput(linear({ speedLimit: 20, pressSpeed: 30 }, [
      press(1, 100, 150, { speed: 20, pressSpeed: undefined }), press(2, 100, 150, { speed: 20, pressSpeed: 10 }),
    ]), { nameplate })
    expect(speedLimit.judge(input)).toMatchObject([{ level: 'warn', at: ['/setup/pressSpeed', '/setup/speedLimit'], values: { move: 1 } }])
  })

  it('names the missing nameplate and still holds moves against the setup', () => {
    const lines = told(speedLimit, judgeInput(linear({ speedLimit: 200 }, [absolute(2, 0)])))
    expect(lines[0]).toBe('unknown: Speeds cannot be judged without nameplate.maxSpeed.')
    expect(lines[1]).toMatch(/^warn: Move 2: a speed of 250/)
  })

  it('does not apply where nothing has a speed', () => {
    expect(speeds({}, unused(3))).toEqual(['not applicable'])
  })
})
