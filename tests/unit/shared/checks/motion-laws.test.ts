import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { followingWindow } from '../../../../shared/checks/following-window'
import { homingPlausible } from '../../../../shared/checks/homing-plausible'
import { overloadPlausible } from '../../../../shared/checks/overload-plausible'
import { payload } from '../../../../shared/checks/payload'
import { pressArrives } from '../../../../shared/checks/press-arrives'
import { pressHold } from '../../../../shared/checks/press-hold'
import { quickStopSoft } from '../../../../shared/checks/quick-stop-soft'
import { speedReached } from '../../../../shared/checks/speed-reached'
import { stoppingRoom } from '../../../../shared/checks/stopping-room'
import { thrustLimit } from '../../../../shared/checks/thrust-limit'
import { thrustNeeded } from '../../../../shared/checks/thrust-needed'
import { thrustRms } from '../../../../shared/checks/thrust-rms'
import { levels, type CheckResult, type JudgeInput } from '../../../../shared/checks/types'
import type { Content, Move, Setup } from '../../../../shared/settings/types'
import { arbitraryContent } from '../../../support/arbitrary-content'
import { absolute, judgeInput, linear, plate, press, relative } from '../../../support/check-input'

/*
 * Laws over many contents for the rules that go by thrust and time: what they say may not hang on how the axis is looked at.
 */

const rules = [
  thrustLimit, thrustNeeded, thrustRms, overloadPlausible, quickStopSoft, speedReached, payload, pressArrives, pressHold, stoppingRoom,
  followingWindow, homingPlausible,
]
const judged = (input: JudgeInput): CheckResult[] => rules.filter(rule => rule.applies(input)).flatMap(rule => rule.judge(input))

const known = plate({
  stroke: 120, hardMargin: 1, ratedThrust: 300, peakThrust: 600, movingMass: 1, rotorInertia: 0.5, lead: 10, maxPayloadLevel: 30,
  maxPayloadVertical: 12, maxOverloadTime: 1000, maxImpactEnergy: 0.01, forceLimitActsBothWays: true,
})

