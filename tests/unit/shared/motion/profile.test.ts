import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { motionAt, moveTime, profile } from '../../../../shared/motion/profile'
import type { Move } from '../../../../shared/settings/types'
import { absolute, press, relative, unused } from '../../../support/check-input'

const rest = (d: number, v: number, a: number, b: number) => profile(relative(1, d, { speed: v, acceleration: a, deceleration: b }), 0)

describe('rest to rest', () => {
  it('agrees with a published trapezium', () => {
    // github Pigmice2733/robolib, StaticProfileTest.TrapezoidalTest (commit e688bbe56faa): d 16, v 4, a 2, b 1.
    const move = rest(16, 4, 2, 1)
    expect(move.duration).toBeCloseTo(7, 9)
    for (const [t, x] of [[1.5, 2.25], [2, 4], [3, 8], [6, 15.5], [6.5, 15.875], [7, 16]] as const) expect(motionAt(move, t).x).toBeCloseTo(x, 9)
    expect(motionAt(move, 1.5).v).toBeCloseTo(3, 9)
    expect(motionAt(move, 6.5).v).toBeCloseTo(0.5, 9)
  })

  it('agrees with a published triangle, either way', () => {
    // Same file, TriangularTest and ReverseTriangularTest: d ±35.69, v 9 not reached, a 2, b 2.15.
    const move = rest(35.69, 9, 2, 2.15)
    expect(move.duration).toBeCloseTo(8.3, 9)
    expect(move.peakSpeed).toBeCloseTo(8.6, 9)
    expect(motionAt(move, 4.3).x).toBeCloseTo(18.49, 9)
    expect(motionAt(move, 6.3).v).toBeCloseTo(4.3, 9)
    const back = rest(-35.69, 9, 2, 2.15)
    expect(back.duration).toBeCloseTo(8.3, 9)
    expect(motionAt(back, 4).v).toBeCloseTo(-8, 9)
    expect(motionAt(back, 4.3).x).toBeCloseTo(-18.49, 9)
  })

  it('agrees with a second published trapezium', () => {
    // github ShisatoYano/AutonomousVehicleControlBeginnersGuide, test_trapezoidal_speed_profile.py (commit 133524574e43): 5 s each.
    expect(rest(100, 10, 2, 2).segments.map(({ t0, t1 }) => t1 - t0)).toEqual([5, 5, 5])
  })

  it('agrees with an automation textbook, chapter on motion profiles: 80 deg with 10 deg/s and 20 deg/s² take 8.5 s', () => {
    const move = rest(-80, 10, 20, 20)
    expect(move.segments.map(({ t0, t1 }) => Number((t1 - t0).toFixed(9)))).toEqual([0.5, 7.5, 0.5])
  })

  it('agrees with "How to Pick Motors for Linear Motion", Machine Design, 7 Aug 2013: a third each, 3·S/(2·t) = 0.3 m/s', () => {
    // 0.2 m in 1 s; v = 300 mm/s reached in 1/3 s is 900 mm/s².
    const move = rest(200, 300, 900, 900)
    expect(move.duration).toBeCloseTo(1, 12)
    expect(move.segments.map(({ t0, t1 }) => t1 - t0)).toEqual([expect.closeTo(1 / 3, 12), expect.closeTo(1 / 3, 12), expect.closeTo(1 / 3, 12)])
  })

  it('agrees with a road: OpenStax University Physics 1, Example 3.10: 30 m/s stop in 64.3 m at 7 m/s² and in 90.0 m at 5 m/s²', () => {
    for (const [deceleration, stop] of [[7, 64.3], [5, 90]] as const) {
      const { segments, end } = rest(1000, 30, 10, deceleration)
      expect(Math.abs(end - segments[2]!.x0 - stop)).toBeLessThanOrEqual(0.05)
    }
  })

  it('takes the deceleration from the acceleration where the row has none, and starts where it stands', () => {
    // 250 mm/s at 2000 mm/s²: 0.125 s and 15.625 mm each; (100 − 31.25)/250 = 0.275 s between.
    const move = profile(absolute(1, 150), 50)
    expect(move).toMatchObject({ from: 50, end: 150, brakesInTime: true, halfTurn: false })
    expect(move.duration).toBeCloseTo(0.525, 12)
  })

  it('takes no time where it is there already', () => {
    expect(profile(absolute(1, 50), 50)).toMatchObject({ segments: [], duration: 0, end: 50, peakSpeed: 0 })
    expect(motionAt(profile(absolute(1, 50), 50), 0)).toEqual({ x: 50, v: 0 })
  })

  it('goes the way round that turn says, and tells an open half turn', () => {
    const around = { setup: { modulo: 360 } }
    expect(profile(absolute(1, 10, { turn: 'positive' }), 350, around)).toMatchObject({ end: 370 })
    expect(profile(absolute(1, 180, { turn: 'shortest' }), 0, around)).toMatchObject({ end: -180, halfTurn: true })
  })

  it('refuses an unused row', () => {
    expect(() => profile(unused(3), 0)).toThrow(expect.objectContaining({ code: 'unused-row' }))
  })
})

