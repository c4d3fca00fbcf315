import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { about, anyValue, axisUnits, fieldWords, inWords, movesInWords, numbersInWords, plain, quantity, sentence } from '../../../../shared/checks/format'
import { canonicalNumber } from '../../../support/arbitrary-content'

describe('numbers in sentences', () => {
  it('prints the shortest decimals and a real minus sign', () => {
    expect([212.4, 0.000001, -0, -14.4, 1e9, -1e-7].map(plain)).toEqual(['212.4', '0.000001', '0', '−14.4', '1000000000', '−1e−7'])
  })

  it('prints nothing that would read back as another number', () => {
    fc.assert(fc.property(canonicalNumber(-1e9, 1e9), (value) => {
      expect(Number(plain(value).replaceAll('−', '-'))).toBe(value)
    }))
  })

  it('puts one space before every unit, the percent too', () => {
    expect([quantity(38, '%'), quantity(-2, 'mm'), quantity(7, '')]).toEqual(['38 %', '−2 mm', '7'])
  })

  it('cuts what was computed to four digits, or to as many as tell it from its bound', () => {
    expect(about(0.00494784176)).toBe('0.004948')
    expect(about(123456)).toBe('123500')
    expect(about(0.15001, 0.15)).toBe('0.15001')
    expect(about(0.15, 0.15)).toBe('0.15')
    expect(about(0.1500000000000001, 0.15)).not.toBe('0.15')
    expect([1234.5, 1235.5, -0.00012345].map(value => about(value))).toEqual(['1234', '1236', '−0.0001234'])
    expect([2500, 0.25, -3, 1e21].map(value => about(value))).toEqual(['2500', '0.25', '−3', '1e+21'])
  })

  it('prints texts in quotes and switches as on or off', () => {
    expect([anyValue('B', 'mm'), anyValue(true, ''), anyValue(3, 'counts')]).toEqual(['“B”', 'on', '3 counts'])
  })
})

describe('words', () => {
  it('lists with commas and one and', () => {
    expect([inWords([]), inWords(['a']), inWords(['a', 'b']), inWords(['a', 'b', 'c'])]).toEqual(['', 'a', 'a and b', 'a, b and c'])
  })

  it('makes runs of three neighbours or more', () => {
    expect(movesInWords([5])).toBe('move 5')
    expect(movesInWords([7, 5])).toBe('moves 5 and 7')
    expect(numbersInWords([5, 6])).toBe('5 and 6')
    expect(numbersInWords([12, 5, 7, 6, 20, 21])).toBe('5 to 7, 12, 20 and 21')
    expect(sentence(movesInWords([1, 2, 3]))).toBe('Moves 1 to 3')
  })

  it('names the units of an axis', () => {
    expect(axisUnits('linear')).toEqual({ length: 'mm', speed: 'mm/s', acceleration: 'mm/s²' })
    expect(axisUnits('rotary')).toEqual({ length: 'deg', speed: 'deg/s', acceleration: 'deg/s²' })
  })

  it('knows the words of every field that a site rule can name', () => {
    expect(fieldWords('thrustLimit', 'linear')).toEqual({ label: 'thrust limit', unit: '%' })
    expect(fieldWords('move.speed', 'rotary')).toEqual({ label: 'speed', unit: 'deg/s' })
    expect(fieldWords('zone.from', 'linear')).toEqual({ label: 'from', unit: 'mm' })
    expect(fieldWords('brakeFitted', 'linear')).toEqual({ label: 'brake fitted', unit: '' })
    for (const name of ['constructor', 'move.toString', 'moves.speed', 'thrust']) expect(fieldWords(name, 'linear')).toBeUndefined()
  })
})
