import { describe, expect, it } from 'vitest'
import { isUnused, moveFieldNames, moveFields, zoneFieldNames, zoneFields } from '../../../../shared/settings/move-fields'

describe('isUnused', () => {
  it.each([[0, 0, true], [0, 1, false], [1, 0, false], [0.000001, 0, false], [250, 2000, false]])('speed %d, acceleration %d: %s', (speed, acceleration, unused) => {
    expect(isUnused({ speed, acceleration })).toBe(unused)
  })
})

describe('the tables of rows', () => {
  it('need what every row has', () => {
    expect(moveFieldNames.filter(name => moveFields[name].needed)).toEqual(['kind', 'target', 'speed', 'acceleration'])
    expect(zoneFieldNames.filter(name => zoneFields[name].needed)).toEqual(['from', 'to'])
  })

  it('weigh what can hurt', () => {
    expect(moveFieldNames.filter(name => moveFields[name].weight === 'harm')).toEqual(['kind', 'forceLimit', 'approach', 'pressSpeed'])
    expect(moveFieldNames.filter(name => moveFields[name].weight === 'text')).toEqual(['label', 'comment'])
    expect(zoneFieldNames.every(name => zoneFields[name].weight === 'harm')).toBe(true)
  })
})
