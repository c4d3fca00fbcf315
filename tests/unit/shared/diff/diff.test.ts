import { describe, expect, it } from 'vitest'
import { diffContents } from '../../../../shared/diff/diff'
import type { DiffContext, FieldChange } from '../../../../shared/diff/types'
import { emptyContent } from '../../../../shared/settings/content'
import type { Content, Move, Setup } from '../../../../shared/settings/types'

const row: Move = { move: 5, kind: 'absolute', target: 150, speed: 250, acceleration: 2000 }
const press: Move = { move: 6, kind: 'press', target: 150, speed: 100, acceleration: 1000, forceLimit: 38, approach: 140 }
const linear = emptyContent('linear')
const withSetup = (setup: Setup): Content => ({ ...linear, setup })
const withMoves = (moves: readonly Move[], setup: Setup = {}): Content => ({ ...linear, moves, setup })
const only = (changes: readonly FieldChange[]): FieldChange => {
  expect(changes).toHaveLength(1)
  return changes[0]!
}
const setupChange = (before: Setup, after: Setup, context?: DiffContext) => only(diffContents(withSetup(before), withSetup(after), context))
const moveChange = (before: Move, after: Move, context?: DiffContext, setup: Setup = {}) =>
  only(diffContents(withMoves([before], setup), withMoves([after], setup), context))

describe('a change record', () => {
  it('of a percentage shows points: 38 to 55 % is 17 points', () => {
    expect(setupChange({ thrustLimit: 38 }, { thrustLimit: 55 })).toStrictEqual({
      at: '/setup/thrustLimit', section: 'setup', field: 'thrustLimit', before: 38, after: 55, unit: '%', delta: 17, points: 17, weight: 'harm', watched: true,
    })
  })

  it('of another number shows per cent of what it was', () => {
    expect(moveChange(row, { ...row, target: 148.5 })).toStrictEqual({
      at: '/moves/0/target', section: 'move', row: 5, field: 'target', before: 150, after: 148.5, unit: 'mm', delta: -1.5, percent: -1, weight: 'motion', watched: true,
    })
  })

  it('goes by the size of a negative value: from -20 to -10 is +50 %', () => {
    expect(setupChange({ softLimitMin: -20 }, { softLimitMin: -10 })).toMatchObject({ delta: 10, percent: 50 })
  })

  it('has no per cent from 0', () => {
    expect(setupChange({ homeOffset: 0 }, { homeOffset: 2 })).toStrictEqual({
      at: '/setup/homeOffset', section: 'setup', field: 'homeOffset', before: 0, after: 2, unit: 'mm', delta: 2, weight: 'harm', watched: true,
    })
  })

  it('is exact where binary fractions are not: 0.3 − 0.1 is 0.2', () => {
    expect(setupChange({ softLimitMax: 0.1 }, { softLimitMax: 0.3 }).delta).toBe(0.2)
    expect(setupChange({ softLimitMax: 999999999.999999 }, { softLimitMax: -999999999.999999 }).delta).toBe(-1999999999.999998)
    expect(setupChange({ softLimitMax: 0.000001 }, { softLimitMax: 0.000002 }).delta).toBe(0.000001)
  })

  it('leaves out what is not set', () => {
    expect(setupChange({}, { brakeFitted: true })).toStrictEqual({
      at: '/setup/brakeFitted', section: 'setup', field: 'brakeFitted', after: true, weight: 'harm', watched: true,
    })
    expect(setupChange({ jogSpeed: 30 }, {})).toStrictEqual({
      at: '/setup/jogSpeed', section: 'setup', field: 'jogSpeed', before: 30, unit: 'mm/s', weight: 'harm', watched: true,
    })
  })

  it('of the drive’s own number keeps every digit', () => {
    expect(setupChange({ velocityGain: 0.00000012 }, { velocityGain: 0.0000002 })).toMatchObject({ delta: 0.00000008 })
    expect(setupChange({ velocityGain: 1e30 }, { velocityGain: 3e30 })).toMatchObject({ delta: 2e30, percent: 200 })
  })

  it('carries the unit of the axis kind', () => {
    const rotary = (softLimitMax: number): Content => ({ ...emptyContent('rotary'), setup: { softLimitMax } })
    expect(only(diffContents(rotary(90), rotary(180)))).toMatchObject({ unit: 'deg', delta: 90, percent: 100 })
  })

  it('of the axis kind is one of the file', () => {
    expect(only(diffContents(linear, emptyContent('rotary')))).toStrictEqual({
      at: '/axisKind', section: 'file', field: 'axisKind', before: 'linear', after: 'rotary', weight: 'harm', watched: true,
    })
  })
})

