import { describe, expect, it } from 'vitest'
import { placesOf } from '../../../../shared/checks/site-places'
import { absolute, linear, press, rotary, unused } from '../../../support/check-input'

const content = linear({ jogSpeed: 50, pressSpeed: 12 }, [absolute(3, 10), press(4, 1, 2, { pressSpeed: undefined }), unused(5)],
  { zones: [{ zone: 2, from: 1, to: 2 }], extra: { 'Ramp': { value: 3, unit: 'counts' }, 'a/b': true } })

describe('placesOf', () => {
  it('finds setup values, rows in use, zones and extra keys', () => {
    expect(placesOf(content, 'jogSpeed')).toEqual([{ at: '/setup/jogSpeed', words: 'jog speed', value: 50 }])
    expect(placesOf(content, 'move.target')).toEqual([
      { at: '/moves/0/target', words: 'move 3 target', value: 10, row: { move: 3 } },
      { at: '/moves/1/target', words: 'move 4 target', value: 2, row: { move: 4 } },
    ])
    expect(placesOf(content, 'zone.to')).toEqual([{ at: '/zones/0/to', words: 'zone 2 to', value: 2, row: { zone: 2 } }])
    expect(placesOf(content, 'extra:Ramp')).toEqual([{ at: '/extra/Ramp', words: 'Ramp', value: 3, unit: 'counts' }])
    expect(placesOf(content, 'extra:a/b')).toEqual([{ at: '/extra/a~1b', words: 'a/b', value: true }])
  })

  it('takes what the drive takes: acceleration for deceleration, the press speed of the setup', () => {
    expect(placesOf(content, 'move.deceleration')?.map(({ at, value }) => [at, value])).toEqual([['/moves/0/acceleration', 2000], ['/moves/1/acceleration', 2000]])
    expect(placesOf(content, 'move.pressSpeed')).toEqual([{ at: '/setup/pressSpeed', words: 'move 4 press speed', value: 12, row: { move: 4 } }])
    expect(placesOf(linear({}, content.moves), 'move.pressSpeed')).toEqual([])
  })

  it('has none for a field of the other axis kind, and does not know absent values and names', () => {
    expect(placesOf(content, 'modulo')).toEqual([])
    expect(placesOf(rotary(), 'modulo')).toBeUndefined()
    for (const field of ['homeOffset', 'extra:none', 'extra:toString', 'move.none', 'none']) expect(placesOf(content, field)).toBeUndefined()
  })
})
