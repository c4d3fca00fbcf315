import { describe, expect, it } from 'vitest'
import { harmValues } from '../../../../../shared/checks/live/sister-fields'
import type { Content } from '../../../../../shared/settings/types'
import { absolute, linear, press, rotary, unused } from '../../../../support/check-input'

const keys = (content: Content, ...rest: [Parameters<typeof harmValues>[1]?, Parameters<typeof harmValues>[2]?]) =>
  harmValues(content, rest[0] ?? [], rest[1]).map(({ key }) => key)

describe('harmValues', () => {
  it('takes setup fields that weigh harm, and leaves out those of the place', () => {
    expect(keys(linear({ thrustLimit: 38, speedLimit: 400, softLimitMin: 0, mountingAngle: 90, nodeAddress: 5, selectInputs: 3, jerk: 1, inPositionWindow: 0.1, frictionForce: 5 })))
      .toEqual(['speedLimit', 'thrustLimit'])
  })

  it('leaves the home offset out where it is taught, and takes it where it is only proved', () => {
    expect(keys(linear({ homeOffset: 1, homingMethod: 'absolute-encoder' }))).toEqual(['homingMethod'])
    expect(keys(linear({ homeOffset: 1, homingMethod: 'hard-stop' }))).toEqual(['homeOffset', 'homingMethod'])
    expect(keys(linear({ homeOffset: 1 }))).toEqual([])
  })

  it('takes of a move what weighs harm, and all but its words on a flagged axis', () => {
    const content = linear({}, [press(2, 100, 150, { label: 'Seat' }), unused(9)])
    expect(keys(content)).toEqual(['move 2 kind', 'move 2 forceLimit', 'move 2 approach', 'move 2 pressSpeed'])
    expect(keys(content, ['collision'])).toEqual([
      'move 2 kind', 'move 2 target', 'move 2 speed', 'move 2 acceleration', 'move 2 forceLimit', 'move 2 approach', 'move 2 pressSpeed',
    ])
  })

  it('tells value and unit, and where they stand', () => {
    const content = rotary({ thrustLimit: 38, onEnableLoss: 'release', brakeFitted: false }, [absolute(4, 90, { forceLimit: 50 })], { zones: [{ zone: 3, from: 5, to: 20 }] })
    expect(harmValues(content, [])).toEqual([
      { key: 'thrustLimit', words: 'thrust limit', at: '/setup/thrustLimit', value: 38, text: '38 %' },
      { key: 'onEnableLoss', words: 'on enable loss', at: '/setup/onEnableLoss', value: 'release', text: 'release' },
      { key: 'brakeFitted', words: 'brake fitted', at: '/setup/brakeFitted', value: false, text: 'off' },
      { key: 'zone 3 from', words: 'zone 3 from', at: '/zones/0/from', value: 5, text: '5 deg', rowKey: 'zone 3 from' },
      { key: 'zone 3 to', words: 'zone 3 to', at: '/zones/0/to', value: 20, text: '20 deg', rowKey: 'zone 3 from' },
      { key: 'move 4 kind', words: 'move 4 kind', at: '/moves/0/kind', value: 'absolute', text: 'absolute', rowKey: 'move 4 kind' },
      { key: 'move 4 forceLimit', words: 'move 4 force', at: '/moves/0/forceLimit', value: 50, text: '50 %', rowKey: 'move 4 kind' },
    ])
  })

  it('takes a drive’s own key only where the dictionary gives it harm, and neither place nor taught', () => {
    const extra = { 'K-017': 15, 'K-020': { value: 3, unit: 'A' }, 'K-021': 1, 'K-022': 1, 'K-023': 1, 'constructor': 5 }
    const content = linear({}, [], { extra })
    expect(keys(content)).toEqual([])
    expect(harmValues(content, [], {
      'K-017': { weight: 'harm', name: 'filter step' }, 'K-020': { weight: 'harm' }, 'K-021': { weight: 'harm', carry: 'place' },
      'K-022': { weight: 'harm', carry: 'teach' }, 'K-023': { weight: 'harm', reading: true },
    })).toEqual([
      { key: 'extra K-017', words: 'K-017 (filter step)', at: '/extra/K-017', value: 15, text: '15' },
      { key: 'extra K-020', words: 'K-020', at: '/extra/K-020', value: { value: 3, unit: 'A' }, text: '3 A' },
    ])
  })
})
