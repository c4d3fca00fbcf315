import { describe, expect, it } from 'vitest'
import type { Nameplate } from '../../../../shared/settings/nameplate'
import type { Content, Move, Setup } from '../../../../shared/settings/types'
import type { CarryCase } from '../../../../shared/swap/carried'
import { drivenBack, mayFall } from '../../../../shared/swap/falls'
import { fitOf, type FitInput } from '../../../../shared/swap/fit'
import { kitOf } from '../../../../shared/swap/kit'
import { longestTravel, reachOf } from '../../../../shared/swap/reach'
import { absolute, linear, plate, press, relative, rotary, unused } from '../../../support/check-input'

const strong = { ratedThrust: 400, peakThrust: 800, pressForceMin: 5, pressForceMax: 70, brakeFitted: true } as const
const older = plate({ model: 'A', ...strong })
const newer = (more: Partial<Nameplate> = {}) => plate({ model: 'B', ...strong, ...more })

interface Case { readonly content?: Content, readonly out?: Nameplate | null, readonly into?: Nameplate | null, readonly more?: Partial<FitInput>, readonly carry?: Partial<CarryCase> }
function fit({ content = linear(), out = older, into = newer(), more = {}, carry = {} }: Case) {
  const swap: CarryCase = { replaced: 'unit', ownValues: false, out: { model: 'A', ...out ? { nameplate: out } : {} }, into: { model: 'B', ...into ? { nameplate: into } : {} }, ...carry }
  return fitOf({ ...swap, axis: { axisKind: content.axisKind, flags: [] }, kit: kitOf(content, swap), checks: [], state: 'spare', ...more })
}
const reasons = (one: Case) => fit(one).reasons
const codes = (one: Case) => reasons(one).map(({ code }) => code)
const moves = (...rows: Move[]) => linear({}, rows)

describe('hard: another kind of axis', () => {
  it('is said alone, since nothing else can be compared', () => {
    const one = { content: linear({ thrustLimit: 500 }, [absolute(1, 900)]), into: newer({ axisKind: 'rotary' }) }
    expect(reasons(one)).toEqual([{ code: 'axis-kind', hard: true, message: 'B is a rotary unit, and this axis is linear.', at: [] }])
  })

  it('counts on a unit of the model that is registered wrongly too', () => {
    expect(codes({ into: plate({ model: 'A', axisKind: 'rotary' }), carry: { into: { model: 'A', nameplate: plate({ axisKind: 'rotary' }) } } })).toEqual(['axis-kind'])
  })
})

