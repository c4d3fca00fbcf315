import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { diffContents } from '../../../../shared/diff/diff'
import { isValuePlace, ruleNameOf, unitAt, valueAt, type ValuePlace } from '../../../../shared/settings/value-place'
import { before } from '../../../support/axis-answers'
import { arbitraryPair } from '../../../support/arbitrary-content'

describe('a place of a value', () => {
  it('is a field of its section, with a row where the section has rows', () => {
    const places: ValuePlace[] = [{ section: 'setup', field: 'thrustLimit' }, { section: 'move', field: 'target', row: 0 }, { section: 'zone', field: 'to', row: 1 }, { section: 'extra', field: 'K-017' }]
    expect(places.map(isValuePlace)).toEqual([true, true, true, true])
    const wrong: ValuePlace[] = [{ section: 'setup', field: 'toString' }, { section: 'setup', field: 'thrustLimit', row: 1 }, { section: 'move', field: 'target' }, { section: 'zone', field: 'target', row: 0 }, { section: 'extra', field: '' }]
    expect(wrong.map(isValuePlace)).toEqual([false, false, false, false, false])
  })

  it('has a value by the number of its row, not by where that stands', () => {
    expect(valueAt(before, { section: 'setup', field: 'thrustLimit' })).toBe(38)
    expect(valueAt(before, { section: 'move', field: 'approach', row: 2 })).toBe(88)
    expect(valueAt(before, { section: 'move', field: 'approach', row: 1 })).toBeUndefined()
    expect(valueAt(before, { section: 'move', field: 'target', row: 99 })).toBeUndefined()
    expect(valueAt(before, { section: 'zone', field: 'to', row: 1 })).toBe(106)
    expect([valueAt(before, { section: 'extra', field: 'K-017' }), valueAt(before, { section: 'extra', field: 'toString' })]).toEqual([4, undefined])
  })

  it('has a unit by the kind of axis, and a name that site rules know', () => {
    const speed: ValuePlace = { section: 'move', field: 'speed', row: 3 }
    expect([unitAt(speed, 'linear'), unitAt(speed, 'rotary'), ruleNameOf(speed)]).toEqual(['mm/s', 'deg/s', 'move.speed'])
    expect([unitAt({ section: 'setup', field: 'thrustLimit' }, 'linear'), unitAt({ section: 'setup', field: 'homingMethod' }, 'linear')]).toEqual(['%', ''])
    expect([ruleNameOf({ section: 'extra', field: 'K-017' }), ruleNameOf({ section: 'setup', field: 'jogSpeed' })]).toEqual(['extra:K-017', 'jogSpeed'])
  })

  it('law: where a difference tells of a value, the two contents hold its before and its after', () => {
    fc.assert(fc.property(arbitraryPair(), ([one, other]) => {
      const amount = (value: unknown) => typeof value === 'object' && value !== null && 'value' in value ? value.value : value
      for (const { section, field, row, before: was, after: is } of diffContents(one, other)) {
        if (section === 'file') continue
        const place = { section, field, ...(row !== undefined && { row }) }
        expect([amount(valueAt(one, place)), amount(valueAt(other, place))]).toEqual([amount(was), amount(is)])
      }
    }))
  })
})
