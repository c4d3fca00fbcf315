import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { EntryTable } from '../../../../shared/settings/entry-table/schema'
import type { Nameplate } from '../../../../shared/settings/nameplate'
import type { Setup } from '../../../../shared/settings/types'
import { kitOf } from '../../../../shared/swap/kit'
import { rescaled } from '../../../../shared/swap/rescale'
import { absolute, linear, plate, press, rotary } from '../../../support/check-input'

const table = (parameters: EntryTable['parameters'], moves: EntryTable['moves'] = []): EntryTable =>
  ({ delimiter: ';', decimal: 'point', header: [], columns: { number: 1, value: 2, name: 0, unit: 0 }, parameters, zones: [], moves })
const side = (model: string, ratedThrust: number, more: Partial<Nameplate> = {}) => ({ model, nameplate: plate({ model, ratedThrust, ...more }) })
const brought = (setup: Setup, from: number, to: number, more: Partial<Nameplate> = {}) => rescaled(linear(setup), side('A', from), side('B', to, more))
const limit = (...of: Parameters<typeof brought>) => brought(...of).content.setup.thrustLimit

describe('rounding half-even to six decimals', () => {
  // Half of an odd number of millionths lies between two: the even one is taken.
  it.each([[0.000001, 0], [0.000003, 0.000002], [0.000005, 0.000002], [0.000007, 0.000004], [50.000001, 25], [50.000003, 25.000002]])('half of %d %% is %d %%', (before, after) => {
    expect(limit({ thrustLimit: before }, 200, 400)).toBe(after)
  })

  it('is done once, on the exact quotient: 38 % · 300 N / 700 N = 16.285714285… %', () => {
    expect(limit({ thrustLimit: 38 }, 300, 700)).toBe(16.285714)
    // 0.000001 · 3000001/2000000 = 0.0000015000005 lies above the middle.
    expect(limit({ thrustLimit: 0.000001 }, 3000.001, 2000)).toBe(0.000002)
  })

  it('up as well as down: a weaker unit needs a higher percentage for the same newtons', () => {
    // 38 % of 640 N are 243.2 N, and those are 60.8 % of 400 N.
    expect(brought({ thrustLimit: 38 }, 640, 400).adjustments).toMatchObject([{ before: 38, after: 60.8, newtonsBefore: 243.2, newtonsAfter: 243.2 }])
  })

  it('a percentage that nothing can hold ends at the largest number of the format, 1e9', () => {
    expect(limit({ thrustLimit: 1e9 }, 640, 200)).toBe(1e9)
    expect(limit({ thrustLimit: 4e8 }, 500, 200)).toBe(1e9)
    expect(limit({ thrustLimit: 3.9e8 }, 500, 200)).toBe(9.75e8)
  })

  it('0 % stays 0 % and is no adjustment', () => expect(brought({ homingForceLimit: 0 }, 640, 400)).toMatchObject({ adjustments: [], content: { setup: { homingForceLimit: 0 } } }))
})

