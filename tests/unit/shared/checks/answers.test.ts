import { describe, expect, it } from 'vitest'
import { answers } from '../../../../shared/checks/answers'

describe('answers', () => {
  it('sign every result with the rule', () => {
    const say = answers('travel-span')
    expect([say.stop, say.warn, say.note].map(one => one(['/setup/modulo'], 'So it is.', { span: 5 }))).toEqual(
      ['stop', 'warn', 'note'].map(level => ({ rule: 'travel-span', level, at: ['/setup/modulo'], message: 'So it is.', values: { span: 5 } })))
  })

  it('say what is missing in a sentence and in a list', () => {
    expect(answers('r').unknown('Travel', ['a', 'nameplate.b'], [])).toEqual(
      { rule: 'r', level: 'unknown', at: [], values: {}, missing: ['a', 'nameplate.b'], message: 'Travel cannot be judged without a and nameplate.b.' })
  })
})