describe('press', () => {
  it('slows to press speed at the approach and stops at its target', () => {
    // 0 → 100 at 250, down to 10: 15.625 mm and 0.125 s up; (250² − 10²)/4000 = 15.6 mm and 0.12 s down;
    // 68.775 mm at 250: 0.2751 s → 0.5201 s. Then 50 mm: 10²/4000 = 0.025 mm and 0.005 s to brake, 49.975 mm at 10: 4.9975 s.
    const move = profile(press(1, 100, 150), 0)
    expect(move.approachAt).toBeCloseTo(0.5201, 9)
    expect(move.duration).toBeCloseTo(0.5201 + 4.9975 + 0.005, 9)
    expect(motionAt(move, move.approachAt!).x).toBeCloseTo(100, 9)
    expect(motionAt(move, move.approachAt!).v).toBeCloseTo(10, 9)
    expect(move).toMatchObject({ end: 150, peakSpeed: 250, brakesInTime: true })
  })

  it('rests at the approach where the unit does so', () => {
    // 0.125 + 0.125 + 68.75/250 = 0.525 s; then 0 → 10 → 0 over 50 mm: 0.005 + 0.005 + (50 − 0.05)/10 = 5.005 s.
    const move = profile(press(1, 100, 150), 0, { stopsAtApproach: true })
    expect(move.approachAt).toBeCloseTo(0.525, 9)
    expect(motionAt(move, move.approachAt!).v).toBeCloseTo(0, 9)
    expect(move.duration).toBeCloseTo(0.525 + 5.005, 9)
  })

  it('does not reach its speed on a short way to the approach: vk² = (2·a·b·d1 + a·w²)/(a + b)', () => {
    // d1 = 10, a = b = 2000, w = 10: vk² = (8e7 + 2e5)/4000 = 20050, vk = 141.598; t1 = vk/a + (vk − w)/b = 0.136598 s.
    const move = profile(press(1, 10, 50), 0)
    expect(move.peakSpeed).toBeCloseTo(Math.sqrt(20050), 9)
    expect(move.approachAt).toBeCloseTo((2 * Math.sqrt(20050) - 10) / 2000, 9)
  })

  it('starts the press part slower where the way does not even give the press speed: √(2·2000·0.01) = 6.3245553', () => {
    // From there to 10: (100 − 40)/4000 = 0.015 mm, 0.0018377 s.
    const move = profile(press(1, 0.01, 50), 0)
    expect(motionAt(move, move.approachAt!).v).toBeCloseTo(Math.sqrt(40), 9)
    expect(move.peakSpeed).toBe(10)
    expect(move.duration).toBeCloseTo(Math.sqrt(40) / 2000 + (10 - Math.sqrt(40)) / 2000 + (49.99 - 0.015 - 0.025) / 10 + 0.005, 9)
  })

  it('says where it cannot brake before its target: 10²/4000 = 0.025 mm are just enough', () => {
    expect(profile(press(1, 100, 100.025), 0).brakesInTime).toBe(true)
    expect(profile(press(1, 100, 100.024), 0).brakesInTime).toBe(false)
  })

  it('takes the press speed of the setup, and ends at its approach without one', () => {
    const bare = press(1, 100, 150, { pressSpeed: undefined })
    expect(profile(bare, 0, { setup: { pressSpeed: 10 } })).toEqual(profile(press(1, 100, 150), 0))
    expect(profile(bare, 0)).toMatchObject({ end: 100, brakesInTime: true })
  })

  it('comes to rest before it turns round, and begins at once on its approach', () => {
    const turning = profile(press(1, 100, 50), 0)
    expect(motionAt(turning, turning.approachAt!).v).toBeCloseTo(0, 9)
    expect(turning.end).toBe(50)
    expect(profile(press(1, 100, 150), 100)).toMatchObject({ approachAt: 0, peakSpeed: 10, from: 100 })
  })
})

