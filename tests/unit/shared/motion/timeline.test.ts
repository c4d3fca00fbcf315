import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { profile } from '../../../../shared/motion/profile'
import { lapStart, timeline, type Timeline } from '../../../../shared/motion/timeline'
import type { Move } from '../../../../shared/settings/types'
import { absolute, press, relative, unused } from '../../../support/check-input'

const parts = ({ stretches }: Timeline) => stretches.map(({ move, part }) => `${move} ${part}`)
  .filter((one, index, all) => one !== all[index - 1])

describe('timeline', () => {
  it('strings moves with their dwells: 0.525 + 0.2 + 0.525 s', () => {
    // 100 mm at 250 mm/s and 2000 mm/s²: 2·0.125 s and (100 − 31.25)/250 = 0.275 s.
    const there = timeline([absolute(1, 100, { next: 2, dwell: 200 }), absolute(2, 0)], 0)
    expect(there).toMatchObject({ from: 0, end: 0, atLeast: false })
    expect(there.seconds).toBeCloseTo(1.25, 12)
    expect(there.least).toBe(there.seconds)
    expect(parts(there)).toEqual(['1 move', '1 wait', '2 move'])
  })

  it('goes on from where the row before ends, relative rows too', () => {
    const steps = timeline([absolute(1, 50), relative(2, 20), relative(3, -5)], 10)
    expect(steps.end).toBe(65)
    expect(steps.stretches.find(({ move }) => move === 3)!.x0).toBe(70)
  })

  it('presses from the approach on and holds after it; with the part right there it is over sooner', () => {
    // As in the spec of profile: 0.5201 s to the approach, 5.0025 s on to the target; 300 ms of dwell.
    const pressing = timeline([press(1, 100, 150, { next: 2, dwell: 300 }), absolute(2, 150)], 0)
    expect(parts(pressing)).toEqual(['1 move', '1 press', '1 hold'])
    expect(pressing.seconds).toBeCloseTo(0.5201 + 5.0025 + 0.3, 9)
    expect(pressing.least).toBeCloseTo(0.5201 + 0.3, 9)
  })

  it('adds the smoothing to each move that moves, and says at least where a jerk limit is set', () => {
    const setup = { smoothingTime: 30, jerk: 9000 }
    const smooth = timeline([absolute(1, 100), absolute(2, 100), absolute(3, 0)], 0, { setup })
    expect(smooth.seconds).toBeCloseTo(0.555 + 0 + 0.555, 12)
    expect(smooth.atLeast).toBe(true)
  })

  it('takes no time for nothing, and refuses an unused row', () => {
    expect(timeline([], 7)).toEqual({ stretches: [], from: 7, end: 7, seconds: 0, least: 0, atLeast: false })
    expect(() => timeline([unused(1)], 0)).toThrow(expect.objectContaining({ code: 'unused-row' }))
  })

  it('goes the way round that a modulo axis is told', () => {
    expect(timeline([absolute(1, 10, { turn: 'positive' }), absolute(2, 350, { turn: 'shortest' })], 350, { setup: { modulo: 360 } }).end).toBe(350)
  })

  it('is the profile of a single move', () => {
    const one = profile(press(1, 100, 150), 20)
    expect(timeline([press(1, 100, 150)], 20).stretches.map(({ t0, t1, x0, v0, a }) => ({ t0, t1, x0, v0, a }))).toEqual(one.segments)
  })
})

const above = fc.integer({ min: 1, max: 5000 })
const place = fc.integer({ min: -500, max: 500 })
const anyMove: fc.Arbitrary<Move> = fc.record({
  kind: fc.constantFrom('absolute' as const, 'relative' as const, 'press' as const), target: place, approach: place,
  speed: above, acceleration: above, deceleration: above, pressSpeed: fc.integer({ min: 1, max: 20 }), dwell: fc.integer({ min: 0, max: 500 }),
}).map(({ kind, target, approach, pressSpeed, ...rest }) => kind === 'press'
  ? press(1, approach, target, { pressSpeed, ...rest, next: 1 })
  : { move: 1, kind, target, ...rest, next: 1 })
const anyChain = fc.array(anyMove, { maxLength: 5 })

describe('every timeline', () => {
  it('has no gap in time, no jump in place, and ends where the speeds add up to', () => {
    fc.assert(fc.property(anyChain, place, (chain, from) => {
      const { stretches, end, seconds } = timeline(chain, from)
      let clock = 0, x = from
      for (const { t0, t1, x0, v0, a } of stretches) {
        expect(t0).toBeCloseTo(clock, 9)
        expect(x0).toBeCloseTo(x, 5)
        x = x0 + (v0 + (v0 + a * (t1 - t0))) / 2 * (t1 - t0)
        clock = t1
      }
      expect(x).toBeCloseTo(end, 5)
      expect(clock).toBeCloseTo(seconds, 9)
    }))
  })

  it('covers its way by numeric integration of the speed too', () => {
    fc.assert(fc.property(anyChain, place, (chain, from) => {
      const { stretches, end } = timeline(chain, from)
      let x = from
      for (const { t0, t1, v0, a } of stretches) {
        // Midpoints of 50 slices: exact for a speed that changes evenly, but for what doubles lose.
        const slice = (t1 - t0) / 50
        for (let n = 0; n < 50; n++) x += (v0 + a * (n + 0.5) * slice) * slice
      }
      expect(x).toBeCloseTo(end, 5)
    }), { numRuns: 40 })
  })

  it('is no quicker with less speed, and no slower with more', () => {
    fc.assert(fc.property(anyChain, place, fc.double({ min: 0.1, max: 1, noNaN: true }), (chain, from, part) => {
      const plain = chain.filter(({ kind }) => kind !== 'press')
      const slower = plain.map(move => ({ ...move, speed: move.speed * part }))
      expect(timeline(slower, from).seconds).toBeGreaterThanOrEqual(timeline(plain, from).seconds * (1 - 1e-9))
    }))
  })

  it('takes as long in two pieces as in one', () => {
    fc.assert(fc.property(anyChain, anyChain, place, (first, second, from) => {
      const whole = timeline([...first, ...second], from)
      const head = timeline(first, from)
      expect(whole.seconds).toBeCloseTo(head.seconds + timeline(second, head.end).seconds, 6)
      expect(whole.least).toBeLessThanOrEqual(whole.seconds)
    }))
  })
})

describe('lapStart', () => {
  it('is where the chain ends, wherever it began', () => {
    expect(lapStart([absolute(1, 50), relative(2, 20)])).toBe(70)
    expect(lapStart([relative(1, 20), press(2, 10, 30)])).toBe(30)
    expect(lapStart([relative(1, 20), relative(2, -5)])).toBe(15)
  })

  it('goes by every move where one goes a way round: 350 forwards to 10, 20 on, from 30 back to 350', () => {
    const chain = [absolute(1, 350), absolute(2, 10, { turn: 'positive' }), relative(3, 20), absolute(4, 350, { turn: 'negative' })]
    expect(lapStart(chain, 360)).toBe(350)
    expect(lapStart(chain)).toBe(350)
  })

  it('is where the timeline from there ends again', () => {
    fc.assert(fc.property(anyChain, (chain) => {
      fc.pre(chain.some(({ kind }) => kind !== 'relative'))
      const start = lapStart(chain)
      expect(timeline(chain, start).end).toBe(start)
    }))
  })

  it('counts turns on: 350 → 10 → 350, forwards', () => {
    const chain = [absolute(1, 10, { turn: 'positive' }), absolute(2, 350, { turn: 'positive' })]
    expect(lapStart(chain, 360) % 360).toBe(350)
  })
})
