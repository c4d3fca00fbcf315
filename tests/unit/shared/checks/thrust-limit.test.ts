import { describe, expect, it } from 'vitest'
import { thrustLimit } from '../../../../shared/checks/thrust-limit'
import { judgeInput, linear, plate, told } from '../../../support/check-input'

const rated = plate({ ratedThrust: 300, peakThrust: 600 })
const limits = (setup: object, nameplate: ReturnType<typeof plate> | undefined = rated) => judgeInput(linear(setup), { nameplate })

describe('thrust-limit', () => {
  it('is silent up to what the unit stands without end, that included', () => {
    expect(told(thrustLimit, limits({ thrustLimit: 80 }))).toEqual([])
    expect(told(thrustLimit, limits({ thrustLimit: 100, thrustLimitPositive: 90, thrustLimitNegative: 100 }))).toEqual([])
  })

  it('stops above the peak of the unit: 100·600/300 = 200 %, 250 is 50 points more', () => {
    const input = limits({ thrustLimit: 250, overloadLevel: 120 })
    expect(told(thrustLimit, input)).toEqual(['stop: The thrust limit of 250 % is 50 points above the 200 % that the unit can do at most.'])
    expect(thrustLimit.judge(input)).toMatchObject([{ at: ['/setup/thrustLimit'], values: { value: 250, peak: 200, rated: 100 } }])
  })

  it('lets the peak itself pass as what it is: more than the rated thrust', () => {
    expect(told(thrustLimit, limits({ thrustLimit: 200, overloadLevel: 120 }))).toHaveLength(1)
    expect(told(thrustLimit, limits({ thrustLimit: 200, overloadLevel: 120 }))[0]).toMatch(/^note: /)
    expect(told(thrustLimit, limits({ thrustLimit: 200.001, overloadLevel: 120 }))[0]).toMatch(/^stop: /)
  })

  it('warns above the rated thrust where nothing ends it, and notes it where an overload does', () => {
    expect(told(thrustLimit, limits({ thrustLimit: 150 })))
      .toEqual(['warn: The thrust limit of 150 % is 50 points more than the unit stands without end, and neither an overload level nor an overload time ends it.'])
    expect(told(thrustLimit, limits({ thrustLimit: 150, overloadLevel: 110, overloadTime: 500 })))
      .toEqual(['note: The thrust limit of 150 % is 50 points more than the unit stands without end: the overload ends it above 110 % after 500 ms.'])
    expect(told(thrustLimit, limits({ thrustLimit: 150, overloadTime: 500 }))[0]).toMatch(/ends it after 500 ms\.$/)
    expect(told(thrustLimit, limits({ thrustLimit: 150, overloadLevel: 110 }))[0]).toMatch(/ends it above 110 %\.$/)
  })

  it('judges both one-sided limits by themselves', () => {
    expect(told(thrustLimit, limits({ thrustLimitPositive: 250, thrustLimitNegative: 150 }))).toEqual([
      'stop: The thrust limit towards plus of 250 % is 50 points above the 200 % that the unit can do at most.',
      'warn: The thrust limit towards minus of 150 % is 50 points more than the unit stands without end, and neither an overload level nor an overload time ends it.',
    ])
  })

  it('takes 100 % for the peak where the nameplate says so: rated are 50 % then', () => {
    const peak = plate({ ratedThrust: 300, peakThrust: 600, forceBase: 'peak-thrust' })
    expect(told(thrustLimit, limits({ thrustLimit: 50 }, peak))).toEqual([])
    expect(told(thrustLimit, limits({ thrustLimit: 60 }, peak))[0]).toMatch(/^warn: .*10 points more/)
    expect(told(thrustLimit, limits({ thrustLimit: 110 }, peak))[0]).toMatch(/^stop: .*10 points above the 100 %/)
  })

  it('does without the peak, and names the rated thrust where the peak says nothing without it', () => {
    expect(told(thrustLimit, limits({ thrustLimit: 500 }, plate({ ratedThrust: 300 })))[0]).toMatch(/^warn: /)
    expect(told(thrustLimit, judgeInput(linear({ thrustLimit: 500 })))[0]).toMatch(/^warn: /)
    const input = limits({ thrustLimit: 150, overloadTime: 9 }, plate({ peakThrust: 600 }))
    expect(told(thrustLimit, input)).toHaveLength(2)
    expect(told(thrustLimit, input)[1]).toBe('unknown: Thrust limits cannot be judged without nameplate.ratedThrust.')
    expect(told(thrustLimit, limits({ thrustLimit: 90 }, plate({ peakThrust: 600 })))).toEqual([])
  })

  it('does not apply without a limit', () => {
    expect(told(thrustLimit, limits({ overloadLevel: 120 }))).toEqual(['not applicable'])
  })
})
