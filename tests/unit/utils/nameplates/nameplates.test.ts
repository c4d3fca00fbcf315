import { describe, expect, it } from 'vitest'
import { nameplatePatch } from '../../../../shared/api/places'
import { nameplateSchema, type Dictionary, type Nameplate } from '../../../../shared/settings/nameplate'
import { bodyOf, draftOf } from '../../../../utils/forms/fields'
import { revisionChanges } from '../../../../utils/nameplates/compare'
import { dictionaryOf, dictionaryPatch, draftsOf, emptyEntry } from '../../../../utils/nameplates/dictionary'
import { filled, nameplateFields, nameplateGroups, nameplateRecord, nameplateUnit } from '../../../../utils/nameplates/fields'

const plate: Nameplate = {
  model: 'HL40-200V', axisKind: 'linear', stroke: 200, ratedThrust: 640, forceBase: 'rated-thrust', firstMove: 1, brakeFitted: false, efficiency: 0.9, firmwareSeen: ['2.1', '2.2'], note: 'invented',
  dictionary: { 'K-017': { name: 'damping', min: 0, max: 30, weight: 'motion' }, 'F': { allowed: ['A', 'B', 2, true] } },
}

describe('the form of a nameplate', () => {
  it('asks every field of the schema exactly once, dictionary and entry table apart', () => {
    const names = nameplateGroups.flatMap(group => Object.keys(group.fields))
    expect([...names].sort()).toEqual(Object.keys(nameplateSchema.shape).filter(name => !['dictionary', 'entryTable'].includes(name)).sort())
    expect(new Set(names).size).toBe(names.length)
  })

  it('gives back the nameplate that it shows', () => {
    const fields = nameplateFields('linear')
    const { dictionary: _dictionary, ...plain } = plate
    expect(bodyOf(fields, draftOf(fields, nameplateRecord(plate)))).toEqual(plain)
  })

  it('needs model, kind and stroke, and marks no other', () => {
    expect(nameplateFields('linear').filter(field => field.needed).map(field => field.name)).toEqual(['model', 'axisKind', 'stroke'])
  })

  it('says units by the kind of axis', () => {
    expect([nameplateUnit('stroke', 'linear'), nameplateUnit('stroke', 'rotary'), nameplateUnit('ratedThrust', 'rotary'), nameplateUnit('maxSpeed', 'linear'), nameplateUnit('maxAcceleration', 'rotary'), nameplateUnit('repeatability', 'linear'), nameplateUnit('pressForceMax', 'linear'), nameplateUnit('rotorInertia', 'linear'), nameplateUnit('model', 'linear')])
      .toEqual(['mm', 'deg', 'N·m', 'mm/s', 'deg/s²', 'mm', '%', 'kg·cm²', ''])
  })

  it('explains without saying the unit twice', () => {
    const help = (name: string) => nameplateFields('linear').find(field => field.name === name)?.help
    expect(help('hardMargin')).toBe('From stroke end to hard stop, each end.')
    expect(help('forceBase')).toBe('What 100 % means. Left empty: rated thrust.')
    expect(help('firstMove')).toBe('Left empty: 0.')
    expect(help('repeatability')).toBeUndefined()
  })

  it('counts what stands on it', () => {
    expect(filled({ model: 'M', axisKind: 'linear', stroke: 1 }).count).toBe(3)
  })
})

describe('revisions', () => {
  it('differ value by value, in the order of the form, then by key', () => {
    const after: Nameplate = { ...plate, ratedThrust: 600, maxSpeed: 500, note: undefined, dictionary: { 'K-017': { name: 'damping', min: 0, max: 40 }, 'F': { allowed: ['A', 'B', 2, true] } } }
    expect(revisionChanges(plate, after)).toEqual([
      { key: 'note', label: 'Note', before: 'invented', after: undefined, unit: '' },
      { key: 'maxSpeed', label: 'Highest speed', before: undefined, after: 500, unit: 'mm/s' },
      { key: 'ratedThrust', label: 'Rated thrust or torque', before: 640, after: 600, unit: 'N' },
      { key: 'K-017/max', label: 'K-017, max', before: 30, after: 40, unit: '' },
      { key: 'K-017/weight', label: 'K-017, weight', before: 'motion', after: undefined, unit: '' },
    ])
  })
  it('are equal to themselves', () => expect(revisionChanges(plate, plate)).toEqual([]))
})

describe('the dictionary', () => {
  it('comes back from its form', () => expect(dictionaryOf(draftsOf(plate.dictionary))).toEqual(plate.dictionary))
  it('leaves away rows without a key', () => expect(dictionaryOf([emptyEntry()])).toEqual({}))

  const after: Dictionary = { 'K-017': { name: 'damping', min: 0, max: 40 }, 'N': {} }
  const patch = dictionaryPatch(plate.dictionary, after)
  it('travels as what changes; null takes out', () => expect(patch).toEqual({ 'F': null, 'K-017': { max: 40, weight: null }, 'N': {} }))
  it('is taken by the route', () => expect(nameplatePatch.parse({ rev: 1, dictionary: patch, note: null })).toEqual({ rev: 1, dictionary: patch, note: null }))
  it('says nothing where nothing changes', () => expect(dictionaryPatch(plate.dictionary, plate.dictionary)).toBeUndefined())
})
