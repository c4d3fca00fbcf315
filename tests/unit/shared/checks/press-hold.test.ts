import { describe, expect, it } from 'vitest'
import { pressHold } from '../../../../shared/checks/press-hold'
import type { Move, Setup } from '../../../../shared/settings/types'
import { absolute, judgeInput, linear, plate, press, told } from '../../../support/check-input'

const holds = (forceLimit: number, setup: Setup = {}, rest: Partial<Move> = {}) =>
  judgeInput(linear(setup, [press(6, 100, 150, { forceLimit, ...rest }), absolute(7, 0)]))
const followed = (dwell: number) => ({ next: 7, dwell })

describe('press-hold', () => {
  it('is silent for a hold within the rated thrust, 100 % included', () => {
    expect(told(pressHold, holds(45))).toEqual([])
    expect(told(pressHold, holds(100))).toEqual([])
  })

  it('warns of more than that without end, and not where a move follows', () => {
    const input = holds(120)
    expect(told(pressHold, input)).toEqual(['warn: Press 6 holds with 120 % without end, more than the 100 % that the unit stands: let a move follow.'])
    expect(pressHold.judge(input)).toMatchObject([{ at: ['/moves/0/forceLimit'], values: { move: 6, forceLimit: 120, rated: 100 } }])
    expect(told(pressHold, holds(120, {}, followed(500)))).toEqual([])
  })

  it('counts from the rated thrust where 100 % is the peak: 100·300/600 = 50 %', () => {
    const nameplate = plate({ ratedThrust: 300, peakThrust: 600, forceBase: 'peak-thrust' })
    expect(told(pressHold, { ...holds(50), nameplate })).toEqual([])
    expect(told(pressHold, { ...holds(60), nameplate })).toEqual(['warn: Press 6 holds with 60 % without end, more than the 50 % that the unit stands: let a move follow.'])
  })

  it('stops a hold without end from the overload level on', () => {
    const overload = { overloadLevel: 60, overloadTime: 400 }
    expect(told(pressHold, holds(59.999999, overload))).toEqual([])
    expect(told(pressHold, holds(60, overload))).toEqual(['stop: Press 6 holds with 60 % without end, and from 60 % on the overload trips after 400 ms.'])
    expect(pressHold.judge(holds(60, overload))).toMatchObject([{ at: ['/moves/0/forceLimit', '/setup/overloadLevel'], values: { move: 6, forceLimit: 60, overloadLevel: 60, overloadTime: 400 } }])
  })

  it('stops a dwell that outlasts the overload time, not one that just lasts as long', () => {
    const overload = { overloadLevel: 60, overloadTime: 400 }
    expect(told(pressHold, holds(70, overload, followed(400)))).toEqual([])
    expect(told(pressHold, holds(70, overload, followed(401)))).toEqual(['stop: Press 6 holds with 70 % for 401 ms, and from 60 % on the overload trips after 400 ms.'])
    expect(told(pressHold, holds(50, overload, followed(9000)))).toEqual([])
  })

  it('tells both where both are so', () => {
    expect(told(pressHold, holds(130, { overloadLevel: 120 })).map(line => line.slice(0, 4))).toEqual(['warn', 'stop'])
    expect(told(pressHold, holds(130, { overloadLevel: 120 }))[1]).toMatch(/the overload trips\.$/)
  })

  it('asks for the one of level and time that decides, and for neither where both are absent', () => {
    expect(told(pressHold, holds(50, { overloadTime: 400 }))).toEqual(['unknown: Whether press 6 trips the overload cannot be judged without overloadLevel.'])
    expect(told(pressHold, holds(70, { overloadLevel: 60 }, followed(300)))).toEqual(['unknown: Whether press 6 trips the overload cannot be judged without overloadTime.'])
    expect(told(pressHold, holds(50, { overloadLevel: 60 }, followed(300)))).toEqual([])
    expect(told(pressHold, holds(50, { overloadTime: 400 }, followed(300)))).toEqual([])
    expect(told(pressHold, holds(70, { overloadLevel: 60 }, followed(0)))).toEqual([])
  })

  it('does not apply without a press that has a force', () => {
    expect(told(pressHold, judgeInput(linear({}, [absolute(1, 5, { forceLimit: 500 })])))).toEqual(['not applicable'])
    expect(told(pressHold, judgeInput(linear({}, [press(1, 5, 9, { forceLimit: undefined })])))).toEqual(['not applicable'])
  })
})
