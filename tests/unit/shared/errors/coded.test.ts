import { describe, expect, it } from 'vitest'
import { CodedError } from '../../../../shared/errors/coded'
import { Refusal, refusalCodes } from '../../../../shared/errors/refusal'
import { DiffError } from '../../../../shared/diff/error'

describe('an error with a code', () => {
  it('is told apart by its code, and shown by its message', () => {
    const error = new CodedError('not-canonical', 'NaN cannot be written as a number.', { value: Number.NaN })
    expect(error).toMatchObject({ code: 'not-canonical', message: 'NaN cannot be written as a number.', details: { value: Number.NaN } })
    expect(String(error)).toBe('CodedError: NaN cannot be written as a number.')
  })

  it('is an Error, so that it has a stack and is caught like one', () => {
    const error = new CodedError('limit', 'Too many.')
    expect(error).toBeInstanceOf(Error)
    expect(error.stack).toContain('coded.test')
    expect(error.details).toEqual({})
  })

  it('is of its own class and of no other', () => {
    const refusal = new Refusal('taken', 'That name is taken: give another.')
    expect(refusal).toBeInstanceOf(CodedError)
    expect(refusal).toBeInstanceOf(Refusal)
    expect(refusal).not.toBeInstanceOf(DiffError)
    expect(new DiffError('wrong-base', 'Another value stands there.')).not.toBeInstanceOf(Refusal)
  })
})

describe('the codes of refusals', () => {
  it('are each there once, and fit into the address of a problem type', () => {
    expect(new Set(refusalCodes).size).toBe(refusalCodes.length)
    for (const code of refusalCodes) expect(code).toMatch(/^[a-z]+(-[a-z]+)*$/)
  })
})
