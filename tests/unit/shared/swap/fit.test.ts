import { describe, expect, it } from 'vitest'
import type { Nameplate } from '../../../../shared/settings/nameplate'
import type { Content, Move, Setup } from '../../../../shared/settings/types'
import type { CarryCase } from '../../../../shared/swap/carried'
import { drivenBack, mayFall } from '../../../../shared/swap/falls'
import { fitOf, type FitInput } from '../../../../shared/swap/fit'
import { kitOf } from '../../../../shared/swap/kit'
import { longestTravel, reachOf } from '../../../../shared/swap/reach'

const plate = (model: string, more: Partial<Nameplate> = {}): Nameplate => ({ model, axisKind: 'linear', stroke: 200, ratedThrust: 400, peakThrust: 800, pressForceMin: 5, pressForceMax: 70, brakeFitted: true, ...more })
const absolute = (move: number, target: number, more: Partial<Move> = {}): Move => ({ move, kind: 'absolute', target, speed: 100, acceleration: 1000, ...more })
const press: Move = { move: 5, kind: 'press', approach: 130, target: 150, speed: 100, acceleration: 1000, forceLimit: 38 }
const content = (moves: readonly Move[], setup: Setup = {}): Content => ({ axisKind: 'linear', extra: {}, moves, setup, zones: [] })

interface Case { readonly moves?: readonly Move[], readonly setup?: Setup, readonly into?: Nameplate | null, readonly out?: Nameplate, readonly more?: Partial<FitInput>, readonly model?: string }
function fit({ moves = [absolute(0, 0), press], setup = {}, into = plate('B'), out = plate('A'), more = {}, model = 'B' }: Case) {
  const carry: CarryCase = { replaced: 'unit', ownValues: false, out: { model: out.model, nameplate: out }, into: { model: into?.model ?? model, ...(into ? { nameplate: into } : {}) } }
  return fitOf({ ...carry, axis: { axisKind: 'linear', flags: [] }, kit: kitOf(content(moves, setup), carry), checks: [], state: 'spare', ...more })
}
const told = (one: Case) => fit(one).reasons.map(({ code, hard }) => [code, hard])

describe('whether a unit fits', () => {
  it('the same model: the same', () => expect(fit({ into: plate('A') })).toEqual({ fit: 'same', reasons: [] }))
  it('another force base: adjust', () => expect(fit({ into: plate('B', { ratedThrust: 500, peakThrust: 900 }) })).toEqual({ fit: 'adjust', reasons: [] }))

  it('hard: another kind of axis', () => expect(told({ into: plate('B', { axisKind: 'rotary' }) })).toEqual([['axis-kind', true]]))

  it('hard: a stroke shorter than the moves; just as long fits', () => {
    expect(told({ into: plate('B', { stroke: 149.9 }) })).toEqual([['stroke-short', true]])
    expect(told({ into: plate('B', { stroke: 150 }) })).toEqual([])
    expect(told({ into: plate('B', { stroke: 100 }), moves: [absolute(1, 40), { ...absolute(2, 120), kind: 'relative' }] })).toEqual([['stroke-short', true]])
  })

  it('hard: no brake on a load that falls, unless there never was one', () => {
    const falls = { setup: { mountingAngle: -90, payloadMass: 4 } }
    expect(told({ ...falls, into: plate('B', { brakeFitted: false }) })).toEqual([['no-brake', true]])
    expect(told({ into: plate('B', { brakeFitted: false }) })).toEqual([])
    expect(told({ ...falls, into: plate('B', { brakeFitted: false }), out: plate('A', { brakeFitted: false }) })).toEqual([])
  })

  it('hard: a force outside the new unit’s range, after rescaling', () => {
    // 38 % of 400 N are 152 N: 76 % of 200 N, and 3.8 % of 4000 N.
    const weak = fit({ into: plate('B', { ratedThrust: 200, peakThrust: 400 }) })
    expect(weak.reasons).toMatchObject([{ code: 'force-outside', hard: true, message: 'Move 5 would push with 76 % (152 N), and B does from 5 % (10 N) to 70 % (140 N).' }])
    expect(told({ into: plate('B', { ratedThrust: 4000, peakThrust: 8000 }) })).toEqual([['force-outside', true]])
    expect(told({ moves: [], setup: { thrustLimit: 150 }, into: plate('B', { ratedThrust: 200, peakThrust: 500 }) })).toEqual([['force-outside', true]])
  })

  it('with a planner: what no plate tells, too many moves, a unit that failed, another actuator, stops', () => {
    expect(told({ into: null })).toEqual([['nameplate-missing', false]])
    expect(told({ into: null, moves: [absolute(0, 0)] })).toEqual([['nameplate-missing', false]])
    expect(told({ into: null, model: 'A' })).toEqual([])
    expect(told({ into: plate('B', { maxMoves: 1 }) })).toEqual([['too-many-moves', false]])
    expect(told({ more: { state: 'failed' } })).toEqual([['unit-state', false]])
    expect(told({ into: plate('A'), more: { replaced: 'actuator', out: { model: 'A', actuatorModel: 'X' }, into: { model: 'A', actuatorModel: 'Y' } } })).toEqual([['actuator-model', false]])
    expect(told({ more: { checks: [{ rule: 'speed-limit', level: 'stop', at: ['/moves/0/speed'], message: 'm', values: {} }, { rule: 'payload', level: 'warn', at: [], message: 'w', values: {} }] } })).toEqual([['stop-check', false]])
  })
})

describe('how far the moves go', () => {
  it('targets, approaches, and relative moves from where they start', () => {
    expect(reachOf(content([absolute(0, 20, { next: 1 }), { ...absolute(1, -35), kind: 'relative' }, press]))).toEqual({ low: -15, high: 150 })
    expect(reachOf(content([{ ...absolute(1, -35), kind: 'relative' }]))).toBeUndefined()
    expect(reachOf(content([absolute(0, 20)], { modulo: 360 }))).toBeUndefined()
    expect(longestTravel(content([{ ...absolute(1, -35), kind: 'relative' }, absolute(2, 90)]))).toEqual({ moves: [1], length: 35 })
  })
})

describe('a load that can fall', () => {
  it('asks how it is blocked where gravity is flagged or the axis is not level', () => {
    expect([mayFall(['gravity'], content([])), mayFall([], content([], { mountingAngle: 3 })), mayFall(['press'], content([], { mountingAngle: 0 }))]).toEqual([true, true, false])
  })

  it('is driven back where its weight along the stroke is more than the friction', () => {
    // 4 kg at 30° pull with 4 · 9.80665 · 0.5 = 19.6 N.
    expect(drivenBack([], content([], { mountingAngle: 30, payloadMass: 4, frictionForce: 19 }))).toBe(true)
    expect(drivenBack([], content([], { mountingAngle: 30, payloadMass: 4, frictionForce: 20 }))).toBe(false)
    expect(drivenBack([], content([], { mountingAngle: 4 }))).toBe(false)
    expect(drivenBack([], content([], { mountingAngle: 5 }))).toBe(true)
    expect(drivenBack(['gravity'], content([]))).toBe(true)
    expect(drivenBack([], { ...content([], { mountingAngle: 90, unbalanceTorque: 3 }), axisKind: 'rotary' })).toBe(true)
    expect(drivenBack([], { ...content([], { mountingAngle: 90 }), axisKind: 'rotary' })).toBe(false)
  })
})
