import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { travelPlaced } from '../../../../shared/checks/travel-placed'
import type { Nameplate } from '../../../../shared/settings/nameplate'
import type { Setup } from '../../../../shared/settings/types'
import { judgeInput, linear, plate, rotary, told } from '../../../support/check-input'

const home = { homingMethod: 'hard-stop', homingDirection: 'negative', homeOffset: -3 } as const
const placed = (setup: Setup, more: Partial<Nameplate> = {}) =>
  judgeInput(linear({ softLimitMin: 4, softLimitMax: 204, ...home, ...setup }), { nameplate: plate({ stroke: 200, hardMargin: 1, ...more }) })

// h = −(−3) = 3; hard stops 3 and 3 + 200 + 2·1 = 205; drawn in by 1: 4 … 204.
describe('travel-placed', () => {
  it('is silent for limits 5 … 200 within 4 … 204', () => {
    expect(told(travelPlaced, placed({ softLimitMin: 5, softLimitMax: 200 }))).toEqual([])
  })

  it('lets the ends of the stroke pass, and not a millionth more', () => {
    expect(told(travelPlaced, placed({}))).toEqual([])
    expect(told(travelPlaced, placed({ softLimitMax: 204.000001 }))).toEqual([
      'stop: The upper soft limit of 204.000001 mm lies 0.000001 mm beyond the end of the stroke at 204 mm; the hard stop stands at 205 mm.',
    ])
  })

  it('stops each limit beyond the stroke: 4 − 2 = 2 mm below, 206 − 204 = 2 mm above', () => {
    const input = placed({ softLimitMin: 2, softLimitMax: 206 })
    expect(told(travelPlaced, input)).toEqual([
      'stop: The lower soft limit of 2 mm lies 2 mm beyond the end of the stroke at 4 mm; the hard stop stands at 3 mm.',
      'stop: The upper soft limit of 206 mm lies 2 mm beyond the end of the stroke at 204 mm; the hard stop stands at 205 mm.',
    ])
    expect(travelPlaced.judge(input)[1]).toMatchObject({
      at: ['/setup/softLimitMax', '/setup/homeOffset'], values: { min: 2, max: 206, low: 4, high: 204, hardLow: 3, hardHigh: 205, beyond: 2 },
    })
  })

  it('goes down from home where homing goes to plus: 205 − 200 − 2·1 = 3', () => {
    expect(told(travelPlaced, placed({ homingDirection: 'positive', homeOffset: -205 }))).toEqual([])
    // Zero at home: 0 − 202 … 0, drawn in −201 … −1; the lower limit 4 lies 5 mm above −1.
    expect(told(travelPlaced, placed({ homingDirection: 'positive', homeOffset: 0 }))[0]).toMatch(/^stop: The lower soft limit of 4 mm lies 5 mm beyond the end of the stroke at −1 mm/)
  })

  it('turns the sign on a drive whose home reads the offset', () => {
    expect(told(travelPlaced, placed({ homeOffset: 3 }, { homeOffsetSense: 'home-reads-offset' }))).toEqual([])
    // Read the other way: h = −3, stroke −2 … 198; 204 lies 6 mm beyond.
    expect(told(travelPlaced, placed({ homeOffset: 3 }))).toEqual(['stop: The upper soft limit of 204 mm lies 6 mm beyond the end of the stroke at 198 mm; the hard stop stands at 199 mm.'])
  })

  it('counts a margin that is not given as 0: 3 … 203', () => {
    expect(told(travelPlaced, placed({ softLimitMin: 3, softLimitMax: 203 }, { hardMargin: undefined }))).toEqual([])
  })

  it('stays unknown for every other way of homing', () => {
    expect(told(travelPlaced, placed({ homingMethod: 'absolute-encoder' }))).toEqual([
      'unknown: Homing by absolute-encoder does not tell where the hard stops stand: whether the soft limits keep clear of them cannot be judged.',
    ])
    expect(travelPlaced.judge(placed({ homingMethod: 'limit-switch' }))[0]).toMatchObject({ missing: ['place of the hard stops'], values: { method: 'limit-switch' } })
  })

  it('names what is missing, and judges the limit that is there', () => {
    expect(travelPlaced.judge(judgeInput(linear()))[0]!.missing).toEqual(['homingMethod', 'homingDirection', 'homeOffset', 'nameplate.stroke', 'softLimitMin', 'softLimitMax'])
    expect(told(travelPlaced, placed({ softLimitMin: undefined, softLimitMax: 206 }))).toEqual([
      'stop: The upper soft limit of 206 mm lies 2 mm beyond the end of the stroke at 204 mm; the hard stop stands at 205 mm.',
      'unknown: Where the soft limits lie between the hard stops cannot be judged without softLimitMin.',
    ])
  })

  it('does not apply to an axis that wraps, nor to limits that are off and not given', () => {
    expect(told(travelPlaced, judgeInput(rotary({ modulo: 360, softLimitMin: 0, softLimitMax: 90, ...home })))).toEqual(['not applicable'])
    expect(told(travelPlaced, judgeInput(linear({ softLimitsActive: false, ...home })))).toEqual(['not applicable'])
  })

  it('says the same of the mirrored axis', () => {
    const whole = fc.integer({ min: -250, max: 250 })
    fc.assert(fc.property(whole, whole, whole, (homeOffset, softLimitMin, softLimitMax) => {
      const ahead = travelPlaced.judge(placed({ homeOffset, softLimitMin, softLimitMax }))
      const back = travelPlaced.judge(placed({ homeOffset: -homeOffset, homingDirection: 'positive', softLimitMin: -softLimitMax, softLimitMax: -softLimitMin }))
      expect(back.map(({ values }) => values.beyond).sort()).toEqual(ahead.map(({ values }) => values.beyond).sort())
    }))
  })
})