describe('rows', () => {
  it('pair by number; one that comes is a change for each field it has, its number aside', () => {
    const changes = diffContents(withMoves([row]), withMoves([{ ...row, move: 4, label: 'New' }, row]))
    expect(changes.map(({ at, row: number, field, before, after }) => ({ at, number, field, before, after }))).toEqual([
      { at: '/moves/0/kind', number: 4, field: 'kind', before: undefined, after: 'absolute' },
      { at: '/moves/0/target', number: 4, field: 'target', before: undefined, after: 150 },
      { at: '/moves/0/speed', number: 4, field: 'speed', before: undefined, after: 250 },
      { at: '/moves/0/acceleration', number: 4, field: 'acceleration', before: undefined, after: 2000 },
      { at: '/moves/0/label', number: 4, field: 'label', before: undefined, after: 'New' },
    ])
  })

  it('that go point into the first content', () => {
    const changes = diffContents(withMoves([{ ...row, move: 1 }, row]), withMoves([{ ...row, move: 1 }]))
    expect(changes.map(change => change.at)).toEqual(['/moves/1/kind', '/moves/1/target', '/moves/1/speed', '/moves/1/acceleration'])
    expect(changes.every(change => change.row === 5 && change.after === undefined)).toBe(true)
  })

  it('whose value goes point into the first content too, at its index there', () => {
    const before = withMoves([{ ...row, window: 0.1 }])
    const after = withMoves([{ ...row, move: 2 }, row])
    expect(diffContents(before, after).find(change => change.field === 'window')?.at).toBe('/moves/0/window')
  })

  it('of the zones weigh harm', () => {
    const zones = (to: number): Content => ({ ...linear, zones: [{ zone: 3, from: 10, to }] })
    expect(only(diffContents(zones(25), zones(30)))).toStrictEqual({
      at: '/zones/0/to', section: 'zone', row: 3, field: 'to', before: 25, after: 30, unit: 'mm', delta: 5, percent: 20, weight: 'harm', watched: true,
    })
    expect(diffContents(linear, zones(25)).map(change => change.field)).toEqual(['from', 'to'])
  })
})

