import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { toCanonical } from '../../../../shared/units/convert'
import { Exact } from '../../../../shared/units/exact'
import { roundToMillionths } from '../../../../shared/units/number'
import { findUnit, unitsFor } from '../../../../shared/units/units'

function convert(text: string, from: string, to: string) {
  const unit = findUnit(from, to)
  if (typeof unit === 'string') throw new Error(unit)
  return roundToMillionths(toCanonical(new Exact(text), unit))
}

describe('conversion, then one rounding', () => {
  it.each([
    ['7.5', 'in', 'mm', 190.5, false],
    ['0.00000002', 'in', 'mm', 0.000001, true], // 0.000000508
    ['0.5', 'rad', 'deg', 28.64789, true], // 28.6478897565…
    ['3.14159265358979323846', 'rad', 'deg', 180, true],
    ['1000', 'rpm', 'deg/s', 6000, false],
    ['0.0005', 'µm', 'mm', 0, true], // 0.0000005: a tie, to even
    ['0.0015', 'µm', 'mm', 0.000002, true], // 0.0000015: a tie, to even
    ['14', 'lb', 'kg', 6.350293, true], // 6.35029318
  ])('%s %s is %4$d %3$s', (text, from, to, value, rounded) => expect(convert(text, from, to)).toEqual({ value, rounded }))

  it('rounds once: rounding before conversion would give another number', () => {
    // 0.0000014 in rounded to millionths first is 0.000001 in = 0.0000254 mm; by the rule it is 0.00003556 mm.
    expect(convert('0.0000014', 'in', 'mm')).toEqual({ value: 0.000036, rounded: true })
  })

  it('is linear: the number in a unit of factor 10ⁿ is the number with its point moved', () => {
    fc.assert(fc.property(fc.integer({ min: -999_999, max: 999_999 }), (n) => {
      expect(convert(String(n), 'm', 'mm')).toEqual({ value: n * 1000, rounded: false })
      expect(convert(`${n}e-3`, 's', 'ms')).toEqual({ value: n, rounded: false })
    }))
  })

  it('keeps the order of values in one unit', () => {
    const units = unitsFor('N·m')
    fc.assert(fc.property(fc.integer(), fc.integer(), fc.constantFrom(...units), (a, b, unit) => {
      const [low, high] = [Math.min(a, b), Math.max(a, b)]
      return toCanonical(new Exact(low), unit).lte(toCanonical(new Exact(high), unit))
    }))
  })
})

describe('Exact', () => {
  it('rounds half-even and keeps its own settings apart from the library’s', () => {
    expect(new Exact('2.5').toDecimalPlaces(0).toString()).toBe('2')
    expect(new Exact('3.5').toDecimalPlaces(0).toString()).toBe('4')
    expect(Exact.precision).toBe(160)
  })

  it('adds and multiplies 40 digits without loss', () => {
    const nines = '9'.repeat(40)
    expect(new Exact(nines).times(nines).toFixed(0)).toBe(String(BigInt(nines) * BigInt(nines)))
  })
})
