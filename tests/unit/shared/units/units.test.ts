import { all, create } from 'mathjs'
import { describe, expect, it } from 'vitest'
import { setupFieldNames, setupFields } from '../../../../shared/settings/fields'
import { toCanonical } from '../../../../shared/units/convert'
import { Exact } from '../../../../shared/units/exact'
import { findUnit, pi, spellUnit, unitNames, unitsFor } from '../../../../shared/units/units'

const math = create(all ?? {})

/** One of a unit in the canonical one. */
function one(name: string, canonical: string): Exact {
  const unit = findUnit(name, canonical)
  if (typeof unit === 'string') throw new Error(`${name} ${unit} for ${canonical}`)
  return toCanonical(new Exact(1), unit)
}

describe('factors', () => {
  /*
   * NIST SP 811 (2008), Appendix B.8 and B.9, as transcribed in the public R package NISTunits; the printed seven digits, and
   * the exact value of the definition (inch, pound, standard gravity) where it is longer.
   */
  it.each([
    ['in', 'mm', '25.4'], ['in/s', 'mm/s', '25.4'], ['in/s²', 'mm/s²', '25.4'], ['g', 'mm/s²', '9806.65'],
    ['lb', 'kg', '0.45359237'], ['lbf', 'N', '4.4482216152605'], ['kgf', 'N', '9.80665'],
    ['lbf·in', 'N·m', '0.1129848290276167'], ['lbf·ft', 'N·m', '1.3558179483314004'], ['kgf·cm', 'N·m', '0.0980665'],
  ])('1 %s is %s %s', (unit, canonical, factor) => expect(one(unit, canonical).toString()).toBe(factor))

  it.each([
    ['lb', 'kg', '4.535924E-1'], ['lbf', 'N', '4.448222'], ['lbf·in', 'N·m', '1.129848E-1'], ['lbf·ft', 'N·m', '1.355818'],
    ['rad', 'deg', '57.29578'], ['rad/s', 'deg/s', '57.29578'],
  ])('1 %s is %3$s %2$s to seven digits', (unit, canonical, printed) => {
    expect(one(unit, canonical).toSignificantDigits(7).eq(printed)).toBe(true)
  })

  it('multiply where torques are made of force and length', () => {
    const pound = new Exact('0.45359237').times('9.80665')
    expect(one('lbf', 'N').eq(pound)).toBe(true)
    expect(one('lbf·in', 'N·m').eq(pound.times('0.0254'))).toBe(true)
    expect(one('lbf·ft', 'N·m').eq(pound.times('0.3048'))).toBe(true)
  })

  it.each([
    ['µm', 'mm', '0.001'], ['cm', 'mm', '10'], ['m', 'mm', '1000'], ['m/s', 'mm/s', '1000'], ['m/s²', 'mm/s²', '1000'],
    ['rev', 'deg', '360'], ['rpm', 'deg/s', '6'], ['kN', 'N', '1000'], ['g', 'kg', '0.001'], ['‰', '%', '0.1'],
    ['µs', 'ms', '0.001'], ['s', 'ms', '1000'], ['kHz', 'Hz', '1000'],
    ['kg·m²', 'kg·cm²', '10000'], ['kg·mm²', 'kg·cm²', '0.01'], ['g·cm²', 'kg·cm²', '0.001'],
  ])('1 %s is %3$s %2$s by the metric prefixes', (unit, canonical, factor) => expect(one(unit, canonical).toString()).toBe(factor))

  // A second opinion, in binary floating point: mathjs 15 agrees with the exact definitions to 1e-10 or better.
  it.each([
    ['in', 'mm', 'in', 'mm'], ['m', 'mm', 'm', 'mm'], ['µm', 'mm', 'um', 'mm'], ['in/s', 'mm/s', 'in/s', 'mm/s'], ['g', 'mm/s²', '9.80665 m/s^2', 'mm/s^2'],
    ['rad', 'deg', 'rad', 'deg'], ['rpm', 'deg/s', 'cycle/min', 'deg/s'], ['rad/s', 'deg/s', 'rad/s', 'deg/s'], ['rad/s²', 'deg/s²', 'rad/s^2', 'deg/s^2'],
    ['lbf', 'N', 'lbf', 'N'], ['kgf', 'N', 'kgf', 'N'], ['kgf·cm', 'N·m', 'kgf cm', 'N m'], ['lbf·in', 'N·m', 'lbf in', 'N m'], ['lbf·ft', 'N·m', 'lbf ft', 'N m'],
    ['lb', 'kg', 'lb', 'kg'], ['g', 'kg', 'gram', 'kg'], ['kg·m²', 'kg·cm²', 'kg m^2', 'kg cm^2'], ['s', 'ms', 's', 'ms'],
  ])('1 %s agrees with mathjs', (unit, canonical, theirs, into) => {
    const expected = math.unit(/^\d/.test(theirs) ? theirs : `1 ${theirs}`).toNumber(into)
    expect(one(unit, canonical).toNumber() / expected).toBeCloseTo(1, 10)
  })

  it('use π to 50 digits after the point, the last one rounded', () => {
    expect(pi).toMatch(/^3\.\d{50}$/)
    expect(Number(pi)).toBe(Math.PI)
    // The tangent series of Machin (1706), 16 arctan(1/5) - 4 arctan(1/239), with whole numbers of 60 digits.
    const unit = 10n ** 60n
    const arctan = (inverse: bigint) => {
      let sum = 0n
      let power = unit / inverse
      for (let n = 1n; power !== 0n; n += 2n) {
        sum += (n % 4n === 1n ? 1n : -1n) * (power / n)
        power /= inverse * inverse
      }
      return sum
    }
    const scaled = 16n * arctan(5n) - 4n * arctan(239n)
    const rounded = String((scaled + 5n * 10n ** 9n) / 10n ** 10n)
    expect(`${rounded.slice(0, 1)}.${rounded.slice(1)}`).toBe(pi)
  })
})