describe('hard: a stroke shorter than the moves', () => {
  it('says from where to where they go; a stroke just as long does', () => {
    expect(reasons({ content: moves(absolute(1, -10), absolute(2, 140.5)), into: newer({ stroke: 150 }) }))
      .toEqual([{ code: 'stroke-short', hard: true, message: 'The moves go from −10 mm to 140.5 mm, 150.5 mm in all; B has a stroke of 150 mm.', at: ['/moves'] }])
    expect(codes({ content: moves(absolute(1, -10), absolute(2, 140)), into: newer({ stroke: 150 }) })).toEqual([])
  })

  it('counts without binary noise: from 0.1 to 150.3 are 150.2 mm, in doubles a hair more', () => {
    expect(150.3 - 0.1).toBeGreaterThan(150.2)
    expect(codes({ content: moves(absolute(1, 0.1), absolute(2, 150.3)), into: newer({ stroke: 150.2 }) })).toEqual([])
  })

  it('one step that is longer than the stroke, where no place is known; just as long does', () => {
    expect(reasons({ content: moves(relative(1, -150.5)), into: newer({ stroke: 150 }) }).map(({ message }) => message)).toEqual(['One move goes 150.5 mm at once; B has a stroke of 150 mm.'])
    expect(codes({ content: moves(relative(1, -150)), into: newer({ stroke: 150 }) })).toEqual([])
  })

  it('relative moves that follow each other, from anywhere: 100 + 60 − 30 reach 160 mm from lowest to highest', () => {
    const run = moves(relative(1, 100, { next: 2 }), relative(2, 60, { next: 3 }), relative(3, -30))
    expect(reasons({ content: run, into: newer({ stroke: 159.9 }) }).map(({ message }) => message)).toEqual(['Moves 1→2→3 go 160 mm in one run; B has a stroke of 159.9 mm.'])
    expect(codes({ content: run, into: newer({ stroke: 160 }) })).toEqual([])
    // There and back takes the room of one way; a place of its own ends the run.
    expect(longestTravel(moves(relative(1, 100, { next: 2 }), relative(2, -100)))).toEqual({ moves: [1, 2], length: 100 })
    expect(longestTravel(moves(relative(1, 40, { next: 2 }), absolute(2, 0, { next: 3 }), relative(3, 90)))).toEqual({ moves: [1], length: 40 })
    expect(longestTravel(moves(relative(1, 40, { next: 2 }), relative(2, 30, { next: 1 })))).toEqual({ moves: [1, 2], length: 70 })
  })

  it('a turning axis has no ends, and an empty row goes nowhere', () => {
    const turning = rotary({ modulo: 360 }, [absolute(1, 0), absolute(2, 900), relative(3, 900)])
    const table = plate({ axisKind: 'rotary', stroke: 360 })
    expect(codes({ content: turning, out: table, into: table })).toEqual([])
    expect(codes({ content: moves(absolute(1, 0), { ...unused(2), target: 900 }) })).toEqual([])
  })

  it('is not asked of a unit of the model, nor of its own values', () => {
    const far = moves(absolute(1, 0), absolute(2, 900))
    expect(codes({ content: far, carry: { into: { model: 'A', nameplate: plate({ stroke: 10 }) } } })).toEqual([])
    expect(codes({ content: far, carry: { ownValues: true } })).toEqual([])
    expect(codes({ content: far })).toEqual(['stroke-short'])
  })
})

describe('hard: no brake on a load that falls', () => {
  const hanging: Setup = { mountingAngle: -90, payloadMass: 4 }
  const bare = newer({ brakeFitted: false })
  const { brakeFitted: _unsaid, ...silent } = older

  it('names the unit and where it stands', () => {
    expect(reasons({ content: linear(hanging), into: bare })).toEqual([{ code: 'no-brake', hard: true, message: 'The load of this axis falls when nothing holds it, and B has no brake.', at: ['/setup/brakeFitted'] }])
  })

  it('by the flag too, and by the mass of the new unit’s moving part', () => {
    expect(codes({ into: bare, more: { axis: { axisKind: 'linear', flags: ['gravity'] } } })).toEqual(['no-brake'])
    // 1 kg at 90° pulls 9.8 N: friction of 12 N holds it, and not with the 0.5 kg of the new moving part (14.7 N).
    const light: Setup = { mountingAngle: 90, payloadMass: 1, frictionForce: 12 }
    expect(codes({ content: linear(light), into: bare })).toEqual([])
    expect(codes({ content: linear(light), into: { ...bare, movingMass: 0.5 } })).toEqual(['no-brake'])
  })

  it('where the old unit had one, may have had one, or the settings say so; not where there never was one', () => {
    const hadNone = { ...older, brakeFitted: false }
    expect(codes({ content: linear(hanging), into: bare, out: silent })).toEqual(['no-brake'])
    expect(codes({ content: linear(hanging), into: bare, out: hadNone })).toEqual([])
    expect(codes({ content: linear({ ...hanging, brakeFitted: false }), into: bare, out: hadNone })).toEqual([])
    expect(codes({ content: linear({ ...hanging, brakeFitted: true }), into: bare, out: hadNone })).toEqual(['no-brake'])
  })

  it('where the new plate is silent, the rules tell', () => expect(codes({ content: linear(hanging), into: plate({ model: 'B', ratedThrust: 400 }) })).toEqual([]))
})

