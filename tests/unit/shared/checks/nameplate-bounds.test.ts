import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { judge } from '../../../../shared/checks/judge'
import { nameplateBounds } from '../../../../shared/checks/nameplate-bounds'
import type { Nameplate } from '../../../../shared/settings/nameplate'
import { judgeInput, limits, linear, press } from '../../../support/check-input'

const plate: Nameplate = {
  model: 'HL40-200V', axisKind: 'linear', stroke: 200, ratedThrust: 640, peakThrust: 1600, maxSpeed: 500, maxAcceleration: 8000, maxPressSpeed: 30, pressForceMin: 20, pressForceMax: 70,
  dictionary: { 'K-017': { min: 1, max: 9 }, 'K-018': { name: 'word' } },
}
const setup = (field: string) => nameplateBounds({ section: 'setup', field }, plate)
const move = (field: string, isPress = false) => nameplateBounds({ section: 'move', field, row: 1 }, plate, isPress)

describe('what a nameplate allows for a value', () => {
  it('is what the rules hold it against', () => {
    // 100 · 1600 N / 640 N = 250 % of the rated thrust.
    expect([setup('thrustLimit'), setup('thrustLimitNegative'), setup('speedLimit'), setup('homingAcceleration')]).toEqual([{ max: 250 }, { max: 250 }, { max: 500 }, { max: 8000 }])
    expect([setup('pressSpeed'), move('pressSpeed'), move('deceleration')]).toEqual([{ max: 30 }, { max: 30 }, { max: 8000 }])
    expect([move('forceLimit'), move('forceLimit', true)]).toEqual([{ max: 250 }, { min: 20, max: 70 }])
  })

  it('is nothing where the quick stop brakes, where a value has no such bound, or the nameplate does not tell', () => {
    expect([setup('quickStopDeceleration'), setup('homingMethod'), setup('overloadTime'), setup('toString'), move('target')]).toEqual([{}, {}, {}, {}, {}])
    expect(nameplateBounds({ section: 'setup', field: 'thrustLimit' }, { model: 'X', axisKind: 'linear', stroke: 1 })).toEqual({})
  })

  it('comes from the dictionary for the drive’s own values', () => {
    expect(['K-017', 'K-018', 'toString'].map(field => nameplateBounds({ section: 'extra', field }, plate))).toEqual([{ min: 1, max: 9 }, {}, {}])
  })

  it('law: a thrust limit is stopped by its rule exactly where it lies beyond the bound', () => {
    fc.assert(fc.property(fc.integer({ min: 1, max: 500 }), (thrustLimit) => {
      const { results } = judge(judgeInput(linear({ ...limits, thrustLimit }), { nameplate: plate }))
      const stopped = results.some(({ rule, level }) => rule === 'thrust-limit' && level === 'stop')
      expect(stopped).toBe(thrustLimit > (setup('thrustLimit').max ?? Infinity))
    }))
  })

  it('law: a press force is stopped by its rule exactly where it lies outside the bounds', () => {
    const { min = 0, max = 0 } = move('forceLimit', true)
    fc.assert(fc.property(fc.integer({ min: 1, max: 120 }), (forceLimit) => {
      const { results } = judge(judgeInput(linear({ ...limits, thrustLimit: 250 }, [press(1, 20, 40, { forceLimit })]), { nameplate: plate }))
      expect(results.some(({ rule, level }) => rule === 'press-force' && level === 'stop')).toBe(forceLimit < min || forceLimit > max)
    }))
  })
})