describe('the step of the new unit’s entry table', () => {
  const parameter = (more: Partial<EntryTable['parameters'][number]>) => ({ entryTable: table([{ number: '12', field: 'thrustLimit', ...more }]) })
  // 38 % of 400 N are 23.75 % of 640 N.
  const stepped = (more: Partial<EntryTable['parameters'][number]>) => limit({ thrustLimit: 38 }, 400, 640, parameter(more))

  it.each([
    ['a step of 0.5 %', { step: 0.5 }, 23.5],
    ['a step of 0.25 % takes nothing', { step: 0.25 }, 23.75],
    ['whole per cent', { digits: 0 }, 23],
    ['one digit', { digits: 1 }, 23.7],
    ['the coarser of step and digit: 10 %', { step: 10, digits: 1 }, 20],
    ['the coarser of step and digit: 1 %', { step: 0.25, digits: 0 }, 23],
    ['tenths of a per cent, as 1/1000 of rated torque has them (CiA 402 object 6072h)', { factor: 0.1, digits: 0 }, 23.7],
    ['a step in per mille: 5 ‰ are 0.5 %', { unit: '‰', step: 5 }, 23.5],
    ['a drive that rounds up by itself is given the lower one all the same', { step: 0.5, rounding: 'up' as const }, 23.5],
    ['neither step nor digit', {}, 23.75],
  ])('%s', (_words, more, after) => expect(stepped(more)).toBe(after))

  it('is said where it took anything, and only there', () => {
    const why = (more: Partial<EntryTable['parameters'][number]>) => brought({ thrustLimit: 38 }, 400, 640, parameter(more)).adjustments[0]?.why
    expect(why({ unit: '‰', step: 5 })).toBe('100 % meant 400 N on A and means 640 N on B; rounded down to steps of 0.5 %.')
    expect(why({ step: 0.25 })).toBe('100 % meant 400 N on A and means 640 N on B.')
  })

  it('is that of the place: a move has its column, another setup field none', () => {
    const entryTable = table([{ number: '12', field: 'thrustLimit', digits: 0 }, { number: '40', field: 'move:7:forceLimit', step: 5 }], [{ name: 'force', field: 'forceLimit', step: 2 }])
    const content = linear({ thrustLimit: 38, overloadLevel: 38 }, [press(4, 1, 2, { forceLimit: 38 }), press(7, 1, 2, { forceLimit: 38 })])
    const after = rescaled(content, side('A', 400), side('B', 640, { entryTable }))
    expect(after.adjustments.map(({ at, after }) => `${at} ${after}`)).toEqual(['/setup/thrustLimit 23', '/setup/overloadLevel 23.75', '/moves/0/forceLimit 22', '/moves/1/forceLimit 20'])
  })
})

describe('what is brought over', () => {
  it('every percentage of force, in the order of the setup and then of the table, and nothing else', () => {
    const setup: Setup = { homingForceLimit: 10, thrustLimit: 20, thrustLimitPositive: 30, thrustLimitNegative: 40, overloadLevel: 50, velocityFeedForward: 60, inertiaRatio: 70, speedLimit: 80 }
    const after = rescaled(linear(setup, [absolute(3, 1), absolute(5, 1, { forceLimit: 60 })]), side('A', 400), side('B', 800))
    expect(after.content.setup).toEqual({ homingForceLimit: 5, thrustLimit: 10, thrustLimitPositive: 15, thrustLimitNegative: 20, overloadLevel: 25, velocityFeedForward: 60, inertiaRatio: 70, speedLimit: 80 })
    expect(after.content.moves).toEqual([absolute(3, 1), absolute(5, 1, { forceLimit: 30 })])
    expect(after.adjustments.map(({ at, section, row, field }) => [at, section, row, field])).toEqual([
      ['/setup/homingForceLimit', 'setup', undefined, 'homingForceLimit'], ['/setup/thrustLimit', 'setup', undefined, 'thrustLimit'], ['/setup/thrustLimitPositive', 'setup', undefined, 'thrustLimitPositive'],
      ['/setup/thrustLimitNegative', 'setup', undefined, 'thrustLimitNegative'], ['/setup/overloadLevel', 'setup', undefined, 'overloadLevel'], ['/moves/1/forceLimit', 'move', 5, 'forceLimit'],
    ])
  })

  it('by the peak where that is the base: 100 % of 900 N peak were 900 N, and are 150 % of 600 N rated', () => {
    expect(rescaled(linear({ thrustLimit: 100 }), side('A', 400, { peakThrust: 900, forceBase: 'peak-thrust' }), side('B', 600, { peakThrust: 900 })).content.setup.thrustLimit).toBe(150)
  })

  it('in newton metres on a turning axis: 50 % of 8 N·m are 4 N·m, 32 % of 12.5 N·m', () => {
    const [only] = rescaled(rotary({ thrustLimit: 50 }), side('A', 8), side('B', 12.5)).adjustments
    expect(only).toMatchObject({ after: 32, newtonsBefore: 4, newtonsAfter: 4, why: '100 % meant 8 N·m on A and means 12.5 N·m on B.' })
  })

  it('from plates in other units by exact factors: 1 lbf·in and 1 lbf·ft are 12 apart (NIST SP 811, B.8: 0.112 984 8 and 1.355 818 N·m)', () => {
    expect(limit({ thrustLimit: 60 }, 0.1129848290276167, 12 * 0.1129848290276167)).toBe(5)
  })

  const setup = fc.record({ thrustLimit: fc.integer({ min: 1, max: 300 }), overloadLevel: fc.integer({ min: 1, max: 300 }) })
  it('keeps the order of limits: what was the lower of two is not the higher after', () => fc.assert(fc.property(
    setup, fc.integer({ min: 1, max: 9000 }), fc.integer({ min: 1, max: 9000 }), fc.constantFrom(0.01, 0.25, 1, 5), (values, from, to, step) => {
      const entryTable = table(['thrustLimit', 'overloadLevel'].map((field, index) => ({ number: String(index), field, step })))
      const { thrustLimit = NaN, overloadLevel = NaN } = brought(values, from, to, { entryTable }).content.setup
      expect(Math.sign(thrustLimit - overloadLevel) * Math.sign(values.thrustLimit - values.overloadLevel)).toBeGreaterThanOrEqual(0)
    },
  )))
})