describe('ramps of published motions', () => {
  it('agrees with OpenStax University Physics 1, section 3.4, Examples 3.8 and 3.9: 26.0 m/s² from rest for 5.56 s: 402 m; over 402 m: 145 m/s', () => {
    const away = rest(1e6, 1e5, 26, 26)
    expect(Math.abs(motionAt(away, 5.56).x - 402)).toBeLessThanOrEqual(0.5)
    expect(Math.abs(rest(804, 1e5, 26, 26).peakSpeed - 145)).toBeLessThanOrEqual(0.5)
  })

  it('agrees with the same section, Example 3.7: 70.0 m/s braked by 1.50 m/s² for 40.0 s are 10.0 m/s', () => {
    const landing = rest(1e5, 70, 100, 1.5)
    const braking = landing.segments.at(-1)!
    expect(Math.abs(motionAt(landing, braking.t0 + 40).v - 10)).toBeLessThanOrEqual(0.05)
  })

  it('agrees with OpenStax College Physics 2e, section 2.5, commuter train: 80.0 km/h, 1.35 and 1.65 m/s²: 16.5 s and 13.5 s', () => {
    const [up, , down] = rest(2000, 80 / 3.6, 1.35, 1.65).segments.map(({ t0, t1 }) => t1 - t0)
    expect(Math.abs(up! - 16.5)).toBeLessThanOrEqual(0.05)
    expect(Math.abs(down! - 13.5)).toBeLessThanOrEqual(0.05)
  })

  it('agrees with an article on speed profiles of cylinders: 43.6 in in 2.15 s with ramps of 0.3 and 0.45 s: 1.4 s at 24.56 in/s', () => {
    // Its provenance is weak; v = 43.6/(1.4 + (0.3 + 0.45)/2) = 24.5633803 in/s.
    const v = 43.6 / (1.4 + 0.375)
    expect(Math.abs(v - 24.56)).toBeLessThanOrEqual(0.005)
    const move = rest(43.6, v, v / 0.3, v / 0.45)
    expect(move.duration).toBeCloseTo(2.15, 6)
    expect(move.segments[1]!.t1 - move.segments[1]!.t0).toBeCloseTo(1.4, 6)
  })
})

describe('from triangle to trapezium', () => {
  const above = fc.integer({ min: 1, max: 3000 })

  it('is one profile where the speed is just reached: 2·250²/(2·3000) = 20.8333 mm take 0.1666667 s', () => {
    expect(rest(20.833333, 250, 3000, 3000).duration).toBeCloseTo(0.1666667, 6)
    expect(rest(20.833334, 250, 3000, 3000).duration).toBeCloseTo(0.1666667, 6)
  })

  it('changes neither time nor peak by a jump', () => {
    fc.assert(fc.property(above, above, above, (v, a, b) => {
      const border = v ** 2 / (2 * a) + v ** 2 / (2 * b)
      fc.pre(border > 0.01)
      const [less, more] = [rest(border - 1e-4, v, a, b), rest(border + 1e-4, v, a, b)]
      expect(more.duration - less.duration).toBeGreaterThanOrEqual(-1e-9)
      expect(more.duration - less.duration).toBeLessThan(5e-4 / v + 1e-6)
      expect(more.peakSpeed - less.peakSpeed).toBeLessThan(v * 0.01)
    }))
  })

  it('takes less time with every limit that rises', () => {
    fc.assert(fc.property(fc.integer({ min: 1, max: 900 }), above, above, above, fc.constantFrom(0, 1, 2), fc.integer({ min: 1, max: 2000 }), (d, v, a, b, which, more) => {
      const raised = [v, a, b].map((value, index) => index === which ? value + more : value) as [number, number, number]
      expect(rest(d, ...raised).duration).toBeLessThanOrEqual(rest(d, v, a, b).duration * (1 + 1e-9))
    }))
  })
})

