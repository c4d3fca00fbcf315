import { describe, expect, it } from 'vitest'
import { blocksKnownGood } from '../../../../shared/checks/blocks'
import { judge } from '../../../../shared/checks/judge'
import type { CheckResult } from '../../../../shared/checks/types'
import { absolute, judgeInput, linear, press, soundPlate, soundSetup } from '../../../support/check-input'

const nameplate = soundPlate
const brief = (results: readonly CheckResult[]) => results.map(({ level, rule }) => `${level} ${rule}`)

describe('blocksKnownGood', () => {
  it('holds up a mark for every stop, on any axis', () => {
    const judgement = judge(judgeInput(linear(soundSetup, [absolute(1, 250), absolute(2, 5, { next: 9 })]), { nameplate }))
    expect(brief(blocksKnownGood(judgement, []))).toEqual(['stop target-inside', 'stop chain-target'])
    expect(brief(blocksKnownGood(judgement, ['collision']))).toEqual(['stop target-inside', 'stop chain-target'])
  })

  it('lets warnings and notes pass', () => {
    const judgement = judge(judgeInput(linear({ ...soundSetup, speedLimit: 100 }, [absolute(1, 50)]), { nameplate }))
    expect(brief(judgement.results)).toEqual(['warn speed-limit'])
    expect(blocksKnownGood(judgement, ['gravity', 'press'])).toEqual([])
  })

  it('holds up a gravity or press axis for what a stop rule could not judge, and no other', () => {
    const judgement = judge(judgeInput(linear({ ...soundSetup, softLimitMax: undefined }, [absolute(1, 50)]), { nameplate }))
    expect(blocksKnownGood(judgement, [])).toEqual([])
    expect(blocksKnownGood(judgement, ['collision'])).toEqual([])
    expect(brief(blocksKnownGood(judgement, ['gravity']))).toEqual(['unknown travel-span', 'unknown travel-placed', 'unknown target-inside'])
    expect(brief(blocksKnownGood(judgement, ['press']))).toEqual(['unknown travel-span', 'unknown travel-placed', 'unknown target-inside'])
  })

  it('never asks where a press starts, but where its limits are', () => {
    const pressing = (setup: object) => blocksKnownGood(judge(judgeInput(linear({ ...soundSetup, ...setup }, [press(2, 100, 150)]), { nameplate })), ['press'])
    expect(pressing({})).toEqual([])
    expect(brief(pressing({ softLimitMax: undefined }))).toEqual(['unknown travel-span', 'unknown travel-placed', 'unknown target-inside', 'unknown press-path'])
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
