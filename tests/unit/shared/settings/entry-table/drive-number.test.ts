import { describe, expect, it } from 'vitest'
import { fromDrive, toDrive } from '../../../../../shared/settings/entry-table/drive-number'

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