describe('toCanonical', () => {
  it('loses nothing: a number of 40 digits times the longest factor', () => {
    const value = new Exact('1234567890.123456789012345678901234567891')
    const factor = BigInt('13558179483314004')
    const product = BigInt('1234567890123456789012345678901234567891') * factor
    expect(toCanonical(value, findUnit('lbf·ft', 'N·m') as ReturnType<typeof unitsFor>[number]).eq(new Exact(`${product}e-46`))).toBe(true)
  })
})

describe('findUnit', () => {
  it('takes the canonical unit of every setup field', () => {
    for (const name of setupFieldNames) {
      const field = setupFields[name]
      if (field.type !== 'number') continue
      for (const unit of [field.unit.linear, field.unit.rotary]) {
        if (unit === null || unit === '') continue
        const found = findUnit(unit, unit)
        expect(typeof found === 'string' ? found : found.name).toBe(unit)
        expect(unitsFor(unit)[0]?.times.eq(1)).toBe(true)
      }
    }
  })

  it('tells g by what it stands beside', () => {
    expect(one('g', 'mm/s²').toString()).toBe('9806.65')
    expect(one('g', 'kg').toString()).toBe('0.001')
    expect(findUnit('g', 'mm')).toBe('unit-unfit')
  })

  it.each([['kg', 'mm'], ['mm', 'deg'], ['deg', 'mm'], ['N', 'N·m'], ['mm', ''], ['rpm', 'mm/s']])('%s does not fit %j', (unit, canonical) => {
    expect(findUnit(unit, canonical)).toBe('unit-unfit')
  })

  it.each(['furlong', 'MM', 'Mm', 'inch', '', 'mm/min', 'constructor', 'mm²'])('%j is not read', unit => expect(findUnit(unit, 'mm')).toBe('unit-unknown'))

  it('names each unit once', () => {
    expect(new Set(unitNames()).size).toBe(unitNames().length)
    expect(unitNames()).toContain('kg·cm²')
  })
})

describe('spellUnit', () => {
  it.each([
    ['mm/s^2', 'mm/s²'], ['mm/s2', 'mm/s²'], ['mm/s3', 'mm/s³'], ['deg/s^3', 'deg/s³'], ['Nm', 'N·m'], ['N*m', 'N·m'], ['N.m', 'N·m'], ['N\u22c5m', 'N·m'],
    ['\u03bcm', '\u00b5m'], ['um', 'µm'], ['kg*cm^2', 'kg·cm²'], ['kg.m2', 'kg·m²'], ['lbf*in', 'lbf·in'], [' mm ', 'mm'], ['°', 'deg'],
  ])('%s is %s', (sent, spelt) => expect(spellUnit(sent)).toBe(spelt))

  it('leaves the one spelling as it is', () => {
    for (const name of unitNames()) expect(spellUnit(name)).toBe(name)
  })
})
