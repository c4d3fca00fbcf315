import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { lapThatLeaves, lapTravel, takesNoTime } from '../../../../shared/motion/lap'
import { absolute, press, relative } from '../../../support/check-input'

describe('lapTravel', () => {
  it('nets what one round travels and keeps its furthest places: +60 −90 +40 = +10, between −30 and 60', () => {
    expect(lapTravel([relative(1, 60), relative(2, -90), relative(3, 40)])).toEqual({ net: 10, low: -30, high: 60 })
  })

  it('is none where a member goes to a place of its own', () => {
    expect(lapTravel([relative(1, 60), absolute(2, 0)])).toBeUndefined()
    expect(lapTravel([press(1, 100, 150)])).toBeUndefined()
  })
})

describe('lapThatLeaves', () => {
  const step = { net: 50, low: 0, high: 50 }

  it('is the fourth for 50 mm on 0 … 198, the fifth on 0 … 200, where the fourth just fits', () => {
    expect(lapThatLeaves(step, 0, 198)).toBe(4)
    expect(lapThatLeaves(step, 0, 200)).toBe(5)
    expect(lapThatLeaves(step, 0, 198, 100)).toBe(2)
    expect(lapThatLeaves(step, 0, 198, 148)).toBe(2)
    expect(lapThatLeaves(step, 0, 198, 148.000001)).toBe(1)
    expect(lapThatLeaves(step, 0, 198, 190)).toBe(1)
    expect(lapThatLeaves({ net: -50, low: -50, high: 0 }, 0, 198)).toBe(4)
  })

  it('counts 0.1 four times into 0.4, though 0.3 / 0.1 is 2.9999999999999996 in doubles', () => {
    expect(lapThatLeaves({ net: 0.1, low: 0, high: 0.1 }, 0, 0.4)).toBe(5)
  })

  it('is the first where a round goes beyond the other end or does not fit at all', () => {
    expect(lapThatLeaves({ net: 10, low: -30, high: 60 }, 0, 198, 20)).toBe(1)
    expect(lapThatLeaves({ net: 10, low: -30, high: 60 }, 0, 80)).toBe(1)
  })

  it('never comes where a round that fits comes back', () => {
    expect(lapThatLeaves({ net: 0, low: -5, high: 5 }, 0, 198, 20)).toBe(Infinity)
    expect(lapThatLeaves({ net: 0, low: -5, high: 5 }, 0, 198, 3)).toBe(1)
  })

  it('agrees with going round and round', () => {
    const steps = fc.array(fc.integer({ min: -40, max: 40 }), { minLength: 1, maxLength: 4 })
    fc.assert(fc.property(steps, fc.integer({ min: 0, max: 200 }), (distances, start) => {
      const lap = lapTravel(distances.map((distance, i) => relative(i, distance)))!
      fc.pre(lap.net !== 0)
      let place = start, walked = 0
      for (let inside = true; inside; walked++) {
        for (const distance of distances) {
          place += distance
          inside &&= place >= 0 && place <= 200
        }
      }
      expect(lapThatLeaves(lap, 0, 200, start)).toBe(walked)
    }))
  })

  it('finds no start that lasts longer than the one it counts from', () => {
    const steps = fc.array(fc.integer({ min: -40, max: 40 }), { minLength: 1, maxLength: 4 })
    fc.assert(fc.property(steps, fc.integer({ min: 0, max: 200 }), (distances, start) => {
      const lap = lapTravel(distances.map((distance, i) => relative(i, distance)))!
      fc.pre(lap.net !== 0)
      expect(lapThatLeaves(lap, 0, 200, start)).toBeLessThanOrEqual(lapThatLeaves(lap, 0, 200))
    }))
  })
})

describe('takesNoTime', () => {
  it('holds where nothing moves and nothing waits', () => {
    expect(takesNoTime([absolute(1, 50), relative(2, 0), press(3, 40, 50)])).toBe(true)
    expect(takesNoTime([absolute(1, 50, { next: 1, dwell: 1 })])).toBe(false)
    expect(takesNoTime([absolute(1, 50), absolute(2, 50.000001)])).toBe(false)
    expect(takesNoTime([relative(1, 5), relative(2, -5)])).toBe(false)
  })
})