describe('any content', () => {
  it('gets whole and well-formed answers, with and without a nameplate and a duty', () => {
    const anyInput = fc.record({
      content: arbitraryContent({ most: 10 }), nameplate: fc.option(fc.constant(known), { nil: undefined }),
      duty: fc.option(fc.record({ moves: fc.array(fc.integer({ min: 0, max: 13 }), { minLength: 1, maxLength: 5 }), cycleTime: fc.integer({ min: 1, max: 1e6 }) }), { nil: undefined }),
    })
    fc.assert(fc.property(anyInput, ({ content, nameplate, duty }) => {
      const input = { ...judgeInput(content, { nameplate }), axis: { axisKind: content.axisKind, flags: [], ...duty ? { duty } : {} } }
      for (const { rule, level, at, message, values, missing } of judged(input)) {
        expect(rules.find(({ id }) => id === rule)!.levels).toContain(level)
        expect(message).toMatch(/^[^a-z].*\.$/s)
        expect(message).not.toMatch(/undefined|NaN|Infinity|\[object/)
        expect(level === 'unknown').toBe((missing?.length ?? 0) > 0)
        for (const value of Object.values(values)) if (typeof value === 'number') expect(value).toSatisfy(Number.isFinite)
        for (const pointer of at) expect(pointer).toMatch(/^\/(setup|moves)/)
      }
    }), { numRuns: 300 })
  })

  it('gets the same answers whatever the order of its rows', () => {
    const pair = arbitraryContent({ kind: 'linear', most: 8 }).chain(content =>
      fc.tuple(fc.constant(content), fc.shuffledSubarray([...content.moves], { minLength: content.moves.length }).map(moves => ({ ...content, moves }))))
    const told = (content: Content) => judged(judgeInput(content, { nameplate: known }))
      .map(({ level, message }) => `${level} ${message}`).sort()
    fc.assert(fc.property(pair, ([content, shuffled]) => {
      expect(told(shuffled)).toEqual(told(content))
    }))
  })

  it('gets the same answers each time', () => {
    fc.assert(fc.property(arbitraryContent(), (content) => {
      expect(judged(judgeInput(content, { nameplate: known }))).toEqual(judged(judgeInput(content, { nameplate: known })))
    }))
  })

  it('tells its rules with words, formula and levels in their order', () => {
    for (const { id, title, reason, formula, levels: own } of rules) {
      for (const text of [id, title, formula]) expect(text.trim().length).toBeGreaterThan(3)
      expect(reason).toMatch(/^[A-Z].*\.$/)
      expect(own).toEqual(levels.filter(level => own.includes(level)))
    }
  })
})

const place = fc.integer({ min: 0, max: 100 })
const row = (move: number): fc.Arbitrary<Move> => fc.record({
  kind: fc.constantFrom('absolute' as const, 'relative' as const, 'press' as const), target: place, approach: place, speed: fc.integer({ min: 1, max: 1000 }),
  acceleration: fc.integer({ min: 100, max: 9000 }), forceLimit: fc.integer({ min: 1, max: 100 }), next: fc.option(fc.integer({ min: 0, max: 5 }), { nil: undefined }),
}).map(({ kind, target, approach, next, ...rest }) => {
  const chained = { ...rest, ...next === undefined ? {} : { next, dwell: 100 } }
  if (kind === 'press') return press(move, approach, target, chained)
  return kind === 'relative' ? relative(move, target - 50, chained) : absolute(move, target, chained)
})
const setup: fc.Arbitrary<Setup> = fc.record({
  softLimitMin: fc.constant(0), softLimitMax: fc.constant(100), thrustLimit: fc.integer({ min: 5, max: 90 }), thrustLimitPositive: fc.integer({ min: 5, max: 90 }),
  thrustLimitNegative: fc.integer({ min: 5, max: 90 }), payloadMass: fc.integer({ min: 1, max: 20 }), mountingAngle: fc.constantFrom(-90, -30, 0, 45, 90),
  frictionForce: fc.integer({ min: 0, max: 30 }), quickStopDeceleration: fc.integer({ min: 100, max: 9000 }), homeOffset: fc.integer({ min: -2, max: 2 }),
  homingMethod: fc.constant('hard-stop' as const), homingDirection: fc.constantFrom('negative' as const, 'positive' as const), homingForceLimit: fc.integer({ min: 5, max: 90 }),
})
const table: fc.Arbitrary<Content> = fc.tuple(setup, fc.tuple(...[0, 1, 2, 3, 4, 5].map(row)), fc.integer({ min: 1, max: 6 }))
  .map(([values, moves, count]) => linear(values, moves.slice(0, count)))
const brief = (content: Content, rest: Partial<JudgeInput> = {}) => judged(judgeInput(content, { nameplate: known, ...rest }))
  .map(({ rule, level, at }) => `${level} ${rule} ${at.length}`).sort()

describe('looking at the axis from its other end', () => {
  it('changes no verdict', () => {
    const mirrored = ({ setup, moves, ...content }: Content): Content => ({
      ...content,
      setup: {
        ...setup, softLimitMin: -setup.softLimitMax!, softLimitMax: -setup.softLimitMin!, mountingAngle: -setup.mountingAngle!, homeOffset: -setup.homeOffset!,
        thrustLimitPositive: setup.thrustLimitNegative, thrustLimitNegative: setup.thrustLimitPositive,
        homingDirection: setup.homingDirection === 'negative' ? 'positive' : 'negative',
      },
      moves: moves.map(move => ({ ...move, target: -move.target, ...move.approach === undefined ? {} : { approach: -move.approach } })),
    })
    fc.assert(fc.property(table, (content) => {
      expect(brief(mirrored(content))).toEqual(brief(content))
    }))
  })
})

describe('moving the zero of the axis', () => {
  it('changes no verdict', () => {
    fc.assert(fc.property(table, fc.integer({ min: -500, max: 500 }), (content, by) => {
      const { softLimitMin = 0, softLimitMax = 0, homeOffset = 0 } = content.setup
      const moved: Content = {
        ...content,
        setup: { ...content.setup, softLimitMin: softLimitMin + by, softLimitMax: softLimitMax + by, homeOffset: homeOffset - by },
        moves: content.moves.map(move => move.kind === 'relative' ? move : { ...move, target: move.target + by, ...move.approach === undefined ? {} : { approach: move.approach + by } }),
      }
      expect(brief(moved)).toEqual(brief(content))
    }))
  })
})

describe('a stronger unit', () => {
  it('is never told more stops', () => {
    const stronger = { ...known, ratedThrust: 900, peakThrust: 1800, maxPayloadLevel: 90, maxPayloadVertical: 40 }
    const stops = (content: Content, nameplate: typeof known) => judged(judgeInput(content, { nameplate })).filter(({ level }) => level === 'stop').map(({ rule, at }) => `${rule} ${at[0]}`)
    fc.assert(fc.property(table, (content) => {
      const before = stops(content, known)
      expect(stops(content, stronger).length).toBeLessThanOrEqual(before.length)
    }))
  })
})
