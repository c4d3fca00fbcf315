import { describe, expect, it } from 'vitest'
import { pressForce } from '../../../../shared/checks/press-force'
import { absolute, judgeInput, linear, plate, press, rotary, told } from '../../../support/check-input'

const nameplate = plate({ pressForceMin: 20, pressForceMax: 70 })
const pushes = (forceLimit: number, setup = {}, towards = 150) =>
  told(pressForce, judgeInput(linear({ thrustLimit: 100, ...setup }, [press(6, 100, towards, { forceLimit })]), { nameplate }))

describe('press-force', () => {
  it('is silent within the range of the unit, its ends included', () => {
    expect(pushes(20)).toEqual([])
    expect(pushes(45)).toEqual([])
    expect(pushes(70)).toEqual([])
  })

  it('stops what is above or below: 120 − 70 = 50 points, 20 − 12.5 = 7.5 points', () => {
    expect(pushes(120)).toEqual([
      'stop: Press 6 pushes with 120 %, 50 points above the 70 % that the unit may press with.',
      'stop: Press 6 pushes with 120 %, 20 points above the thrust limit of 100 % that way.',
    ])
    expect(pushes(12.5)).toEqual(['stop: Press 6 pushes with 12.5 %, 7.5 points below the 20 % from which the unit holds a press force.'])
    expect(pushes(70.000001)).toHaveLength(1)
  })

  it('lets each end of the range and the thrust limit itself pass, and not a millionth beyond', () => {
    expect([20, 70].map(percent => pushes(percent, { thrustLimit: 70 }))).toEqual([[], []])
    expect(pushes(19.999999)).toEqual(['stop: Press 6 pushes with 19.999999 %, 0.000001 points below the 20 % from which the unit holds a press force.'])
    expect(pushes(70.000001, { thrustLimit: 80 })).toEqual(['stop: Press 6 pushes with 70.000001 %, 0.000001 points above the 70 % that the unit may press with.'])
    expect(pushes(60.000001, { thrustLimit: 60 })).toEqual(['stop: Press 6 pushes with 60.000001 %, 0.000001 points above the thrust limit of 60 % that way.'])
  })

  it('takes the lower of the two thrust limits of the way it pushes', () => {
    const setup = { thrustLimit: 60, thrustLimitPositive: 40, thrustLimitNegative: 50 }
    expect(pushes(45, setup)).toEqual(['stop: Press 6 pushes with 45 %, 5 points above the thrust limit of 40 % that way.'])
    expect(pushes(45, setup, 50)).toEqual([])
    expect(pushes(55, setup, 50)).toEqual(['stop: Press 6 pushes with 55 %, 5 points above the thrust limit of 50 % that way.'])
    expect(pushes(55, { thrustLimit: 50, thrustLimitPositive: 90 })).toEqual(['stop: Press 6 pushes with 55 %, 5 points above the thrust limit of 50 % that way.'])
    expect(pushes(60, { thrustLimit: 60 })).toEqual([])
  })

  it('points at both values and tells the force on the part', () => {
    // 80 % of 300 N = 240 N; upwards 4 kg + 1 kg weigh 5·9.80665 = 49.03325 N, friction 10 N: 240 − 49.03325 − 10 = 180.96675 N.
    const setup = { thrustLimit: 60, payloadMass: 4, mountingAngle: 90, frictionForce: 10 }
    const input = judgeInput(linear(setup, [press(6, 100, 150, { forceLimit: 80 })]), { nameplate: plate({ ...nameplate, pressForceMax: 90, ratedThrust: 300, movingMass: 1 }) })
    const [found] = pressForce.judge(input)
    expect(found).toMatchObject({ at: ['/moves/0/forceLimit', '/setup/thrustLimit'], values: { move: 6, forceLimit: 80, limit: 60 } })
    expect(found!.values.onPart).toBeCloseTo(180.96675, 9)
  })

  it('lets the weight help a press that pushes down, and takes peak thrust where that is 100 %', () => {
    // 80 % of 500 N = 400 N; down: 400 + 49.03325 − 0 = 449.03325 N.
    const setup = { thrustLimit: 60, payloadMass: 5, mountingAngle: 90 }
    const input = judgeInput(linear(setup, [press(6, 150, 100, { forceLimit: 80 })]), {
      nameplate: plate({ pressForceMin: 20, pressForceMax: 90, ratedThrust: 300, peakThrust: 500, forceBase: 'peak-thrust' }),
    })
    expect(pressForce.judge(input)[0]!.values.onPart).toBeCloseTo(449.03325, 9)
  })

  it('leaves the force on the part out where it cannot be told', () => {
    const rated = { nameplate: plate({ ...nameplate, ratedThrust: 300 }) }
    const linearPress = judgeInput(linear({ thrustLimit: 60, mountingAngle: 90 }, [press(6, 100, 150, { forceLimit: 80 })]), rated)
    const rotaryPress = judgeInput(rotary({ thrustLimit: 60, mountingAngle: 90 }, [press(6, 100, 150, { forceLimit: 80 })]), rated)
    expect(pressForce.judge(linearPress)[0]!.values).not.toHaveProperty('onPart')
    expect(pressForce.judge(rotaryPress)[0]!.values).not.toHaveProperty('onPart')
  })

  it('names what is missing, once for all presses', () => {
    const input = judgeInput(linear({}, [press(6, 100, 150), press(7, 100, 150)]))
    expect(told(pressForce, input)).toEqual(['unknown: Press force cannot be judged without nameplate.pressForceMin, nameplate.pressForceMax and thrustLimit.'])
    expect(pressForce.judge(input)[0]!.at).toEqual(['/moves/0/forceLimit', '/moves/1/forceLimit'])
  })

  it('does without a general thrust limit where the one of that way is given', () => {
    expect(pushes(45, { thrustLimit: undefined, thrustLimitPositive: 45 })).toEqual([])
    expect(pushes(45, { thrustLimit: undefined, thrustLimitNegative: 45 })).toEqual(['unknown: Press force cannot be judged without thrustLimit.'])
  })

  it('does not apply without a press', () => {
    expect(told(pressForce, judgeInput(linear({}, [absolute(1, 5, { forceLimit: 500 })])))).toEqual(['not applicable'])
  })
})
