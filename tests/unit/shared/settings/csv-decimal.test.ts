import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { bothReadings, proves, surveyDecimals, withPoint } from '../../../../shared/settings/csv-decimal'

describe('proves', () => {
  it.each(['0.5', '.5', '5.', '1.50', '1.5000', '0.500', '01.500', '1234.567', '1.500.00', '1.5e3', '-12.5', '1.50.000'])('%s proves a point', cell => expect(proves(cell)).toEqual({ point: true, comma: false }))
  it.each(['0,5', ',5', '1,50', '0,500', '1234,567', '-12,5', '1,5e3'])('%s proves a comma', cell => expect(proves(cell)).toEqual({ point: false, comma: true }))
  it.each(['1.500', '12.500', '123.456.789', '-1.500', '+1.500', '1,500', '-123,456', '12', '', 'n.a.', 'ten,five', '1 500,5', '2026-11-30'])('%s proves nothing', cell => expect(proves(cell)).toEqual({ point: false, comma: false }))
  it.each(['1.234,5', '1,234.5'])('%s proves both', cell => expect(proves(cell)).toEqual({ point: true, comma: true }))
})

describe('surveyDecimals', () => {
  it.each([
    [['0', '180'], 'unsaid'], [[], 'unsaid'], [['1.500', '2.250'], 'unsaid'], [['1,500', '1.500'], 'unsaid'],
    [['1.500', '0.5'], 'point'], [['1.500', '0,5'], 'comma'], [['0.5', '0,5'], 'mixed'], [['1.234,5'], 'mixed'],
  ])('of %j is %s', (cells, survey) => expect(surveyDecimals(cells)).toBe(survey))

  it('does not hang on the order of cells', () => {
    const cell = fc.constantFrom('1', '1.500', '1,500', '0.5', '0,5', '12')
    fc.assert(fc.property(fc.array(cell, { maxLength: 8 }), cells => surveyDecimals([...cells].reverse()) === surveyDecimals(cells)))
  })
})

describe('withPoint', () => {
  it.each([
    ['1.5', 'point', '1.5'], ['1,5', 'point', undefined], ['1,5', 'comma', '1.5'], ['1.500', 'comma', undefined], ['1.234,5', 'comma', undefined],
    ['180', 'comma', '180'], ['180', undefined, '180'], ['1.5', undefined, undefined], ['1,5', undefined, undefined], ['-0,25', 'comma', '-0.25'], ['1,2,3', 'comma', '1.2.3'],
  ] as const)('%s under %s is %s', (cell, sign, text) => expect(withPoint(cell, sign)).toBe(text))

  it('gives the same number back for every number written with a comma', () => {
    fc.assert(fc.property(fc.integer({ min: -1e9, max: 1e9 }), (n) => {
      const text = String(n / 1000)
      return withPoint(text.replace('.', ','), 'comma') === text
    }))
  })
})

describe('bothReadings', () => {
  it.each([['1.500', '1.500', '1500'], ['1,5', '1.5', '15'], ['-2.350', '-2.350', '-2350'], ['1.234,5', '1234.5', '12345'], ['1,234,567', '1234.567', '1234567']])('of %s', (cell, one, other) => {
    expect(bothReadings(cell)).toEqual([one, other])
  })
})
