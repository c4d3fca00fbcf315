import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { fold } from '../../../../shared/checks/fold'
import { judge } from '../../../../shared/checks/judge'
import type { CheckResult } from '../../../../shared/checks/types'
import { arbitraryContent } from '../../../support/arbitrary-content'
import { absolute, judgeInput, linear, relative, soundSetup } from '../../../support/check-input'

const unknown = (rule: string, ...missing: string[]): CheckResult =>
  ({ rule, level: 'unknown', at: [], message: `${rule} cannot be judged.`, values: {}, missing })
const other = (level: 'stop' | 'warn' | 'note', rule: string, message: string): CheckResult => ({ rule, level, at: [], message, values: {} })

describe('fold', () => {
  it('keeps a line for each stop and warning', () => {
    const results = [other('stop', 'target-inside', 'One.'), other('stop', 'target-inside', 'Two.'), other('warn', 'speed-limit', 'Three.')]
    expect(fold(results)).toEqual([
      { level: 'stop', rule: 'target-inside', message: 'One.', results: [results[0]] },
      { level: 'stop', rule: 'target-inside', message: 'Two.', results: [results[1]] },
      { level: 'warn', rule: 'speed-limit', message: 'Three.', results: [results[2]] },
    ])
  })

  it('folds the notes of a rule into one line, a single one with its own words', () => {
    const results = [other('note', 'relative-step', 'A.'), other('note', 'unused-rows', 'B.'), other('note', 'relative-step', 'C.')]
    expect(fold(results).map(({ message, results: inside }) => [message, inside.length])).toEqual([['Relative steps: 2 notes.', 2], ['B.', 1]])
  })

  it('says how many rules wait for what', () => {
    const results = ['a', 'b', 'c', 'd', 'e', 'f', 'g', 'h', 'i'].map(rule => unknown(rule, 'payloadMass'))
    expect(fold(results).map(line => line.message)).toEqual(['9 rules wait for payloadMass'])
    expect(fold([unknown('a', 'payloadMass'), unknown('a', 'payloadMass')])[0]).toMatchObject({ message: '1 rule waits for payloadMass', missing: ['payloadMass'] })
  })

  it('joins what the same rules wait for, and lists a rule with each thing that it misses', () => {
    expect(fold([unknown('a', 'x', 'y'), unknown('b', 'y'), unknown('c', 'p', 'q')]).map(line => line.message))
      .toEqual(['1 rule waits for x', '2 rules wait for y', '1 rule waits for p and q'])
  })

  it('takes a judgement without a nameplate', () => {
    const { results } = judge(judgeInput(linear(soundSetup, [absolute(0, 0), relative(1, 20), relative(2, 30)])))
    expect(fold(results).map(line => line.message)).toEqual([
      'Relative steps: 2 notes.', 'Speeds that are reached: 2 notes.', '2 rules wait for nameplate.stroke', '1 rule waits for nameplate.maxSpeed',
      '1 rule waits for nameplate.maxAcceleration', '3 rules wait for nameplate.ratedThrust', '1 rule waits for nameplate.maxPayloadLevel',
      '2 rules wait for nameplate.resolution', '1 rule waits for nameplate.repeatability', '1 rule waits for nameplate.inputFilterTime', '1 rule waits for nameplate.brakeFitted',
    ])
  })

  it('loses no result', () => {
    fc.assert(fc.property(arbitraryContent(), (content) => {
      const { results } = judge(judgeInput(content))
      expect(new Set(fold(results).flatMap(line => line.results))).toEqual(new Set(results))
    }))
  })
})
