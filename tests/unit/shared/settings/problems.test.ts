import { describe, expect, it } from 'vitest'
import { Problems, cutText, maxErrors } from '../../../../shared/settings/problems'

const source = { place: ({ offset }: { offset: number }) => ({ line: 1, column: offset + 1 }), shown: ({ offset, end }: { offset: number, end: number }) => 'x'.repeat(end - offset) }
const spot = (offset: number, end = offset) => ({ offset, end })

describe('Problems', () => {
  it('tells them in the order of the file, not of their finding', () => {
    const problems = new Problems(source)
    problems.add('missing', '/b', spot(9), 'b is missing.')
    problems.add('missing', '/a', spot(2), 'a is missing.')
    problems.add('missing', '', undefined, 'nothing is there.')
    expect(problems.outcome()).toEqual({
      ok: false, more: 0, errors: [
        { at: '', code: 'missing', message: 'nothing is there.' },
        { at: '/a', line: 1, column: 3, code: 'missing', message: 'a is missing.' },
        { at: '/b', line: 1, column: 10, code: 'missing', message: 'b is missing.' },
      ],
    })
  })

  it('keeps the first hundred and counts the rest', () => {
    const problems = new Problems(source)
    for (let index = 0; index < 250; index += 1) {
      expect(problems.full).toBe(index >= maxErrors)
      problems.add('enum', `/${index}`, spot(index), 'no.')
    }
    const { errors, more } = problems.outcome()
    expect(errors).toHaveLength(100)
    expect(errors[99]?.at).toBe('/99')
    expect(more).toBe(150)
    expect(problems.total).toBe(250)
  })

  it('shows the value as it stands, cut to 80 characters, and what was meant', () => {
    const problems = new Problems(source)
    problems.addValue('enum', '/a', spot(0, 100), 'no.', 'yes')
    expect(problems.outcome().errors[0]).toEqual({ at: '/a', line: 1, column: 1, code: 'enum', message: 'no.', value: 'x'.repeat(80), meant: 'yes' })
  })
})

describe('cutText', () => {
  it('counts code points and never halves one', () => {
    expect(cutText('a'.repeat(80))).toBe('a'.repeat(80))
    expect(cutText('a'.repeat(81))).toBe('a'.repeat(80))
    expect(cutText('😀'.repeat(80))).toBe('😀'.repeat(80))
    expect(cutText('😀'.repeat(81))).toBe('😀'.repeat(80))
    expect(cutText('')).toBe('')
  })
})
