import { describe, expect, it } from 'vitest'
import { uploadFields } from '../../../../shared/api/uploads'
import { asPerson, fieldsFor, noWords, unexplained, type Words } from '../../../../utils/upload/fields'
import { change, listed, placed } from './files'

const people = [{ id: 2, name: 'Tobias Achterberg' }, { id: 3, name: 'Ivo Tamsen' }, { id: 4, name: 'Ivo Tamsen' }]
const watched = listed(placed('LID-01.Z', { changes: [change('harm')] }), 'line-1/lid-01-z.json')
const quiet = listed(placed('LID-02.Z', { changes: [change('text')] }))
const words = (over: Partial<Words>): Words => ({ ...noWords(), ...over })

describe('a person beside an upload', () => {
  it('is the registered one where the name tells', () => expect(asPerson(' Tobias Achterberg ', people)).toBe('person:2'))
  it('stays a text where two people bear the name', () => expect(asPerson('Ivo Tamsen', people)).toBe('Ivo Tamsen'))
  it('stays a text where nobody bears it', () => expect(asPerson('fitter of the maker', people)).toBe('fitter of the maker'))
})

describe('what travels with a file', () => {
  it('is taken by the wire shape, empty texts left away', () => {
    const fields = fieldsFor(watched, words({}), people, 2)
    expect(fields).toEqual({ occasion: 'routine', name: 'lid-01-z.json' })
    expect(uploadFields.parse(fields)).toEqual(fields)
  })

  it('carries the reason of its own axis', () => {
    const said = words({ reasons: { 'LID-01.Z': ' new lid ' }, workOrder: 'WO-4139', changedBy: 'Tobias Achterberg', allowedBy: 'shift lead' })
    expect(fieldsFor(watched, said, people, 2)).toMatchObject({ reason: 'new lid', workOrder: 'WO-4139', changedBy: 'person:2', allowedBy: 'shift lead' })
    expect(fieldsFor(quiet, said, people, 2).reason).toBeUndefined()
  })

  it('carries the common reason, to quiet ones too', () => {
    const said = words({ scope: 'together', reason: 'yearly check', reasons: { 'LID-01.Z': 'not this' } })
    expect([watched, quiet].map(file => fieldsFor(file, said, people, 2).reason)).toEqual(['yearly check', 'yearly check'])
  })

  it('carries the answer to the question of the decimal sign', () => {
    expect(fieldsFor({ ...quiet, decimal: 'comma' }, noWords(), people, 1).decimal).toBe('comma')
  })
})

describe('axes without a word', () => {
  it('are those with a watched change, no reason and no work order', () => {
    expect(unexplained([watched, quiet], noWords())).toEqual(['LID-01.Z'])
    expect(unexplained([watched], words({ reasons: { 'LID-01.Z': 'x' } }))).toEqual([])
    expect(unexplained([watched], words({ workOrder: 'WO-1' }))).toEqual([])
    expect(unexplained([watched, quiet], words({ scope: 'together', reason: 'yearly check' }))).toEqual(['LID-01.Z'])
    expect(unexplained([watched], words({ scope: 'together', reason: 'yearly check' }))).toEqual([])
    expect(unexplained([listed(placed('NEW-1', { base: null, changes: [change('harm')] }))], noWords())).toEqual([])
  })
})
