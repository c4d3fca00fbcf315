import { describe, expect, it } from 'vitest'
import { addressOf, rowKind, wordsOf } from '../../../../../shared/settings/entry-table/address'

describe('the place that a field names', () => {
  it.each([
    ['softLimitMin', { section: 'setup', row: '', field: 'softLimitMin', kind: { type: 'number', unit: 'mm' } }],
    ['nodeAddress', { section: 'setup', row: '', field: 'nodeAddress', kind: { type: 'own' } }],
    ['brakeFitted', { section: 'setup', row: '', field: 'brakeFitted', kind: { type: 'flag' } }],
    ['zone:2:from', { section: 'zone', row: '2', field: 'from', kind: { type: 'number', unit: 'mm' } }],
    ['move:14:forceLimit', { section: 'move', row: '14', field: 'forceLimit', kind: { type: 'number', unit: '%' } }],
    ['extra:K:1', { section: 'extra', row: '', field: 'K:1', kind: { type: 'extra' } }],
    ['unit:channel', { section: 'unit', row: '', field: 'channel', kind: { type: 'own' } }],
    ['file:exportedAt', { section: 'file', row: '', field: 'exportedAt', kind: { type: 'text' } }],
  ])('%s', (name, expected) => {
    expect(addressOf(name, 'linear')).toEqual(expected)
  })

  it.each(['', 'softlimitmin', 'modulo', 'toString', 'zone:2:zone', 'zone:02:from', 'move:1:colour', 'file:schema', 'unit:colour', 'extra:'])('%s is none of a linear axis', (name) => {
    expect(addressOf(name, 'linear')).toBeUndefined()
  })

  it('goes by the kind of axis', () => {
    expect(addressOf('modulo', 'rotary')?.kind).toEqual({ type: 'number', unit: 'deg' })
    expect(addressOf('positiveDirection', 'rotary')?.kind).toEqual({ type: 'choice', choices: ['clockwise', 'counterclockwise'] })
    expect(rowKind('move', 'speed', 'rotary')).toEqual({ type: 'number', unit: 'deg/s' })
  })

  it('has words only where it is a word', () => {
    expect(wordsOf({ type: 'flag' })).toEqual(['true', 'false'])
    expect(wordsOf({ type: 'own' })).toEqual([])
    expect(rowKind('move', 'kind', 'linear')).toEqual({ type: 'choice', choices: ['absolute', 'relative', 'press'] })
    expect(rowKind('move', 'next', 'linear')).toEqual({ type: 'own' })
    expect(rowKind('zone', 'label', 'linear')).toBeUndefined()
  })
})
