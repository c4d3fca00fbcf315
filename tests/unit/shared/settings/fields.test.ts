import { describe, expect, it } from 'vitest'
import { setupField, setupFieldNames, setupFields, setupGroups } from '../../../../shared/settings/fields'
import { unitsFor } from '../../../../shared/units/units'

const of = (test: (name: (typeof setupFieldNames)[number]) => boolean) => setupFieldNames.filter(test)

describe('the table of setup fields', () => {
  it('has its groups in order', () => {
    expect([...new Set(setupFieldNames.map(name => setupFields[name].group))]).toEqual([...setupGroups])
  })

  it('has the units that the format page explains, each with a canonical unit that is read', () => {
    for (const name of setupFieldNames) {
      const field = setupField(name)
      if (field?.type !== 'number') continue
      for (const unit of [field.unit.linear, field.unit.rotary]) if (unit) expect(unitsFor(unit).length, name).toBeGreaterThan(0)
      expect([field.unit.linear, field.unit.rotary].some(unit => unit !== null)).toBe(true)
    }
  })

  it('has fields of one axis kind only where load and modulo are', () => {
    expect(of(name => setupField(name)?.type === 'number' && (setupField(name) as { unit: { rotary: string | null } }).unit.rotary === null)).toEqual(['payloadMass', 'frictionForce'])
    expect(of(name => setupField(name)?.type === 'number' && (setupField(name) as { unit: { linear: string | null } }).unit.linear === null)).toEqual(['modulo', 'payloadInertia', 'unbalanceTorque', 'frictionTorque'])
  })

  it('watches every field that can hurt', () => {
    expect(of(name => setupFields[name].weight === 'harm' && !setupFields[name].watched)).toEqual([])
    expect(of(name => setupFields[name].weight === 'motion' && setupFields[name].watched)).toEqual(['inPositionWindow', 'inPositionTime', 'positionGain', 'velocityGain', 'velocityIntegralTime', 'velocityFeedForward', 'inertiaRatio', 'notchFrequency'])
  })

  it('keeps what belongs to the place of the axis', () => {
    expect(of(name => setupFields[name].carry === 'place')).toEqual(['positiveDirection', 'softLimitMin', 'softLimitMax', 'mountingAngle', 'unbalanceTorque', 'inputSwitching', 'outputSwitching', 'selectInputs', 'nodeAddress'])
  })

  it('names a CiA 402 object by four hex digits and h', () => {
    for (const name of setupFieldNames) {
      const object = setupField(name)?.cia402
      if (object !== undefined) expect(object).toMatch(/^[0-9A-F]{4}h(, [0-9A-F]{4}h)*$/)
    }
  })
})

describe('setupField', () => {
  it('knows fields and nothing else', () => {
    expect(setupField('jogSpeed')?.label).toBe('jog speed')
    for (const name of ['', 'JogSpeed', 'constructor', 'toString', '__proto__']) expect(setupField(name)).toBeUndefined()
  })
})
