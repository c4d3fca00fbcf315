import { describe, expect, it } from 'vitest'
import { isSameUnit, serialKey } from '../../../../shared/settings/identity'

describe('serialKey', () => {
  it.each([['HL40-2231-0087', 'hl40-2231-0087'], ['hl40/a_b.c', 'hl40/a_b.c'], ['IIII', 'iiii']])('of %s is %s', (serial, key) => expect(serialKey(serial)).toBe(key))

  it('is its own key', () => {
    for (const serial of ['A1', 'a1', 'Z-9_/x.']) expect(serialKey(serialKey(serial))).toBe(serialKey(serial))
  })
})

describe('isSameUnit', () => {
  const unit = { serial: 'HL40-0087', model: 'HL40-200V' }

  it('goes by serial without case, whatever the model and firmware say', () => {
    expect(isSameUnit(unit, { serial: 'hl40-0087', model: 'HL40-200', firmware: '2' })).toBe(true)
    expect(isSameUnit(unit, { ...unit, serial: 'HL40-0088' })).toBe(false)
  })

  it('tells the axes of one drive apart', () => {
    expect(isSameUnit({ ...unit, channel: 1 }, { ...unit, channel: 1 })).toBe(true)
    expect(isSameUnit({ ...unit, channel: 1 }, { ...unit, channel: 2 })).toBe(false)
    expect(isSameUnit({ ...unit, channel: 1 }, unit)).toBe(false)
  })
})
