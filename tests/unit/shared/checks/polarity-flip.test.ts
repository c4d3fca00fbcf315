import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { polarityFlip } from '../../../../shared/checks/polarity-flip'
import type { Content, Move, Setup } from '../../../../shared/settings/types'
import { absolute, judgeInput, linear, press, relative, rotary, told } from '../../../support/check-input'

const out = { positiveDirection: 'extend' } as const
const back = { positiveDirection: 'retract' } as const
const between = (before: Content, after: Content) => judgeInput(after, { before: { content: before } })
const flip = (before: readonly Move[], after: readonly Move[], then: Setup = {}, now: Setup = {}) =>
  between(linear({ ...out, ...then }, before), linear({ ...back, ...now }, after))

describe('polarity-flip', () => {
  it('is silent while the direction stays, whatever the targets do', () => {
    expect(told(polarityFlip, between(linear(out, [absolute(1, 50)]), linear(out, [absolute(1, 80)])))).toEqual([])
  })

  it('is silent where all places are mirrored about the zero: 50 + (−50) = 0, 10 + (−10) = 0', () => {
    const then = [absolute(1, 50), relative(2, 10), press(3, 100, 150)]
    const now = [absolute(1, -50), relative(2, -10), press(3, -100, -150)]
    expect(told(polarityFlip, flip(then, now, { softLimitMin: 0, softLimitMax: 198 }, { softLimitMin: -198, softLimitMax: 0 }))).toEqual([])
    expect(told(polarityFlip, flip(then, now))).toEqual([])
  })

  it('is silent where the zero went to the other end: 0 + 198 = 198, 50 + 148 = 198', () => {
    const same = { softLimitMin: 0, softLimitMax: 198 }
    expect(told(polarityFlip, flip([absolute(1, 50), relative(2, 10)], [absolute(1, 148), relative(2, -10)], same, same))).toEqual([])
  })

  it('stops targets that stayed as they were', () => {
    const moves = [absolute(1, 50), absolute(2, 80), relative(3, 10)]
    const input = flip(moves, moves)
    expect(told(polarityFlip, input)).toEqual(['stop: The positive direction turns from extend to retract and moves 1 to 3 are not mirrored: the axis would run the other way.'])
    expect(polarityFlip.judge(input)).toMatchObject([{
      at: ['/setup/positiveDirection', '/moves/0/target', '/moves/1/target', '/moves/2/target'], values: { from: 'extend', to: 'retract', moves: [1, 2, 3] },
    }])
  })

  it('stops for one row among mirrored ones, off by a millionth', () => {
    expect(told(polarityFlip, flip([absolute(1, 50), absolute(2, 80)], [absolute(1, -50), absolute(2, -79.999999)])))
      .toEqual(['stop: The positive direction turns from extend to retract and move 2 is not mirrored: the axis would run the other way.'])
    expect(told(polarityFlip, flip([press(1, 100, 150)], [press(1, 100, -150)]))[0]).toMatch(/move 1 is not mirrored/)
  })

  it('stops limits that stayed on their side, with targets mirrored about the zero: 0 + 198 and 200 + 0 do not agree', () => {
    expect(told(polarityFlip, flip([absolute(1, 50)], [absolute(1, -50)], { softLimitMin: 0, softLimitMax: 198 }, { softLimitMin: 0, softLimitMax: 200 })))
      .toEqual(['stop: The positive direction turns from extend to retract and the soft limits are not mirrored: the axis would run the other way.'])
  })

  it('stops where no row can be held beside one of before, and lets an empty table pass', () => {
    expect(told(polarityFlip, flip([absolute(1, 50)], [absolute(7, -50)]))[0]).toMatch(/move 7 is not mirrored/)
    expect(told(polarityFlip, flip([absolute(1, 50)], []))).toEqual([])
  })

  it('takes places a whole turn apart for one on an axis that wraps', () => {
    const turned = (target: number) => between(rotary({ positiveDirection: 'clockwise', modulo: 360 }, [absolute(1, 90)]), rotary({ positiveDirection: 'counterclockwise', modulo: 360 }, [absolute(1, target)]))
    expect(told(polarityFlip, turned(270))).toEqual([])
    expect(told(polarityFlip, turned(90))).toHaveLength(1)
  })

  it('names the direction that is missing on one side, and does not apply where both or the version before are', () => {
    expect(told(polarityFlip, between(linear(out), linear()))).toEqual(['unknown: Whether the positive direction was turned round cannot be judged without positiveDirection.'])
    expect(polarityFlip.judge(between(linear(), linear(out)))[0]!.missing).toEqual(['positiveDirection of the version before'])
    expect(told(polarityFlip, between(linear(), linear()))).toEqual(['not applicable'])
    expect(told(polarityFlip, judgeInput(linear(out)))).toEqual(['not applicable'])
  })

  it('lets every mirror image pass, and names just the rows moved off it', () => {
    const place = fc.integer({ min: -500, max: 500 })
    fc.assert(fc.property(fc.array(place, { minLength: 1, maxLength: 8 }), fc.integer({ min: 1, max: 300 }), fc.nat({ max: 7 }), (targets, by, index) => {
      const then = targets.map((target, move) => absolute(move, target))
      const now = targets.map((target, move) => absolute(move, -target))
      expect(polarityFlip.judge(flip(then, now))).toEqual([])
      const moved = index % targets.length
      const astray = now.map(move => move.move === moved ? { ...move, target: move.target + by } : move)
      expect(polarityFlip.judge(flip(then, astray)).map(({ values }) => values.moves)).toEqual([[moved]])
    }))
  })
})
