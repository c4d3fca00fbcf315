import { describe, expect, it } from 'vitest'
import { type SetupField, setupFieldNames, setupFields } from '../../../../shared/settings/fields'
import { readSetup } from '../../../../shared/settings/read-setup'
import { sortedSetupNames } from '../../../../shared/settings/sorted-keys'
import type { AxisKind } from '../../../../shared/settings/types'
import { objectReadingOf } from '../../../support/settings-reading'

function read(setup: unknown, axisKind: AxisKind | undefined = 'linear') {
  const { reading, object, told } = objectReadingOf(typeof setup === 'string' ? setup : JSON.stringify(setup))
  return { setup: readSetup(reading, object, axisKind), told: told() }
}

/** A value that the field takes, by the table. */
function goodValue(field: SetupField, kind: AxisKind): unknown {
  if (field.type === 'flag') return true
  if (field.type === 'choice') return field.choices[kind][0]
  return field.max === undefined ? 5 : Math.min(field.max, 5)
}

describe('every field of the table', () => {
  for (const kind of ['linear', 'rotary'] as const) {
    it(`is read on a ${kind} axis, or refused where it is not for it`, () => {
      for (const name of setupFieldNames) {
        const field: SetupField = setupFields[name]
        const value = goodValue(field, kind)
        const fits = field.type !== 'number' || field.unit[kind] !== null
        expect(read({ [name]: value }, kind), name).toEqual(fits ? { setup: { [name]: value }, told: [] } : { setup: {}, told: [`not-allowed-here /setup/${name}`] })
      }
    })
  }

  it('refuses a value of another type', () => {
    for (const name of setupFieldNames) {
      const field: SetupField = setupFields[name]
      if (field.type === 'number' && field.unit.linear === null) continue
      const code = field.type === 'number' ? field.whole ? 'number-range' : 'number-syntax' : 'enum'
      expect(read({ [name]: [1] }).told, name).toEqual([`${code} /setup/${name}`])
    }
  })

  it('has its bounds', () => {
    for (const name of setupFieldNames) {
      const field: SetupField = setupFields[name]
      if (field.type !== 'number') continue
      const kind = field.unit.linear === null ? 'rotary' : 'linear'
      const step = field.whole ? 1 : 0.000001
      const told = (value: number) => read({ [name]: value }, kind).told
      if (field.min !== undefined) {
        expect(told(field.min), name).toEqual([])
        expect(told(field.min - step), name).toEqual([`number-range /setup/${name}`])
      }
      if (field.max !== undefined) {
        expect(told(field.max), name).toEqual([])
        expect(told(field.max + step), name).toEqual([`number-range /setup/${name}`])
      }
      if (field.above !== undefined) {
        expect(told(field.above), name).toEqual([`number-range /setup/${name}`])
        expect(told(field.above + step), name).toEqual([])
      }
    }
  })
})

describe('readSetup', () => {
  it('is empty for nothing', () => expect(read({})).toEqual({ setup: {}, told: [] }))

  it('writes its keys in canonical order', () => {
    const { setup } = read({ speedLimit: 400, brakeFitted: true, jogSpeed: 50 })
    expect(Object.keys(setup)).toEqual(['brakeFitted', 'jogSpeed', 'speedLimit'])
    expect([...sortedSetupNames]).toEqual([...setupFieldNames].sort())
  })

  it('judges ranges on the rounded value', () => {
    expect(read('{ "speedLimit": -0.0000004 }')).toEqual({ setup: { speedLimit: 0 }, told: [] })
    expect(read('{ "mountingAngle": 90.0000004 }')).toEqual({ setup: { mountingAngle: 90 }, told: [] })
    expect(read('{ "mountingAngle": 90.0000006 }').told).toEqual(['number-range /setup/mountingAngle'])
    expect(read('{ "modulo": 0.0000004 }', 'rotary').told).toEqual(['number-range /setup/modulo'])
  })

  it('keeps velocity gain digit for digit, beyond the range of other numbers', () => {
    expect(read('{ "velocityGain": 4294967295.125 }').setup).toEqual({ velocityGain: 4294967295.125 })
    expect(read('{ "velocityGain": 1e-12 }').setup).toEqual({ velocityGain: 1e-12 })
  })

  it('tells directions by the axis kind', () => {
    expect(read({ positiveDirection: 'extend' }, 'linear').told).toEqual([])
    expect(read({ positiveDirection: 'extend' }, 'rotary').told).toEqual(['enum /setup/positiveDirection'])
  })

  it('judges neither fields nor directions by an axis kind that is not known', () => {
    const { reading, object, told } = objectReadingOf('{ "positiveDirection": "clockwise", "modulo": 360, "payloadMass": 2 }')
    expect(readSetup(reading, object, undefined)).toEqual({ positiveDirection: 'clockwise', modulo: 360, payloadMass: 2 })
    expect(told()).toEqual([])
  })

  it('leaves crossed soft limits for a rule to judge', () => expect(read({ softLimitMin: 10, softLimitMax: 0 }).told).toEqual([]))
})
