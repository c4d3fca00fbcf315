import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { blocksKnownGood } from '../../../../shared/checks/blocks'
import { judge } from '../../../../shared/checks/judge'
import { relativeStep } from '../../../../shared/checks/relative-step'
import { selectReach } from '../../../../shared/checks/select-reach'
import { siteRule } from '../../../../shared/checks/site-rule'
import type { CheckResult, JudgeInput, SiteRule } from '../../../../shared/checks/types'
import type { Nameplate } from '../../../../shared/settings/nameplate'
import { axisFlags, type Content, type Move, type Setup } from '../../../../shared/settings/types'
import { arbitraryContent } from '../../../support/arbitrary-content'
import { absolute, judgeInput, linear, plate, press, relative, soundPlate } from '../../../support/check-input'

/*
 * Laws over many contents: what a rule says may not hang on how the axis is looked at, and giving more room or more
 * knowledge may never make it say more against a row.
 */

const known: Nameplate = { ...soundPlate, stroke: 500 }

/** Tables on a small travel, where rows often meet limits, approaches and each other. */
const place = fc.integer({ min: -30, max: 130 })
const row = (move: number): fc.Arbitrary<Move> => fc.record({
  kind: fc.constantFrom('absolute' as const, 'relative' as const, 'press' as const),
  target: place, approach: place, speed: fc.integer({ min: 1, max: 1000 }), pressSpeed: fc.integer({ min: 1, max: 30 }),
  forceLimit: fc.integer({ min: 1, max: 100 }), next: fc.option(fc.integer({ min: 0, max: 7 }), { nil: undefined }),
}).map(({ kind, target, approach, speed, pressSpeed, forceLimit, next }) => {
  const chained = next === undefined ? {} : { next }
  if (kind === 'press') return press(move, approach, target, { speed, pressSpeed, forceLimit, ...chained })
  return kind === 'relative' ? relative(move, target, { speed, ...chained }) : absolute(move, target, { speed, ...chained })
})
const setup: fc.Arbitrary<Setup> = fc.record({
  softLimitMin: fc.constantFrom(0, 10), softLimitMax: fc.constantFrom(90, 100), thrustLimit: fc.constantFrom(50, 60),
  speedLimit: fc.constantFrom(200, 900), payloadMass: fc.constantFrom(1, 20), mountingAngle: fc.constantFrom(-90, 0, 90), selectInputs: fc.integer({ min: 0, max: 3 }),
})
const table: fc.Arbitrary<Content> = fc.tuple(setup, fc.tuple(...[0, 1, 2, 3, 4, 5, 6].map(row)), fc.integer({ min: 1, max: 7 }))
  .map(([values, moves, count]) => linear(values, moves.slice(0, count)))

const against = (content: Content, rest: Partial<JudgeInput> = {}) => judge(judgeInput(content, { nameplate: known, ...rest })).results
const brief = (results: readonly CheckResult[]) => results.map(({ rule, level, at }) => `${level} ${rule} ${at[0]}`).sort()

describe('looking at the axis from its other end', () => {
  const mirrored = (content: Content): Content => {
    const { softLimitMin = 0, softLimitMax = 0, mountingAngle = 0 } = content.setup
    return {
      ...content,
      setup: { ...content.setup, softLimitMin: -softLimitMax, softLimitMax: -softLimitMin, mountingAngle: -mountingAngle },
      moves: content.moves.map(move => ({ ...move, target: -move.target, ...move.approach === undefined ? {} : { approach: -move.approach } })),
    }
  }

  it('changes no verdict', () => {
    fc.assert(fc.property(table, (content) => {
      expect(brief(against(mirrored(content)))).toEqual(brief(against(content)))
    }))
  })

  it('changes no force on the part and no lap that leaves', () => {
    const figures = (content: Content) => against(content).flatMap(({ rule, values }) => ['onPart', 'lap', 'fits', 'beyond'].flatMap(name =>
      typeof values[name] === 'number' ? [`${rule} ${name} ${Number(values[name]).toFixed(6)}`] : [])).sort()
    fc.assert(fc.property(table, (content) => {
      expect(figures(mirrored(content))).toEqual(figures(content))
    }))
  })
})

describe('moving the zero of the axis', () => {
  it('changes no verdict, as long as relative moves stay as they are', () => {
    fc.assert(fc.property(table, fc.integer({ min: -5000, max: 5000 }), (content, by) => {
      const { softLimitMin = 0, softLimitMax = 0 } = content.setup
      const moved: Content = {
        ...content,
        setup: { ...content.setup, softLimitMin: softLimitMin + by, softLimitMax: softLimitMax + by },
        moves: content.moves.map(move => move.kind === 'relative'
          ? move
          : { ...move, target: move.target + by, ...move.approach === undefined ? {} : { approach: move.approach + by } }),
      }
      expect(brief(against(moved))).toEqual(brief(against(content)))
    }))
  })
})

