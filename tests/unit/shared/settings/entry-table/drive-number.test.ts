import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { fromDrive, toDrive } from '../../../../../shared/settings/entry-table/drive-number'
import { toCanonical } from '../../../../../shared/units/convert'
import { Exact } from '../../../../../shared/units/exact'
import { findUnit, type Unit } from '../../../../../shared/units/units'

const entry = (part: object) => ({ field: 'target', ...part })

describe('the drive’s number for a value', () => {
  it.each([
    ['as it is', 12.5, {}, 'mm', '12.5'],
    ['in another unit', 12.7, { unit: 'in' }, 'mm', '0.5'],
    ['in counts of 0.01', 12.5, { factor: 0.01 }, 'mm', '1250'],
    ['in tenths of a metre', 250, { unit: 'm', factor: 0.1 }, 'mm', '2.5'],
    ['with its digits', 12.5, { digits: 3 }, 'mm', '12.500'],
    ['with no minus before nought', -0.001, { digits: 2 }, 'mm', '0.00'],
    // Ties: 0.25 lies between 0.2 and 0.3, and half-even takes the even one.
    ['half-even on the step', 0.25, { step: 0.1 }, 'mm', '0.2'],
    ['up on the step', 0.21, { step: 0.1, rounding: 'up' as const }, 'mm', '0.3'],
    ['down is towards nought', -0.29, { step: 0.1, rounding: 'down' as const }, 'mm', '-0.2'],
    ['step first, then digits', 253, { unit: 'm/s', step: 0.005, digits: 3, rounding: 'down' as const }, 'mm/s', '0.250'],
    ['a radian has no last digit', 180, { unit: 'rad' }, 'deg', '3.141592653589793'],
  ])('%s', (_, value, part, canonical, expected) => {
    expect(toDrive(value, entry(part), canonical)).toBe(expected)
  })
})

describe('what the drive wrote', () => {
  it.each([
    ['12.50', undefined, '12.50'], ['+0012.5', undefined, '12.5'], ['-007', undefined, '-7'], ['.5', undefined, '0.5'], ['000', undefined, '0'],
    ['1250', 0.01, '12.5'], ['-3', 0.001, '-0.003'], ['two', 0.01, 'two'], ['', 0.01, ''], ['1.2.3', undefined, '1.2.3'], ['1e3', 0.1, '100'],
  ])('%s by %s is %s', (text, factor, expected) => {
    expect(fromDrive(text, factor)).toBe(expected)
  })
})

describe('there and back', () => {
  const place = fc.integer({ min: -5_000_000, max: 5_000_000 }).map(n => n / 1000)

  it.each([
    ['as it is', {}, 'mm'], ['in thousandths', { factor: 0.001 }, 'mm'], ['in metres', { unit: 'm' }, 'mm'], ['in tenths of a centimetre', { unit: 'cm', factor: 0.1 }, 'mm'],
    ['on steps that every value stands on', { step: 0.001 }, 'mm'], ['with as many digits as there are', { digits: 3 }, 'mm'],
  ])('%s nothing is lost', (_what, part, canonical) => {
    fc.assert(fc.property(place, (value) => {
      const { unit, factor } = part as { unit?: string, factor?: number }
      const read = fromDrive(toDrive(value, entry(part), canonical), factor)
      const back = toCanonical(new Exact(read), findUnit(unit ?? canonical, canonical) as Unit).toNumber()
      expect(back).toBe(value + 0)
    }))
  })

  it('rounding down never goes away from nought, up never towards it, half-even never further than half a step', () => {
    fc.assert(fc.property(place, fc.constantFrom(0.01, 0.05, 0.25, 2), (value, step) => {
      const at = (rounding: 'half-even' | 'down' | 'up') => Number(toDrive(value, entry({ step, rounding }), 'mm'))
      expect(Math.abs(at('down'))).toBeLessThanOrEqual(Math.abs(value))
      expect(Math.abs(at('up'))).toBeGreaterThanOrEqual(Math.abs(value))
      expect(Math.abs(at('half-even') - value)).toBeLessThanOrEqual(step / 2 + 1e-9)
      expect([at('down'), at('up')]).toContain(at('half-even'))
    }))
  })

  it('ties go to the even step: 0.25 and 0.35 in tenths are 0.2 and 0.4, 2.5 and 3.5 are 2 and 4', () => {
    expect([0.25, 0.35, -0.25, -0.35].map(value => toDrive(value, entry({ step: 0.1 }), 'mm'))).toEqual(['0.2', '0.4', '-0.2', '-0.4'])
    expect([2.5, 3.5, 4.5].map(value => toDrive(value, entry({ digits: 0 }), 'mm'))).toEqual(['2', '4', '4'])
  })
})
