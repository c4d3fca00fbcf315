import { describe, expect, it } from 'vitest'
import { travelSpan } from '../../../../shared/checks/travel-span'
import { judgeInput, linear, plate, rotary, told } from '../../../support/check-input'

const span = (softLimitMin?: number, softLimitMax?: number, stroke = 200) =>
  judgeInput(linear({ softLimitMin, softLimitMax }), { nameplate: plate({ stroke }) })

describe('travel-span', () => {
  it('is silent for 198 − 0 = 198 mm on a stroke of 200 mm', () => {
    expect(told(travelSpan, span(0, 198))).toEqual([])
  })

  it('stops 205 − 0 = 205 mm on 200 mm, 5 mm too many', () => {
    const input = span(0, 205)
    expect(told(travelSpan, input)).toEqual(['stop: The soft limits span 205 mm, 5 mm more than the stroke of 200 mm.'])
    expect(travelSpan.judge(input)[0]).toMatchObject({
      at: ['/setup/softLimitMin', '/setup/softLimitMax'], values: { min: 0, max: 205, span: 205, stroke: 200, beyond: 5 },
    })
  })

  it('lets a span of exactly the stroke pass, decimals or not', () => {
    expect(told(travelSpan, span(0, 200))).toEqual([])
    // 1.1 − (−0.2) is 1.3; doubles make 1.3000000000000003 of it.
    expect(told(travelSpan, span(-0.2, 1.1, 1.3))).toEqual([])
    expect(told(travelSpan, span(-0.2, 1.100001, 1.3))).toEqual(['stop: The soft limits span 1.300001 mm, 0.000001 mm more than the stroke of 1.3 mm.'])
  })

  it('stops limits that meet or stand the wrong way round, whatever the stroke', () => {
    expect(told(travelSpan, span(198, 198))).toEqual(['stop: The soft limits run from 198 mm to 198 mm: the lower must lie below the upper.'])
    expect(told(travelSpan, judgeInput(linear({ softLimitMin: 10, softLimitMax: -10 })))).toEqual(['stop: The soft limits run from 10 mm to −10 mm: the lower must lie below the upper.'])
  })

  it('names what is missing', () => {
    expect(told(travelSpan, judgeInput(linear({ softLimitMin: 0, softLimitMax: 198 })))).toEqual(['unknown: The span of the soft limits cannot be judged without nameplate.stroke.'])
    expect(travelSpan.judge(span(undefined, 198))[0]!.missing).toEqual(['softLimitMin'])
    expect(travelSpan.judge(span())[0]!.missing).toEqual(['softLimitMin', 'softLimitMax'])
  })

  it('does not apply to limits that are switched off and not given', () => {
    expect(told(travelSpan, judgeInput(linear({ softLimitsActive: false })))).toEqual(['not applicable'])
    expect(told(travelSpan, judgeInput(linear({ softLimitsActive: false, softLimitMin: 5, softLimitMax: 5 })))).toHaveLength(1)
  })

  it('holds a modulo axis against its modulo, the stroke aside', () => {
    const turning = (softLimitMax: number, softLimitsActive?: boolean) =>
      told(travelSpan, judgeInput(rotary({ modulo: 360, softLimitMin: 0, softLimitMax, softLimitsActive }), { nameplate: plate({ stroke: 180 }) }))
    expect(turning(360)).toEqual([])
    expect(turning(400)).toEqual(['stop: The soft limits span 400 deg, 40 deg more than the modulo of 360 deg.'])
    expect(turning(400, false)).toEqual(['not applicable'])
    expect(told(travelSpan, judgeInput(rotary({ modulo: 360 })))).toEqual(['not applicable'])
  })
})
