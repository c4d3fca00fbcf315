import { describe, expect, it } from 'vitest'
import { axisBody } from '../../../../shared/api/places'
import { bodyOf, draftOf, editedBody, numberOrText, type FormField } from '../../../../utils/forms/fields'

const fields: FormField[] = [
  { name: 'machineId', label: 'machine', type: 'choice', as: 'number', options: [{ value: '3', label: 'LID-01' }] },
  { name: 'tag', label: 'tag', type: 'text' },
  { name: 'axisKind', label: 'kind', type: 'choice', options: [{ value: 'linear', label: 'linear' }] },
  { name: 'flags', label: 'flags', type: 'many', options: [{ value: 'gravity', label: 'gravity' }] },
  { name: 'uploadEveryHours', label: 'interval', type: 'number', empty: null },
]
const record = { machineId: 3, tag: 'LID-01.Z', axisKind: 'linear', flags: ['gravity'], uploadEveryHours: 24 }

describe('numberOrText', () => {
  it.each([['12.5', 12.5], [' 7 ', 7], ['-3', -3], ['−3', -3], ['.5', 0.5], ['5.', 5]])('%s is %d', (text, number) => expect(numberOrText(text)).toBe(number))
  it.each(['1,250', '1e9', '0x10', 'twelve', '1 250', '-', ''])('%s stays a text', text => expect(numberOrText(text)).toBe(text))
})

describe('a draft', () => {
  it('gives back the body of the record it shows, and the schema of the route takes it', () => {
    const body = bodyOf(fields, draftOf(fields, record))
    expect(body).toEqual(record)
    expect(axisBody.safeParse(body).success).toBe(true)
  })

  it('leaves out what is empty, or sends what the field says', () => {
    expect(bodyOf(fields, draftOf(fields))).toEqual({ flags: [], uploadEveryHours: null })
  })

  it('tells a flag that is off from one that is not set', () => {
    const flag: FormField[] = [{ name: 'brakeFitted', label: 'brake', type: 'flag' }]
    expect([true, false, undefined].map(brakeFitted => bodyOf(flag, draftOf(flag, { brakeFitted })))).toEqual([{ brakeFitted: true }, { brakeFitted: false }, {}])
  })

  it('cuts a list at commas and line ends', () => {
    const list: FormField[] = [{ name: 'moves', label: 'moves', type: 'list', as: 'number' }]
    expect(bodyOf(list, { moves: '1, 2\n3,,' })).toEqual({ moves: [1, 2, 3] })
  })
})

describe('what was edited', () => {
  const before = draftOf(fields, record)
  it('is all that travels', () => expect(editedBody(fields, before, { ...before, tag: 'LID-01.Y' })).toEqual({ tag: 'LID-01.Y' }))
  it('clears with null', () => expect(editedBody(fields, before, { ...before, uploadEveryHours: '' })).toEqual({ uploadEveryHours: null }))
  it('is nothing where nothing was', () => expect(editedBody(fields, before, { ...before })).toEqual({}))
  it('keeps an emptied list a list', () => expect(editedBody(fields, before, { ...before, flags: [] })).toEqual({ flags: [] }))
})
