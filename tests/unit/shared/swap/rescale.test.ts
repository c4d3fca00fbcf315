import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { emptyContent } from '../../../../shared/settings/content'
import type { Nameplate } from '../../../../shared/settings/nameplate'
import type { Content, Move } from '../../../../shared/settings/types'
import { differingBases, holdsForces, ownFileFits, rescaled } from '../../../../shared/swap/rescale'
import type { SwapSide } from '../../../../shared/swap/types'

const side = (model: string, plate: Partial<Nameplate> | null): SwapSide => ({ model, ...(plate ? { nameplate: { model, axisKind: 'linear', stroke: 200, ...plate } } : {}) })
const press: Move = { move: 4, kind: 'press', target: 150, approach: 130, speed: 100, acceleration: 1000, forceLimit: 38 }
const content = (setup: Content['setup'] = {}, moves: readonly Move[] = []): Content => ({ ...emptyContent('linear'), setup, moves })
const step = (each: number): Partial<Nameplate> => ({
  entryTable: { delimiter: ';', decimal: 'point', header: [], columns: { number: 1, value: 2, name: 0, unit: 0 }, parameters: [{ number: '12', field: 'thrustLimit', step: each }], zones: [], moves: [{ name: 'force', field: 'forceLimit', digits: 0 }] },
})

describe('percentages on a unit of another rated thrust', () => {
  it('mean the same newtons: 38 % of 400 N are 152 N, and those are 23.75 % of 640 N', () => {
    const { content: after, adjustments } = rescaled(content({ thrustLimit: 38 }, [press]), side('A', { ratedThrust: 400 }), side('B', { ratedThrust: 640 }))
    expect([after.setup.thrustLimit, after.moves[0]?.forceLimit]).toEqual([23.75, 23.75])
    expect(adjustments).toMatchObject([
      { at: '/setup/thrustLimit', section: 'setup', field: 'thrustLimit', before: 38, after: 23.75, unit: '%', newtonsBefore: 152, newtonsAfter: 152, why: '100 % meant 400 N on A and means 640 N on B.' },
      { at: '/moves/0/forceLimit', section: 'move', row: 4, field: 'forceLimit', before: 38, after: 23.75 },
    ])
  })

  it('of plates in pounds-force: 100 lbf are 444.8222 N, 150 lbf 667.2333 N (NIST SP 811, B.8: 1 lbf = 4.448 222 N)', () => {
    const { adjustments: [only] } = rescaled(content({ thrustLimit: 38 }), side('A', { ratedThrust: 444.8222 }), side('B', { ratedThrust: 667.2333 }))
    expect(only).toMatchObject({ after: 25.333333, newtonsBefore: 169.032436, newtonsAfter: 169.032434 })
  })

  it('of plates in kilograms-force: 40 kgf are 392.266 N, 60 kgf 588.399 N (NIST SP 811, B.8: 1 kgf = 9.806 65 N)', () => {
    const { adjustments: [only] } = rescaled(content({ thrustLimit: 45 }), side('A', { ratedThrust: 392.266 }), side('B', { ratedThrust: 588.399 }))
    expect(only).toMatchObject({ after: 30, newtonsBefore: 176.5197, newtonsAfter: 176.5197 })
  })

  it('go by what 100 % means, the peak where the plate says so', () => {
    const out = side('A', { ratedThrust: 400 })
    const into = side('B', { ratedThrust: 300, peakThrust: 500, forceBase: 'peak-thrust' })
    expect(differingBases(out, into)).toEqual({ from: 400, to: 500 })
    expect(rescaled(content({ thrustLimit: 50 }), out, into).content.setup.thrustLimit).toBe(40)
  })

  it('are rounded half-even once, then down to the step of the entry table, and never up', () => {
    const from = side('A', { ratedThrust: 400 })
    expect(rescaled(content({ thrustLimit: 38 }, [press]), from, side('B', { ratedThrust: 640, ...step(0.5) })).adjustments)
      .toMatchObject([{ after: 23.5, newtonsAfter: 150.4, why: '100 % meant 400 N on A and means 640 N on B; rounded down to steps of 0.5 %.' }, { after: 23, newtonsAfter: 147.2 }])
  })

  it('stay where the bases agree, or one is not known', () => {
    const before = content({ thrustLimit: 38 }, [press])
    expect(rescaled(before, side('A', { ratedThrust: 400 }), side('B', { ratedThrust: 400 }))).toEqual({ content: before, adjustments: [] })
    expect(rescaled(before, side('A', null), side('B', { ratedThrust: 640 })).content).toBe(before)
  })

  const percent = fc.integer({ min: 1, max: 200_000_000 }).map(millionths => millionths / 1e6)
  const base = fc.integer({ min: 1_000, max: 5_000_000 }).map(thousandths => thousandths / 1e3)
  it('never mean more force than before by more than half the last digit, and come back when brought back', () => fc.assert(fc.property(percent, base, base, (thrustLimit, a, b) => {
    fc.pre(a !== b)
    const there = rescaled(content({ thrustLimit }), side('A', { ratedThrust: a }), side('B', { ratedThrust: b })).content
    const back = rescaled(there, side('B', { ratedThrust: b }), side('A', { ratedThrust: a })).content
    expect(Math.abs((there.setup.thrustLimit ?? 0) * b - thrustLimit * a)).toBeLessThanOrEqual(b * 0.5000001e-6)
    expect(Math.abs((back.setup.thrustLimit ?? 0) - thrustLimit)).toBeLessThanOrEqual(0.5e-6 * b / a + 0.6e-6)
  })))

  it('with a step never mean more force than before', () => fc.assert(fc.property(percent, base, base, (thrustLimit, a, b) => {
    fc.pre(a !== b)
    const there = rescaled(content({ thrustLimit }), side('A', { ratedThrust: a }), side('B', { ratedThrust: b, ...step(0.25) })).content.setup.thrustLimit ?? 0
    expect(there * b).toBeLessThanOrEqual(thrustLimit * a + b * 0.5000001e-6)
    expect((there * 4) % 1).toBe(0)
  })))
})

describe('whether percentages matter', () => {
  it('a content holds forces in its setup or in a move', () => {
    expect([holdsForces(content()), holdsForces(content({ overloadLevel: 90 })), holdsForces(content({}, [press]))]).toEqual([false, true, true])
  })

  const fits = (out: SwapSide, into: SwapSide, ownValues = false) => ownFileFits({ out, into, ownValues })
  it.each<[string, boolean, SwapSide, SwapSide]>([
    ['another model, the same base', true, side('A', { ratedThrust: 400 }), side('B', { ratedThrust: 400 })],
    ['another model, the same base as a peak', true, side('A', { ratedThrust: 500 }), side('B', { ratedThrust: 300, peakThrust: 500, forceBase: 'peak-thrust' })],
    ['another model, another base', false, side('A', { ratedThrust: 400 }), side('B', { ratedThrust: 640 })],
    ['the same model, another base', false, side('A', { ratedThrust: 400 }), side('A', { ratedThrust: 640 })],
    ['the same model, one base not told', false, side('A', { ratedThrust: 400 }), side('A', null)],
    ['the same model, no base told', true, side('A', null), side('A', null)],
    ['another model, no base told', false, side('A', null), side('B', null)],
  ])('a drive tool’s own file and %s: %s', (_case, means, out, into) => expect(fits(out, into)).toBe(means))

  it('a drive tool’s own file goes back into the unit that it was saved on, whatever its plate says by now', () => {
    expect(fits(side('A', { ratedThrust: 400 }), side('A', { ratedThrust: 640 }), true)).toBe(true)
  })
})
