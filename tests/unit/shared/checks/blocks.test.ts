import { describe, expect, it } from 'vitest'
import { blocksKnownGood } from '../../../../shared/checks/blocks'
import { judge } from '../../../../shared/checks/judge'
import type { CheckResult } from '../../../../shared/checks/types'
import { absolute, judgeInput, limits, linear, plate, press } from '../../../support/check-input'

const nameplate = plate({ maxSpeed: 800, maxAcceleration: 5000, pressForceMin: 20, pressForceMax: 70, maxPressSpeed: 20 })
const brief = (results: readonly CheckResult[]) => results.map(({ level, rule }) => `${level} ${rule}`)

describe('blocksKnownGood', () => {
  it('holds up a mark for every stop, on any axis', () => {
    const judgement = judge(judgeInput(linear(limits, [absolute(1, 250), absolute(2, 5, { next: 9 })]), { nameplate }))
    expect(brief(blocksKnownGood(judgement, []))).toEqual(['stop target-inside', 'stop chain-target'])
    expect(brief(blocksKnownGood(judgement, ['collision']))).toEqual(['stop target-inside', 'stop chain-target'])
  })

  it('lets warnings and notes pass', () => {
    const judgement = judge(judgeInput(linear({ ...limits, speedLimit: 100 }, [absolute(1, 50)]), { nameplate }))
    expect(brief(judgement.results)).toEqual(['warn speed-limit'])
    expect(blocksKnownGood(judgement, ['gravity', 'press'])).toEqual([])
  })

  it('holds up a gravity or press axis for what a stop rule could not judge, and no other', () => {
    const judgement = judge(judgeInput(linear({ softLimitMin: 0 }, [absolute(1, 50)]), { nameplate }))
    expect(blocksKnownGood(judgement, [])).toEqual([])
    expect(blocksKnownGood(judgement, ['collision'])).toEqual([])
    expect(brief(blocksKnownGood(judgement, ['gravity']))).toEqual(['unknown travel-span', 'unknown target-inside'])
    expect(brief(blocksKnownGood(judgement, ['press']))).toEqual(['unknown travel-span', 'unknown target-inside'])
  })

  it('never asks where a press starts, but where its limits are', () => {
    const pressing = (setup: object) => blocksKnownGood(judge(judgeInput(linear({ thrustLimit: 80, ...setup }, [press(2, 100, 150)]), { nameplate })), ['press'])
    expect(pressing(limits)).toEqual([])
    expect(brief(pressing({ softLimitMin: 0 }))).toEqual(['unknown travel-span', 'unknown target-inside', 'unknown press-path'])
  })

  it('still asks for the rest where the start is not all that is missing', () => {
    const result: CheckResult = { rule: 'press-path', level: 'unknown', at: [], message: '', values: {}, missing: ['start of press', 'softLimitMin'] }
    expect(blocksKnownGood({ ruleSet: '1', results: [result], judged: [], notApplicable: [] }, ['press'])).toEqual([result])
  })

  it('lets the unknown of a rule that never stops pass, and not one of a rule that is gone', () => {
    const unknown = (rule: string): CheckResult => ({ rule, level: 'unknown', at: [], message: '', values: {}, missing: ['x'] })
    const judgement = { ruleSet: '0', results: [unknown('select-reach'), unknown('gone')], judged: [], notApplicable: [] }
    expect(brief(blocksKnownGood(judgement, ['gravity']))).toEqual(['unknown gone'])
  })
})
