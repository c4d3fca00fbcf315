import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { timeline } from '../../../../shared/motion/timeline'
import { turns, type Move, type Setup } from '../../../../shared/settings/types'
import { firstMotion } from '../../../../shared/swap/first-motion'
import { startsOf } from '../../../../shared/swap/starts'
import { absolute, relative, rotary } from '../../../support/check-input'

const starts = (moves: readonly Move[], setup: Setup = {}, endless = false) => startsOf({ moves, endless }, { setup })
const limited = { softLimitMin: -5, softLimitMax: 180 }
const turning = { modulo: 360 }

describe('where a call takes longest from', () => {
  it('on an axis with ends: either of them, and nowhere that anybody knows without both', () => {
    expect(starts([absolute(1, 20)], limited)).toEqual([-5, 180])
    expect(starts([relative(1, 20), absolute(2, 50)], limited)).toEqual([-5, 180])
    expect(starts([absolute(1, 20)], { softLimitMin: -5 })).toEqual([])
    expect(starts([absolute(1, 20)], { softLimitMax: 180 })).toEqual([])
  })

  it('relative moves alone: anywhere', () => {
    expect(starts([relative(1, 20), relative(2, -5)], limited)).toEqual([0])
    expect(starts([relative(1, 20)], turning)).toEqual([0])
  })

  it('an endless chain: where a lap begins, which is where it ends', () => {
    expect(starts([absolute(1, 20), relative(2, 15)], limited, true)).toEqual([35])
    expect(starts([absolute(1, 20), relative(2, 15)], turning, true)).toEqual([35])
  })

  it('on a modulo axis: 0 and a full turn, or the place that the turn makes farthest, to the last millionth', () => {
    expect(starts([absolute(1, 90)], turning)).toEqual([0, 360])
    expect(starts([absolute(1, 90, { turn: 'positive' })], turning)).toEqual([90.000001])
    expect(starts([absolute(1, 90, { turn: 'negative' })], turning)).toEqual([89.999999])
    expect(starts([absolute(1, 90, { turn: 'shortest' })], turning)).toEqual([269.999999, -89.999999])
    // 30 deg on, and from there farthest from 90: 30 deg earlier than without.
    expect(starts([relative(1, 30), absolute(2, 90, { turn: 'positive' })], turning)).toEqual([60.000001])
  })

  const degree = fc.integer({ min: 0, max: 360_000_000 }).map(millionths => millionths / 1e6)
  it('no place on the turn takes longer', () => fc.assert(fc.property(
    degree, degree, fc.constantFrom(...turns), fc.option(fc.integer({ min: -400, max: 400 }), { nil: undefined }), (target, place, turn, before) => {
      fc.pre(turn !== 'signed' || before === undefined)
      const chain = [...before === undefined ? [] : [relative(1, before)], absolute(2, target, { turn })]
      const seconds = (from: number) => timeline(chain, from, { setup: turning }).seconds
      expect(seconds(place)).toBeLessThanOrEqual(Math.max(...starts(chain, turning).map(seconds)) + 1e-9)
    },
  )))
})

describe('first motion of a turning axis', () => {
  const only = (move: Partial<Move>) => firstMotion({ content: rotary(turning, [absolute(1, 0, { speed: 100, acceleration: 1000, ...move })]), flags: [], speedPercent: 10 }).at(-1)

  it('to its zero is not there already: 360 deg at 10 deg/s and 1000 deg/s² are 36 + 0.01 s', () => {
    expect(only({})).toMatchObject({ item: 'move-1', end: 0, direction: 'negative' })
    expect(only({})?.seconds).toBeCloseTo(36.01, 9)
  })

  it('the shortest way is half a turn at most, either way: 18 + 0.01 s', () => {
    expect(only({ turn: 'shortest' })).toMatchObject({ direction: 'either' })
    expect(only({ turn: 'shortest' })?.seconds).toBeCloseTo(18.01, 6)
  })

  it('a turn that is asked for says the way, and may be a whole one', () => {
    expect(only({ target: 90, turn: 'positive' })).toMatchObject({ direction: 'positive' })
    expect(only({ target: 90, turn: 'positive' })?.seconds).toBeCloseTo(36.01, 6)
    expect(only({ target: 90, turn: 'negative' })).toMatchObject({ direction: 'negative' })
  })
})
