import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { changeOf, type Place } from '../../../../shared/diff/change'
import type { FieldRule } from '../../../../shared/diff/rules'
import { canonicalNumber, ownNumber } from '../../../support/arbitrary-content'

const rule: FieldRule = { field: 'target', unit: 'mm', weight: 'motion', watched: true, added: false, driveOwn: false, fromValue: false }
const row: Place = { at: '/moves/0/target', section: 'move', row: 5 }
const setup: Place = { at: '/setup/softLimitMax', section: 'setup', row: undefined }
const own: FieldRule = { ...rule, field: 'K-017', unit: 'A', driveOwn: true, fromValue: true }
const extra: Place = { at: '/extra/K-017', section: 'extra', row: undefined }

describe('a change of a number', () => {
  it('says the same in a row as in the setup, but for the row', () => {
    fc.assert(fc.property(canonicalNumber(-1e9, 1e9), canonicalNumber(-1e9, 1e9), fc.constantFrom('mm', '%', undefined), (before, after, unit) => {
      const { row: number, ...inRow } = changeOf({ ...rule, unit }, { ...setup, row: 5 }, before, after, false)
      expect(number).toBe(5)
      expect(inRow).toStrictEqual(changeOf({ ...rule, unit }, setup, before, after, false))
    }))
  })

  it('has its keys in one order, whatever it is a change of', () => {
    const order = ['at', 'section', 'row', 'field', 'before', 'after', 'unit', 'delta', 'percent', 'points', 'weight', 'watched']
    const changes = [
      changeOf(rule, row, 10, 12, false), changeOf(rule, row, 0, 12, false), changeOf({ ...rule, unit: '%' }, row, 10, 12, false), changeOf({ ...rule, unit: undefined }, row, 10, 12, false),
      changeOf(rule, row, undefined, 12, true), changeOf(rule, setup, 10, undefined, false), changeOf(own, extra, { value: 1, unit: 'V' }, { value: 2, unit: 'V' }, false),
    ]
    for (const change of changes) expect(Object.keys(change)).toEqual(order.filter(key => key in change))
  })

  it('is after minus before, and per cent of the size of what was', () => {
    expect(changeOf(rule, row, -20, -10, false)).toMatchObject({ delta: 10, percent: 50 })
    expect(changeOf(rule, row, -20, -30, false)).toMatchObject({ delta: -10, percent: -50 })
    expect(changeOf(rule, row, 40, 0, false)).toMatchObject({ delta: -40, percent: -100 })
  })

  it('has no per cent from 0: nothing is a part of nothing', () => {
    for (const place of [row, setup]) expect(changeOf(rule, place, 0, 5, false)).not.toHaveProperty('percent')
  })

  it('has points, not per cent, where the value is a percentage', () => {
    for (const place of [row, setup]) {
      const change = changeOf({ ...rule, unit: '%' }, place, 38, 55, false)
      expect(change).toMatchObject({ delta: 17, points: 17, unit: '%' })
      expect(change).not.toHaveProperty('percent')
    }
  })

  it('without a unit has per cent all the same: a gain that doubled', () => {
    expect(changeOf({ ...rule, unit: undefined }, setup, 2, 4, false)).toMatchObject({ delta: 2, percent: 100 })
    expect(changeOf({ ...rule, unit: undefined }, setup, 2, 4, false)).not.toHaveProperty('unit')
  })
})

describe('a value that came or went', () => {
  it('has a unit and no measures', () => {
    for (const [before, after] of [[undefined, 7], [7, undefined]] as const) {
      const change = changeOf(rule, row, before, after, false)
      expect(change.unit).toBe('mm')
      for (const key of ['delta', 'percent', 'points']) expect(change).not.toHaveProperty(key)
    }
    expect(changeOf(rule, row, undefined, 7, false)).not.toHaveProperty('before')
    expect(changeOf(rule, row, 7, undefined, false)).not.toHaveProperty('after')
  })

  it('as a default written out weighs text and is watched only where the site added the field', () => {
    expect(changeOf({ ...rule, weight: 'harm' }, row, undefined, 7, true)).toMatchObject({ weight: 'text', watched: false })
    expect(changeOf({ ...rule, weight: 'harm', added: true }, row, undefined, 7, true)).toMatchObject({ weight: 'text', watched: true })
    expect(changeOf({ ...rule, weight: 'harm', added: true }, row, undefined, 7, false)).toMatchObject({ weight: 'harm', watched: true })
  })
})

describe('a value of the drive’s own', () => {
  const amps = (value: number) => ({ value, unit: 'A' })

  it('brings its unit along, before the dictionary’s', () => {
    expect(changeOf({ ...own, unit: 'counts' }, extra, amps(1), amps(1.5), false)).toMatchObject({ unit: 'A', delta: 0.5, percent: 50 })
    expect(changeOf(own, extra, 1, 1.5, false)).toMatchObject({ unit: 'A', delta: 0.5, percent: 50 })
    expect(changeOf({ ...own, unit: undefined }, extra, 1, 2, false)).not.toHaveProperty('unit')
  })

  it('in another unit has neither a difference nor a unit', () => {
    for (const [before, after] of [[amps(1), { value: 1000, unit: 'mA' }], [1, amps(1)], [amps(1), 1]] as const) {
      const change = changeOf(own, extra, before, after, false)
      for (const key of ['unit', 'delta', 'percent', 'points']) expect(change).not.toHaveProperty(key)
    }
  })

  it('that came or went has the unit that stands beside it', () => {
    expect(changeOf({ ...own, unit: 'counts' }, extra, undefined, amps(3), false).unit).toBe('A')
    expect(changeOf({ ...own, unit: 'counts' }, extra, amps(3), undefined, false).unit).toBe('A')
    expect(changeOf({ ...own, unit: 'counts' }, extra, undefined, 3, false).unit).toBe('counts')
  })

  it('that is a word has no unit, whatever the dictionary says', () => {
    expect(changeOf(own, extra, 'slow', 'fast', false)).not.toHaveProperty('unit')
    expect(changeOf(own, extra, undefined, true, false)).not.toHaveProperty('unit')
    expect(changeOf(own, extra, 'slow', 3, false).unit).toBe('A')
  })

  it('in per cent has points, by the unit beside it or by the dictionary', () => {
    expect(changeOf(own, extra, { value: 10, unit: '%' }, { value: 15, unit: '%' }, false)).toMatchObject({ points: 5 })
    expect(changeOf({ ...own, unit: '%' }, extra, 10, 15, false)).toMatchObject({ points: 5 })
  })

  it('has a difference that leads from one value to the other, within the last digit of a double', () => {
    fc.assert(fc.property(ownNumber, ownNumber, (before, after) => {
      const { delta = Number.NaN } = changeOf(own, extra, before, after, false)
      expect(Math.abs(before + delta - after)).toBeLessThanOrEqual(Number.EPSILON * Math.max(Math.abs(before), Math.abs(after), Math.abs(delta)))
    }))
  })
})
