import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { families, familyNames, fieldsNamed } from '../../../../shared/settings/families'
import { setupFieldNames, setupFields } from '../../../../shared/settings/fields'
import { moveFieldNames, zoneFieldNames } from '../../../../shared/settings/move-fields'
import { isValuePlace, ruleNameOf } from '../../../../shared/settings/value-place'

const rowed = (section: string) => (section === 'move' || section === 'zone' ? { row: 1 } : {})

describe('families', () => {
  it.each(familyNames)('%s has members that the format knows, each once', (name) => {
    const members = fieldsNamed(name)
    expect(members.length).toBeGreaterThan(1)
    expect(members.map(ruleNameOf)).toEqual([...families[name].members])
    expect(members.filter(member => !isValuePlace({ ...member, ...rowed(member.section) }))).toEqual([])
    expect(new Set(families[name].members).size).toBe(members.length)
  })

  it('no family bears the name of a field', () => {
    const fields = new Set<string>([...setupFieldNames, ...moveFieldNames, ...zoneFieldNames])
    expect(familyNames.filter(name => fields.has(name))).toEqual([])
  })

  it('every percentage of the unit’s force that bounds it is a force limit, and every force limit a limit', () => {
    const force = setupFieldNames.filter((name) => {
      const field = setupFields[name]
      return field.type === 'number' && field.unit.linear === '%' && (field.group === 'force' || field.group === 'homing')
    })
    expect(families['force-limits'].members).toEqual(expect.arrayContaining([...force, 'move.forceLimit']))
    expect(families.limits.members).toEqual(expect.arrayContaining([...families['force-limits'].members]))
    expect(families.limits.members).toEqual(expect.arrayContaining(setupFieldNames.filter(name => /Limit(Positive|Negative)?$|^softLimit/.test(name))))
  })

  it('every speed and every acceleration is in its family', () => {
    const withUnit = (unit: string) => setupFieldNames.filter((name) => {
      const field = setupFields[name]
      return field.type === 'number' && field.unit.linear === unit
    })
    expect(families.speeds.members).toEqual(expect.arrayContaining(withUnit('mm/s')))
    expect(families.accelerations.members).toEqual(expect.arrayContaining(withUnit('mm/s²')))
  })
})

describe('fieldsNamed', () => {
  it('finds a bare name in every section that has it', () => {
    expect(fieldsNamed('thrustLimit')).toEqual([{ section: 'setup', field: 'thrustLimit' }])
    expect(fieldsNamed('pressSpeed')).toEqual([{ section: 'setup', field: 'pressSpeed' }, { section: 'move', field: 'pressSpeed' }])
    expect(fieldsNamed('target')).toEqual([{ section: 'move', field: 'target' }])
    expect(fieldsNamed('from')).toEqual([{ section: 'zone', field: 'from' }])
  })

  it('takes the names of rules and of the drive’s own values', () => {
    expect(fieldsNamed('move.speed')).toEqual([{ section: 'move', field: 'speed' }])
    expect(fieldsNamed('zone.to')).toEqual([{ section: 'zone', field: 'to' }])
    expect(fieldsNamed('extra:K-017')).toEqual([{ section: 'extra', field: 'K-017' }])
  })

  it.each(['thrust', '', 'extra:', `extra:${'x'.repeat(65)}`, 'move.', 'move.thrustLimit', 'zone.target', 'setup.thrustLimit', 'toString', 'move.toString', '__proto__'])('knows no field %j', (word) => {
    expect(fieldsNamed(word)).toEqual([])
  })

  it('law: answers the very field that a rule would name', () => {
    const names = [...setupFieldNames, ...moveFieldNames.map(name => `move.${name}`), ...zoneFieldNames.map(name => `zone.${name}`), 'extra:K-017']
    fc.assert(fc.property(fc.constantFrom(...names), (name) => {
      expect(fieldsNamed(name).map(ruleNameOf)).toContain(name)
    }))
  })
})
