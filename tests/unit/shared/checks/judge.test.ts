import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { judge } from '../../../../shared/checks/judge'
import { ruleOf, rules, ruleSetVersion } from '../../../../shared/checks/table'
import { levels, type CheckResult, type JudgeInput } from '../../../../shared/checks/types'
import type { Content } from '../../../../shared/settings/types'
import { arbitraryContent } from '../../../support/arbitrary-content'
import { absolute, judgeInput, linear, press, relative, soundPlate, soundSetup, unused } from '../../../support/check-input'

/** A result told without places in the table: rows stand by their numbers. */
function byNumber(content: Content, { rule, level, at, message }: CheckResult): string {
  const places = at.map(pointer => pointer.replace(/^\/moves\/(\d+)/, (_all, index: string) => `/move ${content.moves[Number(index)]!.move}`))
  return [rule, level, message, ...places.sort()].join(' | ')
}

describe('judge', () => {
  it('finds nothing in a sound table', () => {
    const content = linear(soundSetup, [absolute(0, 0), absolute(1, 50, { next: 2 }), press(2, 100, 150)])
    const { results, judged, notApplicable, ruleSet } = judge(judgeInput(content, { nameplate: soundPlate }))
    // 24.7 kg at 10 mm/s are 0.0012 J.
    expect(results).toEqual([])
    expect(ruleSet).toBe(ruleSetVersion)
    expect(notApplicable).toEqual([
      'soft-limits-off', 'relative-step', 'overload-plausible', 'chain-after-press', 'zone-reach', 'brake-vertical', 'polarity-flip', 'force-rescale', 'site-rule', 'extra-range',
    ])
    expect([...judged, ...notApplicable].sort()).toEqual(rules.map(rule => rule.id).sort())
  })

  it('tells stops first, then warnings, notes and what is unknown, each in the order of the table', () => {
    const content = linear({ ...soundSetup, thrustLimit: undefined }, [
      absolute(0, 250, { speed: 700 }), relative(1, 20), press(2, 100, 150), unused(3), absolute(9, 10, { next: 77 }),
    ])
    expect(judge(judgeInput(content, { nameplate: soundPlate })).results.map(({ level, rule }) => `${level} ${rule}`)).toEqual([
      'stop target-inside', 'stop chain-target',
      'warn speed-limit', 'warn stopping-room', 'warn select-reach',
      'note relative-step', 'note speed-reached', 'note unused-rows',
      'unknown press-path', 'unknown press-force',
    ])
  })

  it('is whole and well-formed for any content, with and without a nameplate', () => {
    const anyInput = fc.record({
      content: arbitraryContent({ most: 12 }),
      nameplate: fc.option(fc.constant(soundPlate), { nil: undefined }),
      rules: fc.constant([{ id: 1, scope: 'site', field: 'move.speed', max: 100, reason: 'slow' }] as JudgeInput['rules']),
    })
    fc.assert(fc.property(anyInput, ({ content, ...rest }) => {
      const judgement = judge(judgeInput(content, rest))
      for (const { rule, level, at, message, values, missing } of judgement.results) {
        expect(judgement.judged).toContain(rule)
        expect(ruleOf(rule)!.levels).toContain(level)
        expect(message).toMatch(/^[^a-z].*\.$/s)
        expect(message).not.toMatch(/undefined|NaN|\[object/)
        expect(level === 'unknown').toBe((missing?.length ?? 0) > 0)
        for (const value of Object.values(values)) if (typeof value === 'number') expect(value).not.toBeNaN()
        for (const pointer of at) expect(pointer).toMatch(/^\/(setup|moves|zones|extra|axisKind)/)
      }
      const order = judgement.results.map(({ level }) => levels.indexOf(level))
      expect(order).toEqual([...order].sort((a, b) => a - b))
    }))
  })

  it('gives the same answers by number whatever the order of the rows', () => {
    const pair = arbitraryContent({ most: 12 }).chain(content =>
      fc.tuple(fc.constant(content), fc.shuffledSubarray([...content.moves], { minLength: content.moves.length }).map(moves => ({ ...content, moves }))))
    fc.assert(fc.property(pair, ([content, shuffled]) => {
      const told = (one: Content) => judge(judgeInput(one, { nameplate: soundPlate })).results
        .map(result => byNumber(one, result)).sort()
      expect(told(shuffled)).toEqual(told(content))
    }))
  })

  it('says the same each time', () => {
    fc.assert(fc.property(arbitraryContent(), (content) => {
      expect(judge(judgeInput(content))).toEqual(judge(judgeInput(content)))
    }))
  })
})