describe('hard: a force outside the new unit’s range', () => {
  const weak = newer({ ratedThrust: 400, peakThrust: 600 })

  it('a limit of the setup up to the peak, 150 % here; the overload level is no force', () => {
    const at = (setup: Setup) => reasons({ content: linear(setup), into: weak }).map(({ message, at }) => `${at.join()}: ${message}`)
    expect(at({ thrustLimit: 150, thrustLimitPositive: 150, thrustLimitNegative: 150, homingForceLimit: 150, overloadLevel: 900 })).toEqual([])
    expect(at({ thrustLimit: 150.1 })).toEqual(['/setup/thrustLimit: The thrust limit would be 150.1 % (600.4 N), and B can do 150 % (600 N) at most.'])
    expect(at({ thrustLimitPositive: 160, thrustLimitNegative: 170, homingForceLimit: 180 })).toEqual([
      '/setup/homingForceLimit: The homing force limit would be 180 % (720 N), and B can do 150 % (600 N) at most.',
      '/setup/thrustLimitPositive: The thrust limit towards plus would be 160 % (640 N), and B can do 150 % (600 N) at most.',
      '/setup/thrustLimitNegative: The thrust limit towards minus would be 170 % (680 N), and B can do 150 % (600 N) at most.',
    ])
  })

  it('a press within the range of presses, ends included; any other move up to the peak', () => {
    const pressing = (forceLimit: number) => codes({ content: moves(press(1, 50, 60, { forceLimit })), into: weak })
    expect([5, 70].flatMap(pressing)).toEqual([])
    expect([pressing(4.9), pressing(70.1)]).toEqual([['force-outside'], ['force-outside']])
    const going = (forceLimit: number) => codes({ content: moves(absolute(1, 50, { forceLimit })), into: weak })
    expect([...going(1), ...going(150)]).toEqual([])
    expect(going(150.1)).toEqual(['force-outside'])
  })

  it('a press as light as one likes where the plate names no least force', () => {
    const { pressForceMin: _least, ...light } = newer()
    expect(codes({ content: moves(press(1, 50, 60, { forceLimit: 0.1 })), into: light })).toEqual([])
    expect(reasons({ content: moves(press(1, 50, 60, { forceLimit: 71 })), into: light })[0]?.message).toBe('Move 1 would push with 71 % (284 N), and B does up to 70 % (280 N).')
  })

  it('points at the row as it stands in the table, and leaves empty rows out', () => {
    const content = moves(absolute(3, 1), { ...unused(5), forceLimit: 900 }, absolute(9, 1, { forceLimit: 151 }))
    expect(reasons({ content, into: weak })).toEqual([{ code: 'force-outside', hard: true, message: 'Move 9 would push with 151 % (604 N), and B does up to 150 % (600 N).', at: ['/moves/2/forceLimit'] }])
  })

  it('a percentage that rounds down to nothing pushes with nothing', () => {
    const entryTable: Nameplate['entryTable'] = { delimiter: ';', decimal: 'point', header: [], columns: { number: 1, value: 2, name: 0, unit: 0 }, parameters: [], zones: [], moves: [{ name: 'force', field: 'forceLimit', digits: 0 }] }
    // 1 % of 400 N are 0.625 % of 640 N, and those are no whole per cent.
    const one = { content: moves(absolute(1, 50, { forceLimit: 1 })), into: newer({ ratedThrust: 640, entryTable }) }
    expect(reasons(one).map(({ message }) => message)).toEqual(['Move 1 would push with 0 % (0 N), and B does up to 125 % (800 N).'])
  })

  it('in newton metres on a turning axis', () => {
    const table = plate({ model: 'B', axisKind: 'rotary', stroke: 360, ratedThrust: 8, peakThrust: 12 })
    expect(reasons({ content: rotary({ thrustLimit: 151 }), out: plate({ axisKind: 'rotary', ratedThrust: 8 }), into: table })[0]?.message).toBe('The thrust limit would be 151 % (12.08 N·m), and B can do 150 % (12 N·m) at most.')
  })

  it('without a peak on the plate nothing is too much but for a press', () => {
    const { peakThrust: _peak, ...open } = newer()
    expect(codes({ content: linear({ thrustLimit: 900 }, [absolute(1, 5, { forceLimit: 900 })]), into: open })).toEqual([])
    expect(codes({ content: moves(press(1, 5, 6, { forceLimit: 71 })), into: open })).toEqual(['force-outside'])
  })
})

