import { describe, expect, it } from 'vitest'
import { axisBody, axisPatch, siteBody, sitePatch, unitBody, unitPatch } from '../../../../shared/api/places'
import { bodyOf, draftOf, editedBody } from '../../../../utils/forms/fields'
import { axisFields, axisRecord, axisShape, newAxisFields, newSiteFields, siteFields } from '../../../../utils/places/fields'
import { newUnitFields, unitFields } from '../../../../utils/places/unit-fields'
import { dutyInWords, intervalInWords, serialOf } from '../../../../utils/places/words'

const axis = { machine: { id: 3, name: 'LID-01' }, tag: 'LID-01.Z', axisKind: 'linear', role: 'seat', flags: ['press'], bus: 'bus-1', uploadEveryHours: 24, duty: { moves: [1, 2], cycleTime: 900 } } as unknown as Parameters<typeof axisRecord>[0]

describe('the forms of places', () => {
  it('ask only what the routes take', () => {
    const names = (fields: readonly { name: string }[]) => fields.map(field => field.name)
    expect(Object.keys(siteBody.shape)).toEqual(expect.arrayContaining(names(newSiteFields([]))))
    expect(Object.keys(sitePatch.shape)).toEqual(expect.arrayContaining(names(siteFields([]))))
    expect(Object.keys(unitBody.shape)).toEqual(expect.arrayContaining(names(newUnitFields([]))))
    expect(Object.keys(unitPatch.shape)).toEqual(expect.arrayContaining(names(unitFields([]))))
  })

  it('make a new axis with its duty', () => {
    const draft = { ...draftOf(newAxisFields), tag: 'LID-01.Z', axisKind: 'linear', dutyMoves: '1, 2', dutyCycleTime: '900' }
    const body = axisShape({ ...bodyOf(newAxisFields, draft), machineId: 3 }, draft)
    expect(axisBody.parse(body)).toMatchObject({ tag: 'LID-01.Z', duty: { moves: [1, 2], cycleTime: 900 }, uploadEveryHours: null, flags: [] })
  })

  it('leave the duty alone where it was not edited, change it whole, and clear it with null', () => {
    const fields = axisFields([])
    const before = draftOf(fields, axisRecord(axis))
    const edit = (over: Record<string, string>) => {
      const draft = { ...before, ...over }
      return axisShape({ ...editedBody(fields, before, draft), rev: 1 }, draft)
    }
    expect(edit({ role: 'seat lid' })).toEqual({ role: 'seat lid', rev: 1 })
    expect(edit({ dutyCycleTime: '800' })).toEqual({ rev: 1, duty: { moves: [1, 2], cycleTime: 800 } })
    expect(edit({ dutyCycleTime: '', dutyMoves: '' })).toEqual({ rev: 1, duty: null })
    expect(axisPatch.safeParse(edit({ dutyCycleTime: '' })).success).toBe(false)
  })
})

describe('places in words', () => {
  it.each([[null, 'never due'], [24, 'every day'], [168, 'every week'], [8, 'every 8 h'], [48, 'every 2 d']])('%s h: %s', (hours, words) => expect(intervalInWords(hours)).toBe(words))
  it('say a duty and a channel', () => {
    expect(dutyInWords({ moves: [1, 2], cycleTime: 900 })).toBe('1 2 in 900 ms')
    expect(dutyInWords(null)).toBe('not said')
    expect(serialOf({ serial: 'S', channel: 2 })).toBe('S channel 2')
  })
})
