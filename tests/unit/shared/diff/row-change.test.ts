import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { changeOf } from '../../../../shared/diff/change'
import { rowChange } from '../../../../shared/diff/row-change'
import type { FieldRule } from '../../../../shared/diff/rules'
import { canonicalNumber } from '../../../support/arbitrary-content'

const rule: FieldRule = { field: 'target', unit: 'mm', weight: 'motion', watched: true, added: false, driveOwn: false, fromValue: false }

describe('a change in a row', () => {
  const value = fc.oneof(fc.constant(undefined), fc.constant(0), fc.constant('press'), fc.constant('Over lid'), canonicalNumber(-1e9, 1e9))
  const unit = fc.constantFrom('mm', '%', undefined)

  it('is what the general record says of it, key for key in the same order, whatever came, went or changed', () => {
    fc.assert(fc.property(value, value, unit, fc.boolean(), fc.boolean(), (before, after, measure, sameMotion, added) => {
      const own = { ...rule, unit: measure, added }
      const change = rowChange(own, '/moves/3/target', 'move', 5, before, after, sameMotion)
      const general = changeOf(own, { at: '/moves/3/target', section: 'move', row: 5 }, before, after, sameMotion)
      expect(change).toStrictEqual(general)
      expect(Object.keys(change)).toEqual(Object.keys(general))
    }), { numRuns: 1000 })
  })

  it('of a zone names the zone', () => {
    expect(rowChange(rule, '/zones/0/from', 'zone', 2, 10, 12.5, false)).toMatchObject({ section: 'zone', row: 2, delta: 2.5, percent: 25 })
  })
})
