import { describe, expect, it } from 'vitest'
import { setupFieldNames } from '../../../../shared/settings/fields'
import { boundFields, boundsInWords, findRuleField, ruleField, ruleFields } from '../../../../utils/rules/fields'

describe('the fields of a rule', () => {
  it('are all setup fields, the numbers of moves and zones, each once', () => {
    const names = ruleFields.map(field => field.name)
    expect(new Set(names).size).toBe(names.length)
    for (const name of [...setupFieldNames, 'move.speed', 'move.forceLimit', 'zone.from']) expect(names).toContain(name)
    expect(names).not.toContain('move.label')
  })
  it('are found by a part of their words', async () => {
    expect((await findRuleField('thrust limit')).map(option => option.value)).toEqual(['thrustLimit', 'thrustLimitPositive', 'thrustLimitNegative'])
    expect((await findRuleField('move.spe')).map(option => option.value)).toEqual(['move.speed'])
  })
  it('take the drive’s own by its key', async () => {
    expect(await findRuleField('extra:K-017')).toEqual([{ value: 'extra:K-017', label: 'the drive’s own K-017 (extra:K-017)' }])
    expect(ruleField('extra:')).toBeUndefined()
  })
  it('ask a range of numbers, one value of words, nothing before a field is chosen', () => {
    expect(boundFields(ruleField('thrustLimit')).map(field => field.name)).toEqual(['min', 'max', 'fixed'])
    expect(boundFields(ruleField('inputSwitching'))).toMatchObject([{ name: 'fixed', type: 'choice', options: [{ value: 'p' }, { value: 'n' }] }])
    expect(boundFields(ruleField('brakeFitted'))).toMatchObject([{ name: 'fixed', type: 'flag' }])
    expect(boundFields(undefined)).toEqual([])
  })
})

describe('what a rule allows, in words', () => {
  it.each([
    ['at most 45 %', { field: 'thrustLimit', min: null, max: 45, fixed: null }],
    ['at least 2 ms', { field: 'selectSettleTime', min: 2, max: null, fixed: null }],
    ['20 to 60 mm/s or deg/s', { field: 'move.speed', min: 20, max: 60, fixed: null }],
    ['always p', { field: 'inputSwitching', min: null, max: null, fixed: 'p' }],
    ['always yes', { field: 'brakeFitted', min: null, max: null, fixed: true }],
    ['always 15', { field: 'extra:K-017', min: null, max: null, fixed: 15 }],
  ])('%s', (words, rule) => expect(boundsInWords(rule)).toBe(words))
})
