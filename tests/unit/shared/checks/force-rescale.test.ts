import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { forceRescale } from '../../../../shared/checks/force-rescale'
import type { JudgeInput } from '../../../../shared/checks/types'
import type { Nameplate } from '../../../../shared/settings/nameplate'
import { absolute, judgeInput, linear, plate, press, rotary, told, unused } from '../../../support/check-input'

const brought = (broughtFrom: JudgeInput['broughtFrom'], more: Partial<Nameplate> = { ratedThrust: 800 }, content = linear({ thrustLimit: 38 }, [press(2, 100, 150)])) =>
  judgeInput(content, { nameplate: plate(more), ...broughtFrom ? { broughtFrom } : {} })

describe('force-rescale', () => {
  it('is silent where 100 % means the same on both units', () => {
    expect(told(forceRescale, brought({ forceBase: 800, rescaled: false }))).toEqual([])
  })

  it('stops 38 % of 640 N = 243.2 N that would be 38 % of 800 N = 304 N', () => {
    const input = brought({ forceBase: 640, rescaled: false })
    expect(told(forceRescale, input)).toEqual([
      'stop: 100 % meant 640 N on the unit that the values come from and means 800 N on this one: thrust limit 38 % was 243.2 N and would be 304 N.',
    ])
    expect(forceRescale.judge(input)).toMatchObject([{ at: ['/setup/thrustLimit', '/moves/0/forceLimit'], values: { from: 640, to: 800, factor: 0.8 } }])
  })

  it('leaves out what was worked out anew since, and is silent where all of it was', () => {
    const was = linear({ thrustLimit: 38 }, [press(2, 100, 150)])
    const now = (thrustLimit: number, forceLimit: number) => forceRescale.judge(brought({ forceBase: 640, content: was, rescaled: false }, { ratedThrust: 800 }, linear({ thrustLimit }, [press(1, 100, 150), press(2, 100, 150, { forceLimit })])))
    expect(now(38, 24).map(({ at }) => at)).toEqual([['/setup/thrustLimit']])
    // Move 2 now stands second in the table and still is move 2.
    expect(now(30.4, 30).map(({ at }) => at)).toEqual([['/moves/1/forceLimit']])
    const all = brought({ forceBase: 640, content: was, rescaled: false }, { ratedThrust: 800 }, linear({ thrustLimit: 30.4 }))
    expect(told(forceRescale, all)).toEqual(['not applicable'])
  })

  it('takes the smallest difference for one: bases are compared as they stand', () => {
    expect(told(forceRescale, brought({ forceBase: 800.001, rescaled: false }))).toHaveLength(1)
  })

  it('goes by the peak where the nameplate says that 100 % means the peak', () => {
    expect(told(forceRescale, brought({ forceBase: 2000, rescaled: false }, { ratedThrust: 800, peakThrust: 2000, forceBase: 'peak-thrust' }))).toEqual([])
  })

  it('tells newton metres on a rotary axis, and the force of a move where the setup has no percentage', () => {
    const content = rotary({}, [absolute(4, 90, { forceLimit: 50 })])
    expect(told(forceRescale, brought({ forceBase: 1.6, rescaled: false }, { ratedThrust: 10 }, content))[0]).toMatch(/1\.6 N·m on .* 10 N·m .*: move 4 force 50 % was 0\.8 N·m and would be 5 N·m\.$/)
  })

  it('names the base that is missing on either side', () => {
    expect(told(forceRescale, brought({ rescaled: false }))).toEqual(['unknown: What the percentages mean cannot be judged without force base of the unit before.'])
    expect(forceRescale.judge(brought({ forceBase: 640, rescaled: false }, {}))[0]!.missing).toEqual(['nameplate.ratedThrust'])
    expect(forceRescale.judge(brought({ rescaled: false }, { ratedThrust: 1, forceBase: 'peak-thrust' }))[0]!.missing).toEqual(['force base of the unit before', 'nameplate.peakThrust'])
  })

  it('falls silent once the rescaling is confirmed, and where nothing was brought or is a percentage', () => {
    expect(told(forceRescale, brought({ forceBase: 640, rescaled: true }))).toEqual(['not applicable'])
    expect(told(forceRescale, brought(undefined))).toEqual(['not applicable'])
    expect(told(forceRescale, brought({ forceBase: 640, rescaled: false }, {}, linear({}, [absolute(1, 10), { ...unused(2), forceLimit: 5 }])))).toEqual(['not applicable'])
  })

  it('gives the factor that leaves every force as it was', () => {
    fc.assert(fc.property(fc.integer({ min: 1, max: 5000 }), fc.integer({ min: 1, max: 5000 }), fc.integer({ min: 1, max: 300 }), (from, to, thrustLimit) => {
      const [found] = forceRescale.judge(brought({ forceBase: from, rescaled: false }, { ratedThrust: to }, linear({ thrustLimit })))
      const factor = typeof found?.values.factor === 'number' ? found.values.factor : 1
      expect(thrustLimit * factor / 100 * to).toBeCloseTo(thrustLimit / 100 * from, 6)
    }))
  })
})