describe('every press', () => {
  const above = fc.integer({ min: 1, max: 3000 })

  it('goes from approach to target in (D − w²/2b)/w + w/b without a part, with its speed there', () => {
    fc.assert(fc.property(above, above, fc.integer({ min: 1, max: 30 }), fc.integer({ min: 1, max: 100 }), (speed, deceleration, w, D) => {
      fc.pre(speed > w && w ** 2 / (2 * deceleration) < D && w ** 2 / 4000 < 100)
      const { duration, approachAt } = profile(press(1, 100, 100 + D, { speed, deceleration, pressSpeed: w }), 0)
      expect(duration - approachAt!).toBeCloseTo((D - w ** 2 / (2 * deceleration)) / w + w / deceleration, 6)
    }))
  })

  it('reaches its approach in v/a + (v − w)/b + (d1 − v²/2a − (v² − w²)/2b)/v where the way is long', () => {
    fc.assert(fc.property(fc.integer({ min: 30, max: 300 }), above, above, fc.integer({ min: 1, max: 29 }), (v, a, b, w) => {
      const up = v ** 2 / (2 * a), down = (v ** 2 - w ** 2) / (2 * b)
      const d1 = Math.ceil(up + down) + 5
      const { approachAt } = profile(press(1, d1, d1 + 900, { speed: v, acceleration: a, deceleration: b, pressSpeed: w }), 0)
      expect(approachAt).toBeCloseTo(v / a + (v - w) / b + (d1 - up - down) / v, 6)
    }))
  })

  it('leaves its target with √(w² − 2bD) where it cannot brake before it', () => {
    // w = 30, b = 100: 4.5 mm are needed, D = 2.5 leaves √(900 − 500) = 20 mm/s.
    const move = profile(press(1, 100, 102.5, { pressSpeed: 30, deceleration: 100 }), 0)
    const last = move.segments.at(-1)!
    expect(move.brakesInTime).toBe(false)
    expect(last.v0 + last.a * (last.t1 - last.t0)).toBeCloseTo(20, 9)
  })
})

describe('every profile', () => {
  const above = fc.integer({ min: 1, max: 5000 })
  const place = fc.integer({ min: -500_000, max: 500_000 }).map(n => n / 1000)
  const anyMove: fc.Arbitrary<Move> = fc.record({ kind: fc.constantFrom('absolute' as const, 'relative' as const, 'press' as const), target: place, approach: place, speed: above, acceleration: above, deceleration: above, pressSpeed: above })
    .map(({ approach, pressSpeed, ...move }) => move.kind === 'press' ? { move: 1, approach, pressSpeed, ...move } : { move: 1, ...move })

  it('covers its way: the area under the speed is end − from, without a gap or a jump', () => {
    fc.assert(fc.property(anyMove, place, fc.boolean(), (move, from, stopsAtApproach) => {
      const { segments, end, duration, peakSpeed, brakesInTime } = profile(move, from, { stopsAtApproach })
      let clock = 0, x = from, v = 0
      for (const segment of segments) {
        expect(segment.t0).toBe(clock)
        expect(segment.x0).toBeCloseTo(x, 6)
        expect(segment.v0).toBeCloseTo(v, 5)
        const time = segment.t1 - segment.t0
        x += (segment.v0 + segment.v0 + segment.a * time) / 2 * time
        v = segment.v0 + segment.a * time
        expect(Math.max(Math.abs(segment.v0), Math.abs(v))).toBeLessThanOrEqual(peakSpeed * (1 + 1e-9) + 1e-9)
        clock = segment.t1
      }
      expect(x).toBeCloseTo(end, 5)
      expect(duration).toBe(clock)
      if (brakesInTime) expect(v).toBeCloseTo(0, 4)
    }))
  })

  it('takes as long the other way', () => {
    fc.assert(fc.property(anyMove, place, (move, from) => {
      const mirrored = { ...move, target: -move.target, ...move.approach === undefined ? {} : { approach: -move.approach } }
      expect(profile(mirrored, -from).duration).toBe(profile(move, from).duration)
    }))
  })

  it('is no quicker with less speed', () => {
    fc.assert(fc.property(anyMove, place, above, (move, from, less) => {
      fc.pre(move.kind !== 'press')
      const slower = { ...move, speed: Math.min(move.speed, less) }
      expect(profile(slower, from).duration).toBeGreaterThanOrEqual(profile(move, from).duration * (1 - 1e-12))
    }))
  })
})

describe('moveTime', () => {
  const move = profile(absolute(1, 100), 0)

  it('adds the smoothing, in milliseconds, to what moves', () => {
    expect(moveTime(move, { smoothingTime: 30 }).seconds).toBeCloseTo(move.duration + 0.03, 12)
    expect(moveTime(profile(absolute(1, 0), 0), { smoothingTime: 30 }).seconds).toBe(0)
  })

  it('says at least where a jerk limit is set', () => {
    expect(moveTime(move, { jerk: 9000 })).toEqual({ seconds: move.duration, atLeast: true })
    expect(moveTime(move, {}).atLeast).toBe(false)
  })
})

describe('motionAt', () => {
  it('rests before the start and after the end', () => {
    const move = profile(absolute(1, 150), 50)
    expect(motionAt(move, -1)).toEqual({ x: 50, v: 0 })
    expect(motionAt(move, 99)).toEqual({ x: 150, v: 0 })
  })
})
