import { describe, expect, it } from 'vitest'
import { homeSide } from '../../../../shared/checks/home-side'
import type { Setup } from '../../../../shared/settings/types'
import { judgeInput, limits, linear, plate, rotary, told } from '../../../support/check-input'

const side = (setup: Setup) => judgeInput(linear({ ...limits, homingMethod: 'hard-stop', homingDirection: 'negative', homeOffset: 2, ...setup }))

describe('home-side', () => {
  it('is silent for home at −2 below 0, and at 200 above 198', () => {
    expect(told(homeSide, side({}))).toEqual([])
    expect(told(homeSide, side({ homingDirection: 'positive', homeOffset: -200 }))).toEqual([])
  })

  it('stops home at 5, 5 − 0 = 5 mm inside the lower limit', () => {
    const input = side({ homeOffset: -5 })
    expect(told(homeSide, input)).toEqual([
      'stop: Home, found going negative, reads 5 mm: 5 mm inside the lower soft limit of 0 mm, where it has to lie on or beyond it.',
    ])
    expect(homeSide.judge(input)).toMatchObject([{ at: ['/setup/homeOffset', '/setup/softLimitMin'], values: { home: 5, limit: 0, inside: 5 } }])
  })

  it('stops a direction that does not fit the zero: going up to a home at −2, 198 + 2 = 200 mm inside', () => {
    expect(told(homeSide, side({ homingDirection: 'positive' }))).toEqual([
      'stop: Home, found going positive, reads −2 mm: 200 mm inside the upper soft limit of 198 mm, where it has to lie on or beyond it.',
    ])
  })

  it('lets home on the limit pass, and not a millionth inside', () => {
    expect(told(homeSide, side({ homeOffset: 0 }))).toEqual([])
    expect(told(homeSide, side({ homeOffset: -0.000001 }))[0]).toMatch(/0\.000001 mm inside/)
    expect(told(homeSide, side({ homingDirection: 'positive', homeOffset: -198 }))).toEqual([])
  })

  it('reads the offset the other way where the nameplate says so', () => {
    const turned = (homeOffset: number) => ({ ...side({ homeOffset }), nameplate: plate({ homeOffsetSense: 'home-reads-offset' }) })
    expect(told(homeSide, turned(-2))).toEqual([])
    expect(told(homeSide, turned(2))[0]).toMatch(/reads 2 mm: 2 mm inside/)
  })

  it('names what is missing: of the limits only the one on the side of homing', () => {
    expect(told(homeSide, side({ homeOffset: undefined }))).toEqual(['unknown: On which side of the travel home lies cannot be judged without homeOffset.'])
    expect(homeSide.judge(side({ softLimitMin: undefined }))[0]!.missing).toEqual(['softLimitMin'])
    expect(homeSide.judge(side({ homingDirection: 'positive', softLimitMax: undefined }))[0]!.missing).toEqual(['softLimitMax'])
    expect(told(homeSide, side({ softLimitMax: undefined }))).toEqual([])
    expect(homeSide.judge(side({ homingMethod: undefined, homingDirection: undefined, homeOffset: undefined }))[0]!.missing).toEqual(['homingMethod', 'homingDirection', 'homeOffset'])
  })

  it('holds a limit switch to the same, and no other way of homing', () => {
    expect(told(homeSide, side({ homingMethod: 'limit-switch', homeOffset: -5 }))).toHaveLength(1)
    for (const homingMethod of ['home-switch', 'index-pulse', 'current-position', 'absolute-encoder'] as const) {
      expect(told(homeSide, side({ homingMethod, homeOffset: -5 }))).toEqual(['not applicable'])
    }
  })

  it('does not apply to an axis that wraps, nor to limits that are off and not given', () => {
    expect(told(homeSide, judgeInput(rotary({ modulo: 360, homingMethod: 'limit-switch' })))).toEqual(['not applicable'])
    expect(told(homeSide, judgeInput(linear({ softLimitsActive: false, homingMethod: 'hard-stop' })))).toEqual(['not applicable'])
  })
})