describe('with a planner’s leave', () => {
  const told = (one: Case) => reasons(one).map(({ code, hard, message }) => [code, hard, message])
  const forces = linear({ thrustLimit: 50 })

  it('a force base that one of the plates does not tell, or no plate at all', () => {
    const { ratedThrust: _rated, ...unrated } = newer()
    expect(told({ content: forces, into: unrated })).toEqual([['nameplate-missing', false, 'What 100 % of force means on B is not on a nameplate: its percentages may mean other newtons.']])
    expect(told({ content: forces, out: null })).toEqual([['nameplate-missing', false, 'What 100 % of force meant on A is not on a nameplate: the percentages cannot be brought over.']])
    expect(told({ into: null })).toEqual([['nameplate-missing', false, 'No nameplate of B is registered: what it can do is not known.']])
    // Without a percentage in the values nothing hangs on the base.
    expect(told({ into: unrated })).toEqual([])
    expect(told({ out: null })).toEqual([])
  })

  it('nothing of that on a unit of the model, or for its own values', () => {
    expect(told({ content: forces, carry: { out: { model: 'A' }, into: { model: 'A' } } })).toEqual([])
    expect(told({ content: forces, carry: { out: { model: 'A' }, ownValues: true } })).toEqual([])
  })

  it('another actuator, where only that is replaced', () => {
    const actuators = (out: string | undefined, into: string | undefined, more: Partial<CarryCase> = {}) => told({
      carry: { replaced: 'actuator', out: { model: 'A', ...out ? { actuatorModel: out } : {} }, into: { model: 'A', ...into ? { actuatorModel: into } : {} }, ...more },
    })
    expect(actuators('HA', 'HB')).toEqual([['actuator-model', false, 'The actuator is HB and was HA: its stroke, force and brake are to be compared by its plate.']])
    expect(actuators('HA', undefined)).toEqual([['actuator-model', false, 'The actuator is of no known model and was HA: its stroke, force and brake are to be compared by its plate.']])
    expect(actuators(undefined, 'HB')[0]?.[2]).toContain('is HB and was of no known model')
    expect([actuators('HA', 'HA'), actuators('HA', 'HB', { ownValues: true }), actuators('HA', 'HB', { replaced: 'drive' })]).toEqual([[], [], []])
  })

  it('more moves than it holds; just as many fit', () => {
    const two = moves(absolute(1, 0), unused(2))
    expect(told({ content: two, into: newer({ maxMoves: 1 }) })).toEqual([['too-many-moves', false, 'The table has 2 moves, and B holds 1.']])
    expect(told({ content: two, into: newer({ maxMoves: 2 }) })).toEqual([])
  })

  it('a unit that the register does not have as a spare', () => {
    const state = (is: FitInput['state']) => told({ more: { state: is } })
    expect([state('failed'), state('repair'), state('scrapped'), state('spare')].flat().map(([, , message]) => message))
      .toEqual(['The register has this unit as failed.', 'The register has this unit as in repair.', 'The register has this unit as scrapped.'])
  })

  it('stops of the rules, in their words and with their places; warnings and notes stop nobody', () => {
    const result = (level: 'stop' | 'warn' | 'note' | 'unknown') => ({ rule: 'speed-limit', level, at: ['/moves/0/speed'], message: `a ${level}`, values: {} } as const)
    expect(reasons({ more: { checks: [result('warn'), result('stop'), result('note'), result('unknown')] } })).toEqual([{ code: 'stop-check', hard: false, message: 'a stop', at: ['/moves/0/speed'] }])
  })

  it('hard reasons stand first', () => {
    const all = fit({ content: moves(absolute(1, 0), absolute(2, 900)), into: newer({ maxMoves: 1 }), more: { state: 'failed' } })
    expect(all.reasons.map(({ code, hard }) => `${code} ${hard}`)).toEqual(['stroke-short true', 'unit-state false', 'too-many-moves false'])
    expect(all.fit).toBe('unfit')
  })
})