describe('calling the moves by other numbers', () => {
  it('changes nothing but the reach of the select inputs', () => {
    fc.assert(fc.property(table, fc.integer({ min: 1, max: 900 }), (content, by) => {
      const renumbered = { ...content, moves: content.moves.map(move => ({ ...move, move: move.move + by, ...move.next === undefined ? {} : { next: move.next + by } })) }
      const told = (one: Content) => brief(against(one)).filter(line => !line.includes('select-reach'))
      expect(told(renumbered)).toEqual(told(content))
    }))
  })
})

describe('a stronger unit', () => {
  it('is never told more stops', () => {
    const stronger: Nameplate = { ...known, stroke: 5000, maxSpeed: 900, maxAcceleration: 9000, pressForceMin: 10, pressForceMax: 100, maxPressSpeed: 40 }
    fc.assert(fc.property(table, (content) => {
      const stops = (nameplate: Nameplate) => brief(against(content, { nameplate }).filter(({ level }) => level === 'stop'))
      const before = stops(known)
      for (const stop of stops(stronger)) expect(before).toContain(stop)
    }))
  })
})

describe('what is missing', () => {
  it('is no longer missing once it is given', () => {
    fc.assert(fc.property(arbitraryContent({ kind: 'linear', most: 8 }), (content) => {
      const names = (results: readonly CheckResult[]) => new Set(results.flatMap(({ missing = [] }) => missing).filter(name => name.startsWith('nameplate.')))
      const bare = names(judge(judgeInput(content)).results)
      expect([...names(against(content))]).toEqual([])
      for (const name of bare) expect(Object.keys(known)).toContain(name.slice('nameplate.'.length))
    }))
  })

  it('takes no stop back: with less known there are no stops that were not there', () => {
    fc.assert(fc.property(table, (content) => {
      const stops = (rest: Partial<JudgeInput>) => brief(judge(judgeInput(content, rest)).results.filter(({ level }) => level === 'stop'))
      const all = stops({ nameplate: known })
      for (const stop of stops({})) expect(all).toContain(stop)
    }))
  })
})

describe('a mark', () => {
  it('is held up by results of the judgement only, by all stops, and by no fewer with more flags', () => {
    fc.assert(fc.property(table, fc.subarray([...axisFlags]), (content, flags) => {
      const judgement = judge(judgeInput(content))
      const held = blocksKnownGood(judgement, flags)
      for (const result of held) expect(judgement.results).toContain(result)
      expect(held.filter(({ level }) => level === 'stop')).toEqual(judgement.results.filter(({ level }) => level === 'stop'))
      expect(blocksKnownGood(judgement, axisFlags)).toEqual(expect.arrayContaining(held))
    }))
  })
})

describe('single rules', () => {
  it('relative-step: a longer travel never holds fewer steps', () => {
    const fits = (span: number, step: number) => relativeStep.judge(judgeInput(linear({ softLimitMin: 0, softLimitMax: span }, [relative(1, step)])))[0]?.values.fits
    fc.assert(fc.property(fc.integer({ min: 1, max: 1000 }), fc.integer({ min: 0, max: 1000 }), fc.integer({ min: -300, max: 300 }).filter(step => step !== 0), (span, more, step) => {
      // Whole numbers: the largest n with n·|step| <= span, counted up.
      let counted = 0
      while ((counted + 1) * Math.abs(step) <= span) counted++
      expect(fits(span, step)).toBe(counted)
      expect(fits(span + more, step)).toBeGreaterThanOrEqual(counted)
    }))
  })

  it('select-reach: tells just the moves that no setting of the inputs calls', () => {
    const numbering = fc.record({ firstMove: fc.constantFrom(0 as const, 1 as const), allOff: fc.constantFrom('first' as const, 'none' as const, 'home' as const) })
    fc.assert(fc.property(fc.integer({ min: 1, max: 6 }), numbering, fc.uniqueArray(fc.integer({ min: 0, max: 80 }), { minLength: 1 }), (selectInputs, how, numbers) => {
      const callable = new Set<number>()
      // The settings one after the other, as a controller would switch them.
      for (let code = how.allOff === 'first' ? 0 : 1, move: number = how.firstMove; code < 2 ** selectInputs; code++, move++) callable.add(move)
      const content = linear({ selectInputs }, numbers.map(number => absolute(number, 0)))
      const told = selectReach.judge(judgeInput(content, { nameplate: plate(how) }))[0]?.values.moves ?? []
      expect(told).toEqual(numbers.filter(number => !callable.has(number)).sort((a, b) => a - b))
    }))
  })

  it('site-rule: wider bounds never stop more', () => {
    const bound = fc.integer({ min: 0, max: 1000 })
    fc.assert(fc.property(table, bound, bound, bound, (content, min, max, wider) => {
      const stops = (rule: Pick<SiteRule, 'min' | 'max'>) => siteRule.judge(judgeInput(content, { rules: [{ id: 1, scope: 'site', field: 'move.speed', reason: 'dust', ...rule }] })).length
      expect(stops({ min: min - wider, max: max + wider })).toBeLessThanOrEqual(stops({ min, max }))
      expect(stops({ min, max })).toBe(content.moves.filter(({ speed }) => speed < min).length + content.moves.filter(({ speed }) => speed > max).length)
    }))
  })
})
