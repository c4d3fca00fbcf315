import { describe, expect, it } from 'vitest'
import { personBody } from '../../../../shared/api/people'
import { axisBody } from '../../../../shared/api/places'
import { issuesOf, issuesOfProblem } from '../../../../utils/forms/issues'

const check = (schema: typeof axisBody | typeof personBody, body: unknown) => {
  const parsed = schema.safeParse(body, { reportInput: true })
  return parsed.success ? {} : issuesOf(parsed.error)
}

describe('what the schema refuses, in words at the field', () => {
  it('names what is needed', () => {
    expect(check(axisBody, {})).toEqual({ machineId: 'Needed', tag: 'Needed', axisKind: 'Choose one' })
  })
  it('says how a tag is written', () => {
    expect(check(axisBody, { machineId: 1, tag: 'LID 01', axisKind: 'linear' })).toEqual({ tag: '1 to 32 of A-Z a-z 0-9 . _ -' })
  })
  it('says bounds, and that a number has a point', () => {
    expect(check(axisBody, { machineId: 1, tag: 'A', axisKind: 'linear', uploadEveryHours: 0 })).toEqual({ uploadEveryHours: 'At least 1' })
    expect(check(axisBody, { machineId: 1, tag: 'A', axisKind: 'linear', uploadEveryHours: '1,5' })).toEqual({ uploadEveryHours: 'Write a number with a point, like 12.5' })
    expect(check(axisBody, { machineId: 1, tag: 'A', axisKind: 'linear', role: 'x'.repeat(81) })).toEqual({ role: 'At most 80 characters' })
  })
  it('names the place inside a field', () => {
    expect(check(axisBody, { machineId: 1, tag: 'A', axisKind: 'linear', duty: { moves: [1], cycleTime: 0 } })).toEqual({ duty: 'cycleTime: More than 0' })
  })
  it('asks for a role and an address', () => {
    expect(check(personBody, { name: 'Runa Haldersen', email: 'runa', roles: [], siteIds: [] })).toEqual({ email: 'Write an e-mail address, name@plant.example', roles: 'Choose at least one' })
  })
})

describe('what the vault refuses', () => {
  const problem = { type: 'about:blank', title: '', status: 422, detail: '', code: 'input', errors: [{ at: '/tag', code: 'taken', message: 'Taken' }, { at: '/other', code: 'x', message: 'Other' }, { at: '', code: 'x', message: 'Whole' }] }
  it('stands at its field, or over the form', () => {
    expect(issuesOfProblem(problem, ['tag'])).toEqual({ 'tag': 'Taken', '': 'Other. Whole' })
  })
  it('is nothing where the problem names no place', () => {
    expect(issuesOfProblem({ ...problem, errors: undefined }, ['tag'])).toEqual({})
  })
})