describe('how far the moves go', () => {
  it('an approach counts, an empty row does not', () => {
    expect(reachOf(moves(press(1, 140, 120), absolute(2, 10), { ...unused(3), target: -50 }))).toEqual({ low: 10, high: 140 })
    expect(reachOf(moves(unused(1)))).toBeUndefined()
    expect(longestTravel(moves({ ...unused(1), kind: 'relative', target: 500 }, absolute(2, 90)))).toBeUndefined()
  })

  it('a relative move from both ends of what leads to it, one that nobody names not at all', () => {
    expect(reachOf(moves(absolute(1, 0, { next: 3 }), absolute(2, 50, { next: 3 }), relative(3, 20), relative(4, 500)))).toEqual({ low: 0, high: 70 })
  })
})

describe('whether a load can fall', () => {
  it('is asked where the axis is not known to be level, or a load is off the centre of a turning one', () => {
    expect([mayFall([], linear()), mayFall([], linear({ mountingAngle: 0 })), mayFall([], linear({ mountingAngle: -0.5 })), mayFall(['collision'], linear())]).toEqual([false, false, true, false])
    expect([mayFall([], rotary({ unbalanceTorque: 2 })), mayFall([], rotary({ unbalanceTorque: 0 })), mayFall([], rotary())]).toEqual([true, false, false])
    expect(mayFall([], linear({ unbalanceTorque: 2 }))).toBe(false)
  })

  it('is so where m·g·s is above the friction, equal holds', () => {
    // 2 kg at 30°: 2 · 9.80665 · 0.5 = 9.80665 N; the sine of 30° comes out a hair below one half.
    const held = (frictionForce: number) => drivenBack([], linear({ mountingAngle: -30, payloadMass: 2, frictionForce }))
    expect([held(9.80665), held(9.80664)]).toEqual([false, true])
    // An angle that is not given counts as level: at 1° 2 kg would pull with 0.34 N.
    expect(drivenBack([], linear({ payloadMass: 2, frictionForce: 0.1 }))).toBe(false)
    expect(drivenBack([], linear({ mountingAngle: 90, frictionForce: 5 }))).toBe(false)
    expect(drivenBack([], linear({ mountingAngle: 90, frictionForce: 5 }), { movingMass: 0.6 })).toBe(true)
  })

  it('of a turning axis by the unbalance torque at its tilt: 4 N·m at 30° are 2 N·m', () => {
    const turned = (frictionTorque?: number) => drivenBack([], rotary({ mountingAngle: 30, unbalanceTorque: 4, ...frictionTorque === undefined ? {} : { frictionTorque } }))
    expect([turned(1.99), turned(2.01), turned()]).toEqual([true, false, true])
    // Friction of the other kind says nothing.
    expect(drivenBack([], rotary({ mountingAngle: 30, unbalanceTorque: 4, frictionForce: 900 }))).toBe(true)
  })

  it('where nobody measured the friction, from 5° on (common practice, no source)', () => {
    expect([4.9, 5, -5, -4.9, 0].map(mountingAngle => drivenBack([], linear({ mountingAngle, payloadMass: 2 })))).toEqual([false, true, true, false, false])
    expect(drivenBack([], rotary({ mountingAngle: 4.9, unbalanceTorque: 1 }))).toBe(false)
  })
})
