import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { brakeAgrees } from '../../../../shared/checks/brake-agrees'
import { brakeVertical } from '../../../../shared/checks/brake-vertical'
import { chainAfterPress } from '../../../../shared/checks/chain-after-press'
import { forceRescale } from '../../../../shared/checks/force-rescale'
import { homeSide } from '../../../../shared/checks/home-side'
import { polarityFlip } from '../../../../shared/checks/polarity-flip'
import { softLimitsOff } from '../../../../shared/checks/soft-limits-off'
import { startTiming } from '../../../../shared/checks/start-timing'
import { targetGrid } from '../../../../shared/checks/target-grid'
import { travelPlaced } from '../../../../shared/checks/travel-placed'
import { twinMoves } from '../../../../shared/checks/twin-moves'
import { levels, type CheckResult, type JudgeInput, type Rule } from '../../../../shared/checks/types'
import { windowGrid } from '../../../../shared/checks/window-grid'
import { zoneReach } from '../../../../shared/checks/zone-reach'
import type { Nameplate } from '../../../../shared/settings/nameplate'
import { axisFlags, type Content } from '../../../../shared/settings/types'
import { arbitraryContent, arbitraryPair } from '../../../support/arbitrary-content'
import { judgeInput, plate } from '../../../support/check-input'

/*
 * What holds of each of these rules for any content that the format allows, whatever is known of the unit.
 */

const rules: readonly Rule[] = [
  travelPlaced, softLimitsOff, windowGrid, targetGrid, chainAfterPress, startTiming, zoneReach, homeSide, brakeVertical, brakeAgrees, polarityFlip, twinMoves, forceRescale,
]

const full = plate({
  hardMargin: 1, resolution: 0.01, repeatability: 0.02, inputFilterTime: 2, brakeFitted: true, brakeCloseTime: 40, brakeHolding: 300, movingMass: 2, ratedThrust: 300,
})
const optional = ['hardMargin', 'resolution', 'repeatability', 'inputFilterTime', 'brakeFitted', 'brakeCloseTime', 'brakeHolding', 'movingMass', 'ratedThrust'] as const

/** The full plate with some of its values taken away, or none at all. */
const somePlate: fc.Arbitrary<Nameplate | undefined> = fc.option(fc.subarray([...optional]).map(taken => ({ ...full, ...Object.fromEntries(taken.map(name => [name, undefined])) })), { nil: undefined })

const rest = fc.record({
  nameplate: somePlate,
  flags: fc.subarray([...axisFlags]),
  scan: fc.option(fc.integer({ min: 1, max: 50 }), { nil: undefined }),
  broughtFrom: fc.option(fc.record({ forceBase: fc.option(fc.constantFrom(300, 640), { nil: undefined }), rescaled: fc.boolean() }), { nil: undefined }),
})

function inputOf(content: Content, before: Content | undefined, { nameplate, flags, scan, broughtFrom }: typeof rest extends fc.Arbitrary<infer Value> ? Value : never): JudgeInput {
  return judgeInput(content, {
    axis: { axisKind: content.axisKind, flags, ...scan === undefined ? {} : { controllerScan: scan } },
    ...nameplate ? { nameplate } : {}, ...before ? { before: { content: before } } : {}, ...broughtFrom ? { broughtFrom } : {},
  })
}

const anyInput = fc.oneof(
  fc.tuple(arbitraryContent({ most: 10 }), rest).map(([content, more]) => inputOf(content, undefined, more)),
  fc.tuple(arbitraryPair({ kind: 'linear', most: 10 }), rest).map(([[before, content], more]) => inputOf(content, before, more)),
)
const answers = (rule: Rule, input: JudgeInput) => rule.applies(input) ? rule.judge(input) : []

/** A pointer told by the number of its row. */
function byNumber({ content }: JudgeInput, { level, message, at }: CheckResult): string {
  return [level, message, ...at.map(pointer => pointer.replace(/^\/moves\/(\d+)/, (_all, index: string) => `/move ${content.moves[Number(index)]!.move}`)).sort()].join(' | ')
}

function deepFrozen<Value>(value: Value): Value {
  if (typeof value === 'object' && value !== null) Object.values(Object.freeze(value)).forEach(deepFrozen)
  return value
}

describe.each(rules.map(rule => [rule.id, rule] as const))('%s', (id, rule) => {
  it('signs its results, with levels that it names and sentences that end', () => {
    fc.assert(fc.property(anyInput, (input) => {
      for (const { rule: signed, level, message, missing, values } of answers(rule, input)) {
        expect(signed).toBe(id)
        expect(rule.levels).toContain(level)
        expect(message).toMatch(/^[^a-z].*\.$/s)
        expect(message).not.toMatch(/undefined|NaN|Infinity|\[object|--/)
        expect(level === 'unknown').toBe((missing?.length ?? 0) > 0)
        for (const value of Object.values(values)) expect(value).not.toBeNaN()
      }
    }), { numRuns: 60 })
  })

  it('points only at rows that are there and at fields of the format', () => {
    fc.assert(fc.property(anyInput, (input) => {
      for (const pointer of answers(rule, input).flatMap(({ at }) => at)) {
        const [section, key] = pointer.split('/').slice(1)
        expect(['setup', 'moves', 'zones']).toContain(section)
        if (section !== 'setup') expect(input.content[section as 'moves' | 'zones'][Number(key)]).toBeDefined()
      }
    }), { numRuns: 60 })
  })

  it('changes nothing that it is given, and says the same again', () => {
    fc.assert(fc.property(anyInput, (input) => {
      const frozen = deepFrozen(input)
      expect(answers(rule, frozen)).toEqual(answers(rule, frozen))
    }), { numRuns: 40 })
  })

  it('says the same whatever the order of the rows', () => {
    const shuffled = anyInput.chain(input => fc.tuple(fc.constant(input), fc.shuffledSubarray([...input.content.moves], { minLength: input.content.moves.length })
      .map(moves => ({ ...input, content: { ...input.content, moves } }))))
    fc.assert(fc.property(shuffled, ([input, other]) => {
      const told = (one: JudgeInput) => answers(rule, one).map(result => byNumber(one, result)).sort()
      expect(told(other)).toEqual(told(input))
    }), { numRuns: 60 })
  })

  it('names nothing as missing on the nameplate that stands there', () => {
    fc.assert(fc.property(anyInput, (input) => {
      const plateNames = answers(rule, input).flatMap(({ missing = [] }) => missing).filter(name => name.startsWith('nameplate.'))
      for (const name of plateNames) expect(input.nameplate?.[name.slice('nameplate.'.length) as keyof Nameplate]).toBeUndefined()
    }), { numRuns: 60 })
  })

  it('takes no stop back when more becomes known of the unit', () => {
    fc.assert(fc.property(anyInput, (input) => {
      const stops = (nameplate: Nameplate | undefined) => answers(rule, { ...input, nameplate }).filter(({ level }) => level === 'stop').map(({ at }) => at.join())
      // A margin is no knowledge of this kind: one that is not known counts as none, and the other end lies elsewhere.
      const all = stops({ ...full, hardMargin: input.nameplate?.hardMargin })
      for (const stop of stops(input.nameplate)) expect(all).toContain(stop)
    }), { numRuns: 60 })
  })

  it('tells its levels in the order of all', () => {
    expect(rule.levels).toEqual(levels.filter(level => rule.levels.includes(level)))
    expect(rule.reason).toMatch(/^[A-Z].*\.$/)
    expect(rule.formula.length).toBeGreaterThan(10)
  })
})
