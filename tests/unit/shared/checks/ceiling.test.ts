import { describe, expect, it } from 'vitest'
import { answers } from '../../../../shared/checks/answers'
import { aboveNameplate, aboveSetup, type Asked } from '../../../../shared/checks/ceiling'

const say = answers('speed-limit')
const values: Asked[] = [{ at: '/a', words: 'Move 1: a speed', value: 100, move: 1 }, { at: '/a', words: 'The jog speed', value: 100.000001 }]
const asked = (limit: number) => values.filter(({ value }) => value > limit)

describe('ceilings', () => {
  it('count the bound itself as inside: 100 passes 100, 100.000001 does not', () => {
    expect(aboveNameplate(say, 'Speeds', asked, 'mm/s', 'maxSpeed', 100)).toMatchObject([{ level: 'stop', at: ['/a'], values: { value: 100.000001, limit: 100 } }])
    expect(aboveSetup(say, asked, 'mm/s', '/l', 100)).toMatchObject([{ level: 'warn', at: ['/a', '/l'], values: { value: 100.000001, limit: 100 } }])
  })

  it('do not know without the nameplate and ask nothing without a limit of the setup', () => {
    expect(aboveNameplate(say, 'Speeds', asked, 'mm/s', 'maxSpeed', undefined)).toMatchObject([{ level: 'unknown', missing: ['nameplate.maxSpeed'], at: ['/a'] }])
    expect(aboveSetup(say, asked, 'mm/s', '/l', undefined)).toEqual([])
  })
})