describe('values of the drive', () => {
  const extra = (values: Content['extra']): Content => ({ ...linear, extra: values })
  const change = (before: Content['extra'], after: Content['extra'], context?: DiffContext) => only(diffContents(extra(before), extra(after), context))

  it('weigh motion and are not watched until the dictionary says otherwise', () => {
    expect(change({ 'K-017': 15 }, { 'K-017': 20 })).toMatchObject({ at: '/extra/K-017', field: 'K-017', delta: 5, weight: 'motion', watched: false })
    const dictionary = { 'K-017': { weight: 'harm' as const, unit: '%' }, 'Filter': { weight: 'text' as const } }
    expect(change({ 'K-017': 15 }, { 'K-017': 20 }, { dictionary })).toMatchObject({ weight: 'harm', watched: true, unit: '%', points: 5 })
    expect(change({ Filter: 'A' }, { Filter: 'B' }, { dictionary })).toMatchObject({ weight: 'text', watched: false })
  })

  it('are one value together with their unit', () => {
    const counts = (value: number) => ({ Ramp: { value, unit: 'counts' } })
    expect(change(counts(3), counts(4))).toMatchObject({ before: { value: 3, unit: 'counts' }, after: { value: 4, unit: 'counts' }, unit: 'counts', delta: 1 })
    expect(diffContents(extra(counts(3)), extra(counts(3)))).toEqual([])
    expect(change(counts(3), { Ramp: { value: 3, unit: 'ms' } })).not.toHaveProperty('delta')
    expect(change({ Ramp: 3 }, counts(3))).not.toHaveProperty('unit')
  })

  it('tell a text from a number', () => {
    expect(change({ Recipe: '7' }, { Recipe: 7 })).toStrictEqual({
      at: '/extra/Recipe', section: 'extra', field: 'Recipe', before: '7', after: 7, weight: 'motion', watched: false,
    })
  })

  it('are pointed at with ~ and / escaped, in the order of their keys', () => {
    const changes = diffContents(extra({}), extra({ 'm~n': 1, 'a/b': 1, '~1': 1 }))
    expect(changes.map(one => one.at)).toEqual(['/extra/a~1b', '/extra/m~0n', '/extra/~01'])
  })

  it('under the names of built-in properties are values like others', () => {
    expect(change({}, { constructor: 1 } as unknown as Content['extra'])).toMatchObject({ field: 'constructor', after: 1 })
    expect(change({ toString: 'x' } as unknown as Content['extra'], {})).toMatchObject({ field: 'toString', before: 'x' })
  })
})

describe('weights', () => {
  it('are those of the field tables', () => {
    const fields = { label: 'Pick', kind: 'relative', target: 140, next: 3 } as const
    const changes = diffContents(withMoves([row]), withMoves([{ ...row, ...fields }]))
    expect(changes.map(({ field, weight, watched }) => [field, weight, watched])).toEqual([
      ['kind', 'harm', true], ['target', 'motion', true], ['next', 'motion', true], ['label', 'text', false],
    ])
  })

  it.each(['gravity', 'press', 'collision'] as const)('of motion fields of moves are harm on an axis flagged %s', (flag) => {
    const context = { flags: [flag] }
    expect(moveChange(row, { ...row, speed: 300 }, context).weight).toBe('harm')
    expect(moveChange(row, { ...row, dwell: 300, next: undefined }, context)).toMatchObject({ field: 'dwell', weight: 'harm' })
    expect(moveChange(row, { ...row, label: 'Pick' }, context).weight).toBe('text')
    expect(setupChange({ jerk: 1 }, { jerk: 2 }, context).weight).toBe('motion')
  })

  it('sort the list: harm, motion, text, then section, row and field', () => {
    const before = { ...withMoves([row, press], { jerk: 1 }), zones: [{ zone: 1, from: 0, to: 1 }] }
    const after = {
      ...withMoves([{ ...row, speed: 1, label: 'a' }, { ...press, forceLimit: 1 }], { jerk: 2, jogSpeed: 1 }), zones: [{ zone: 1, from: 0, to: 2 }], extra: { z: 1, a: 1 },
    }
    expect(diffContents(before, after).map(change => `${change.section} ${change.row ?? ''} ${change.field}`)).toEqual([
      'setup  jogSpeed', 'zone 1 to', 'move 6 forceLimit', 'setup  jerk', 'move 5 speed', 'extra  a', 'extra  z', 'move 5 label',
    ])
  })
})

describe('watched fields', () => {
  it('are those that planners of the site add as well', () => {
    const context = { watched: ['jerk', 'label', 'extra:K-017'] }
    expect(setupChange({ jerk: 1 }, { jerk: 2 }).watched).toBe(false)
    expect(setupChange({ jerk: 1 }, { jerk: 2 }, context).watched).toBe(true)
    expect(moveChange(row, { ...row, label: 'Pick' }, context)).toMatchObject({ weight: 'text', watched: true })
    expect(only(diffContents(linear, { ...linear, extra: { 'K-017': 1 } }, context)).watched).toBe(true)
    expect(only(diffContents(linear, { ...linear, extra: { jerk: 1 } }, context)).watched).toBe(false)
  })
})