describe('the home offset of a drive that counts the other way', () => {
  const turned = { homeOffsetSense: 'home-reads-offset' } as const
  const kit = (setup: Setup, out = {}, into = {}) => kitOf(linear({ homingMethod: 'hard-stop', ...setup }), { replaced: 'unit', ownValues: false, out: side('A', 400, out), into: side('B', 400, into) })

  it('has the other sign, either way, and says so first', () => {
    expect(kit({ homeOffset: 1.5 }, {}, turned).adjustments).toEqual([{
      at: '/setup/homeOffset', section: 'setup', field: 'homeOffset', before: 1.5, after: -1.5, unit: 'mm', newtonsBefore: null, newtonsAfter: null, why: 'B counts home the other way than A: the same place has the other sign.',
    }])
    expect(kit({ homeOffset: -1.5 }, turned, {}).content.setup.homeOffset).toBe(1.5)
    const both = kitOf(linear({ homingMethod: 'hard-stop', homeOffset: 1, thrustLimit: 40 }), { replaced: 'unit', ownValues: false, out: side('A', 400), into: side('B', 800, turned) })
    expect(both.adjustments.map(({ field, after }) => `${field} ${after}`)).toEqual(['homeOffset -1', 'thrustLimit 20'])
  })

  it('stays where both count alike, a plate that says nothing as CiA 402 does; 0 has no sign', () => {
    expect(kit({ homeOffset: 1.5 }, turned, turned).adjustments).toEqual([])
    expect(kit({ homeOffset: 1.5 }, { homeOffsetSense: 'zero-is-home-plus-offset' }, {}).adjustments).toEqual([])
    expect(kit({ homeOffset: 0 }, {}, turned)).toMatchObject({ adjustments: [], content: { setup: { homeOffset: 0 } } })
    expect(Object.is(kit({ homeOffset: 0 }, {}, turned).content.setup.homeOffset, 0)).toBe(true)
  })

  it('is in degrees on a turning axis, and left alone without both plates', () => {
    const swap = { replaced: 'unit', ownValues: false, out: side('A', 8), into: side('B', 8, turned) } as const
    expect(kitOf(rotary({ homingMethod: 'hard-stop', homeOffset: 3 }), swap).adjustments).toMatchObject([{ unit: 'deg', after: -3 }])
    for (const one of [{ ...swap, out: { model: 'A' } }, { ...swap, into: { model: 'B' } }]) expect(kitOf(linear({ homingMethod: 'hard-stop', homeOffset: 3 }), one).content.setup.homeOffset).toBe(3)
  })
})
