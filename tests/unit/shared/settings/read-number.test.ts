import { describe, expect, it } from 'vitest'
import { readNumber, readOwnNumber, readWhole } from '../../../../shared/settings/read-number'
import { cellReadingOf, readingOf } from '../../../support/settings-reading'

describe('readNumber in the JSON form', () => {
  const read = (text: string, unit: string | undefined = 'mm') => {
    const { reading, node, told } = readingOf(text)
    return { value: readNumber(reading, node, '/a', unit), told: told(), rounded: reading.rounded, converted: reading.converted }
  }

  it.each([
    ['180', 180, 0], ['-0', 0, 0], ['1.5e2', 150, 0], ['1.0000005', 1, 1], ['1.00000050000000000000001', 1.000001, 1], ['0.10000000', 0.1, 0],
    ['1000000000', 1e9, 0], ['-1e9', -1e9, 0], ['1e-7', 0, 1],
  ])('%s is %d', (text, value, rounded) => expect(read(text)).toEqual({ value, told: [], rounded, converted: 0 }))

  it.each([
    ['1000000000.000001', 'number-range'], ['1e10', 'number-range'], ['1e41', 'number-range'], ['"12"', 'number-syntax'], ['true', 'number-syntax'], ['[1]', 'number-syntax'], ['{}', 'number-syntax'],
    [`1.${'0'.repeat(39)}`, 'number-digits'],
  ])('%s: %s', (text, code) => expect(read(text)).toMatchObject({ value: undefined, told: [`${code} /a`] }))

  it('does not mind an axis kind that is not known', () => expect(read('5', undefined)).toMatchObject({ value: 5, told: [] }))
})

describe('readNumber in the CSV form', () => {
  const read = (text: string, unit: string, canonical: string | undefined) => {
    const { reading, node, told } = cellReadingOf(text, unit)
    return { value: readNumber(reading, node, '/a', canonical), told: told(), rounded: reading.rounded, converted: reading.converted }
  }

  it.each([
    ['7.5', 'in', 'mm', 190.5, 0, 1], ['180', 'mm', 'mm', 180, 0, 0], ['180', '', 'mm', 180, 0, 0], ['1.0000005', 'mm', 'mm', 1, 1, 0], ['1', 'rad', 'deg', 57.29578, 1, 1],
    ['-0', 'in', 'mm', 0, 0, 1], ['5', 'mm/s2', 'mm/s²', 5, 0, 0], ['1e3', 'µm', 'mm', 1, 0, 1],
  ])('%s %s for %s is %d', (text, unit, canonical, value, rounded, converted) => {
    expect(read(text, unit, canonical)).toEqual({ value, told: [], rounded, converted })
  })

  it.each([
    ['180', 'kg', 'mm', 'unit-unfit'], ['180', 'mmm', 'mm', 'unit-unknown'], ['5', 'mm', '', 'unit-unfit'], ['5', 'xyz', '', 'unit-unknown'],
    ['ten', 'mm', 'mm', 'number-syntax'], ['', 'mm', 'mm', 'number-syntax'], ['1e9', 'm', 'mm', 'number-range'],
  ])('%s %s for %j: %s', (text, unit, canonical, code) => expect(read(text, unit, canonical)).toMatchObject({ value: undefined, told: [`${code} /a`] }))

  it('judges no unit where the axis kind is not known', () => expect(read('5', 'deg', undefined)).toMatchObject({ value: 5, told: [] }))

  it('lists the units that fit', () => {
    const { reading, node, message } = cellReadingOf('1', 'kg')
    readNumber(reading, node, '/a', 'mm')
    expect(message()).toBe('Unit "kg" does not fit this value: here fit mm, µm, cm, m, in.')
  })
})

describe('readOwnNumber', () => {
  it('keeps digits that a canonical number would lose', () => {
    const { reading, node, told } = readingOf('0.12345678901')
    expect(readOwnNumber(reading, node, '/a')).toBe(0.12345678901)
    expect(told()).toEqual([])
    expect(reading.rounded).toBe(0)
  })

  it.each([['9007199254740993', 'number-digits'], ['"1"', 'number-syntax'], ['1e99', 'number-range']])('%s: %s', (text, code) => {
    const { reading, node, told } = readingOf(text)
    expect(readOwnNumber(reading, node, '/a')).toBeUndefined()
    expect(told()).toEqual([`${code} /a`])
  })

  it('takes no unit', () => {
    const { reading, node, told } = cellReadingOf('5', 'mm')
    expect(readOwnNumber(reading, node, '/a')).toBeUndefined()
    expect(told()).toEqual(['unit-unfit /a'])
  })
})

describe('readWhole', () => {
  const read = (text: string) => {
    const { reading, node, told } = readingOf(text)
    return [readWhole(reading, node, '/a', 0, 1023, 'row-number'), ...told()]
  }

  it.each([['0', 0], ['1023', 1023], ['1e3', 1000], ['5.0', 5], ['-0', 0], ['10230e-1', 1023]])('%s is %d', (text, value) => expect(read(text)).toEqual([value]))
  it.each(['-1', '1024', '0.5', '"1"', 'true', '1e40', '0.99999999999999999999', '1e-40'])('%s is none', text => expect(read(text)).toEqual([undefined, 'row-number /a']))

  it.each([['7', 7], ['1e0', 1], ['07', undefined], [' 7', undefined], ['', undefined], ['7.5', undefined]])('the cell %j is %s', (text, value) => {
    const { reading, node } = cellReadingOf(text)
    expect(readWhole(reading, node, '/a', 0, 1023, 'row-number')).toBe(value)
  })
})
