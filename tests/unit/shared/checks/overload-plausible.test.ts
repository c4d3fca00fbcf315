import { describe, expect, it } from 'vitest'
import { overloadPlausible } from '../../../../shared/checks/overload-plausible'
import { judgeInput, linear, plate, told } from '../../../support/check-input'

const nameplate = plate({ ratedThrust: 300, peakThrust: 600, maxOverloadTime: 1000 })
const overload = (setup: object) => told(overloadPlausible, judgeInput(linear(setup), { nameplate }))

describe('overload-plausible', () => {
  it('is silent for a level that the thrust can pass, within the time of the unit', () => {
    expect(overload({ thrustLimit: 150, overloadLevel: 120, overloadTime: 500 })).toEqual([])
  })

  it('lets the time of the unit itself pass, and stops a millisecond more', () => {
    expect(overload({ overloadTime: 1000 })).toEqual([])
    expect(overload({ overloadTime: 1001 })).toEqual(['stop: The overload time of 1001 ms is 1 ms longer than the 1000 ms that the unit stands.'])
  })

  it('notes a level above every thrust limit: of 90 both ways and 80 one way the highest is 90 %', () => {
    const setup = { thrustLimit: 90, thrustLimitPositive: 80, overloadLevel: 120 }
    expect(overload(setup)).toEqual(['note: The overload level of 120 % lies above every thrust limit, the highest being 90 %: it never trips.'])
    expect(overloadPlausible.judge(judgeInput(linear(setup), { nameplate }))).toMatchObject([{ at: ['/setup/overloadLevel'], values: { level: 120, highest: 90 } }])
  })

  it('lets a level at the highest limit pass, whichever sign has it', () => {
    expect(overload({ thrustLimit: 120, overloadLevel: 120 })).toEqual([])
    expect(overload({ thrustLimitPositive: 80, thrustLimitNegative: 120, overloadLevel: 120 })).toEqual([])
  })

  it('holds the level against what the unit can do where no limit is set: 100·600/300 = 200 %', () => {
    expect(overload({ overloadLevel: 200 })).toEqual([])
    expect(overload({ overloadLevel: 201 })).toEqual(['note: The overload level of 201 % lies above every thrust limit, the highest being 200 %: it never trips.'])
    expect(told(overloadPlausible, judgeInput(linear({ overloadLevel: 900 })))).toEqual([])
  })

  it('names the time that the nameplate lacks', () => {
    expect(told(overloadPlausible, judgeInput(linear({ overloadTime: 500, overloadLevel: 10 }))))
      .toEqual(['unknown: The overload time cannot be judged without nameplate.maxOverloadTime.'])
  })

  it('does not apply without level and time', () => {
    expect(overload({ thrustLimit: 500 })).toEqual(['not applicable'])
  })
})
