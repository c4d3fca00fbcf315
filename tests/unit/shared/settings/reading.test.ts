import { describe, expect, it } from 'vitest'
import { isNotSet, keyTable, reportDuplicate, sortIntoSlots, step } from '../../../../shared/settings/reading'
import { objectReadingOf, readingOf } from '../../../support/settings-reading'

const table = keyTable(['from', 'to', 'zone'])

describe('sortIntoSlots', () => {
  it('puts each value at the place of its key, whatever the order in the file', () => {
    const { reading, object } = objectReadingOf('{ "zone": 3, "from": 1 }')
    const slots = sortIntoSlots(reading, object, table, '/zones/0')
    expect(slots.map(node => node?.kind)).toEqual(['number', undefined, 'number'])
    expect(slots.map(node => node?.kind === 'number' ? node.value : undefined)).toEqual([1, undefined, 3])
  })

  it('reports unknown keys with the nearest known one', () => {
    const { reading, object, told, message } = objectReadingOf('{ "Zone": 3, "colour": 1 }')
    sortIntoSlots(reading, object, table, '/zones/0')
    expect(told()).toEqual(['key-unknown /zones/0/Zone', 'key-unknown /zones/0/colour'])
    expect(message()).toBe('"Zone" is no key of this place: zone is probably meant.')
  })

  it('reports a key given twice and keeps the first, also where that is null', () => {
    const { reading, object, told } = objectReadingOf('{ "from": null, "from": 2, "to": 5, "to": 6 }')
    const slots = sortIntoSlots(reading, object, table, '/a')
    expect(told()).toEqual(['key-duplicate /a/from', 'key-duplicate /a/to'])
    expect(slots[0]).toBeUndefined()
    expect(slots[1]).toMatchObject({ value: 5 })
  })

  it('takes null and the empty text for not set', () => {
    const { reading, object, told } = objectReadingOf('{ "from": null, "to": "", "zone": " " }')
    expect(sortIntoSlots(reading, object, table, '').map(node => node?.kind)).toEqual([undefined, undefined, 'text'])
    expect(told()).toEqual([])
  })

  it('does not take the names of every object for keys', () => {
    const { reading, object, told } = objectReadingOf('{ "constructor": 1, "toString": 2, "__proto__": 3 }')
    sortIntoSlots(reading, object, table, '')
    expect(told()).toEqual(['key-unknown /constructor', 'key-unknown /toString', 'key-unknown /__proto__'])
  })

  it('writes the pointer of a key by RFC 6901', () => {
    const { reading, object, told } = objectReadingOf('{ "a/b~c": 1 }')
    sortIntoSlots(reading, object, table, '/setup')
    expect(told()).toEqual(['key-unknown /setup/a~1b~0c'])
  })
})

describe('step', () => {
  // RFC 6901, sections 3 and 5.
  it.each([['a/b', '/a~1b'], ['m~n', '/m~0n'], ['', '/'], ['~1', '/~01'], [' ', '/ '], ['c%d', '/c%d']])('of %j is %s', (key, pointer) => expect(step(key)).toBe(pointer))
})

describe('isNotSet', () => {
  it.each([['null', true], ['""', true], ['" "', false], ['0', false], ['false', false], ['{}', false], ['[]', false]])('of %s is %s', (text, notSet) => {
    expect(isNotSet(readingOf(text).node)).toBe(notSet)
  })
})

describe('reportDuplicate', () => {
  it('names the key', () => {
    const { reading, object, told, message } = objectReadingOf('{ "K": 1, "K": 2 }')
    reportDuplicate(reading, object, 1, '/extra')
    expect(told()).toEqual(['key-duplicate /extra/K'])
    expect(message()).toBe('"K" is given twice; leave one.')
  })
})