describe('a default written out', () => {
  it('is the same motion: deceleration as acceleration', () => {
    expect(moveChange(row, { ...row, deceleration: 2000 })).toMatchObject({ field: 'deceleration', weight: 'text', watched: false })
    expect(moveChange({ ...row, deceleration: 2000 }, row)).toMatchObject({ weight: 'text' })
    expect(moveChange(row, { ...row, deceleration: 2100 })).toMatchObject({ weight: 'motion', watched: true })
    expect(moveChange(row, { ...row, deceleration: 2000 }, { flags: ['gravity'] }).weight).toBe('text')
  })

  it('is the default that the row had before, not the one that it has now', () => {
    const changes = diffContents(withMoves([row]), withMoves([{ ...row, acceleration: 3000, deceleration: 2000 }]))
    expect(changes.map(({ field, weight }) => [field, weight])).toEqual([['acceleration', 'motion'], ['deceleration', 'text']])
    const raised = diffContents(withMoves([row]), withMoves([{ ...row, acceleration: 3000, deceleration: 3000 }]))
    expect(raised.map(({ field, weight }) => [field, weight])).toEqual([['acceleration', 'motion'], ['deceleration', 'motion']])
  })

  it('is the same motion: the press speed of the setup', () => {
    const setup = { pressSpeed: 8 }
    expect(moveChange(press, { ...press, pressSpeed: 8 }, {}, setup)).toMatchObject({ weight: 'text' })
    expect(moveChange(press, { ...press, pressSpeed: 9 }, {}, setup)).toMatchObject({ weight: 'harm', watched: true })
    expect(moveChange(press, { ...press, pressSpeed: 8 })).toMatchObject({ weight: 'harm' })
  })

  it('is the same motion: signed turns, and soft limits active where there are some', () => {
    expect(moveChange(row, { ...row, turn: 'signed' })).toMatchObject({ weight: 'text' })
    expect(moveChange(row, { ...row, turn: 'shortest' })).toMatchObject({ weight: 'motion' })
    const limits = { softLimitMin: 0, softLimitMax: 198 }
    expect(setupChange(limits, { ...limits, softLimitsActive: true })).toMatchObject({ weight: 'text', watched: false })
    expect(setupChange(limits, { ...limits, softLimitsActive: false })).toMatchObject({ weight: 'harm', watched: true })
    expect(setupChange({}, { softLimitsActive: true })).toMatchObject({ weight: 'harm' })
  })

  it('in a row that is new weighs as any value of it', () => {
    const changes = diffContents(linear, withMoves([{ ...row, deceleration: 2000 }]))
    expect(changes.find(change => change.field === 'deceleration')).toMatchObject({ weight: 'motion', watched: true })
  })
})

describe('a changed press speed of the setup', () => {
  it('lists the moves that go by it', () => {
    const moves = [row, press, { ...press, move: 7, pressSpeed: 5 }, { ...press, move: 9 }]
    expect(only(diffContents(withMoves(moves, { pressSpeed: 8 }), withMoves(moves, { pressSpeed: 12 })))).toStrictEqual({
      at: '/setup/pressSpeed', section: 'setup', field: 'pressSpeed', before: 8, after: 12, unit: 'mm/s', delta: 4, percent: 50, weight: 'harm', watched: true, affects: [6, 9],
    })
  })

  it('lists none where every press names its own, or is new', () => {
    const before = withMoves([{ ...press, pressSpeed: 5 }], { pressSpeed: 8 })
    const after = withMoves([{ ...press, pressSpeed: 5 }, { ...press, move: 8 }], { pressSpeed: 12 })
    expect(diffContents(before, after)[0]).not.toHaveProperty('affects')
  })
})
