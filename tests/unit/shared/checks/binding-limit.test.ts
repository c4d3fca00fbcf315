import { describe, expect, it } from 'vitest'
import { bindingLimit } from '../../../../shared/checks/binding-limit'
import type { Setup } from '../../../../shared/settings/types'
import { absolute, judgeInput, linear, plate, press } from '../../../support/check-input'

const nameplate = plate({ ratedThrust: 300, peakThrust: 600 })
const binds = (setup: Setup, sign: 1 | -1, move = absolute(1, 0)) =>
  bindingLimit(judgeInput(linear(setup, [move]), { nameplate }), sign, { move, index: 0 })

describe('bindingLimit', () => {
  it('is the lowest one of that sign, and says where it stands', () => {
    const setup = { thrustLimit: 80, thrustLimitPositive: 60, thrustLimitNegative: 90 }
    expect(binds(setup, 1)).toEqual({ percent: 60, at: ['/setup/thrustLimitPositive'] })
    expect(binds(setup, -1)).toEqual({ percent: 80, at: ['/setup/thrustLimit'] })
  })

  it('is what the unit can do where nothing is set: nowhere in the settings', () => {
    expect(binds({ thrustLimitPositive: 60 }, -1)).toEqual({ percent: 200, at: [] })
    expect(bindingLimit(judgeInput(linear()), 1)).toEqual({ percent: Infinity, at: [] })
  })

  it('is that of the move where it is lower, but not on the way of a press', () => {
    expect(binds({ thrustLimit: 80 }, 1, absolute(1, 0, { forceLimit: 45 }))).toEqual({ percent: 45, at: ['/moves/0/forceLimit'] })
    expect(binds({ thrustLimit: 80 }, 1, absolute(1, 0, { forceLimit: 95 }))).toEqual({ percent: 80, at: ['/setup/thrustLimit'] })
    expect(binds({ thrustLimit: 80 }, 1, press(1, 100, 150, { forceLimit: 30 }))).toEqual({ percent: 80, at: ['/setup/thrustLimit'] })
  })
})
