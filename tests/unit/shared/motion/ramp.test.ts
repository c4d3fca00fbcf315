import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { ramp } from '../../../../shared/motion/ramp'

const drive = { speed: 250, acceleration: 2000, deceleration: 1000, enter: 0, leave: 0 }

describe('ramp', () => {
  it('speeds up, keeps on and brakes: 250 mm/s after 0.125 s and 15.625 mm, braking takes 0.25 s and 31.25 mm', () => {
    // 100 − 15.625 − 31.25 = 53.125 mm at 250 mm/s take 0.2125 s: 0.5875 s in all.
    const { segments, leave, peak } = ramp(100, drive, 10, 2)
    expect(segments).toEqual([
      { t0: 2, t1: 2.125, x0: 10, v0: 0, a: 2000 },
      { t0: 2.125, t1: 2.3375, x0: 25.625, v0: 250, a: 0 },
      { t0: 2.3375, t1: 2.5875, x0: 78.75, v0: 250, a: -1000 },
    ])
    expect({ leave, peak }).toEqual({ leave: 0, peak: 250 })
  })

  it('has no stretch of constant speed where it just reaches it: 15.625 + 31.25 = 46.875 mm', () => {
    const { segments, peak } = ramp(46.875, drive, 0, 0)
    expect(segments.map(({ a }) => a)).toEqual([2000, -1000])
    expect(peak).toBe(250)
  })

  it('drives towards minus with the signs turned', () => {
    const signs = ramp(-100, drive, 10, 0).segments.map(({ v0, a }) => [Math.sign(v0), Math.sign(a)])
    expect(signs.map(pair => pair.map(sign => sign + 0))).toEqual([[0, -1], [-1, 0], [-1, 1]])
  })

  it('leaves slower where there is no room to speed up: √(2·2000·1) = 63.2455532 of the 100 wanted', () => {
    const { segments, leave } = ramp(1, { ...drive, leave: 100 }, 0, 0)
    expect(segments).toHaveLength(1)
    expect(leave).toBeCloseTo(63.2455532, 7)
  })

  it('leaves faster where there is no room to brake: √(100² − 2·1000·3.2) = 60', () => {
    const { segments, leave } = ramp(3.2, { ...drive, enter: 100 }, 0, 0)
    expect(segments).toHaveLength(1)
    expect(leave).toBeCloseTo(60, 12)
    // 100²/(2·1000) = 5 mm are just enough.
    expect(ramp(5, { ...drive, enter: 100 }, 0, 0)).toMatchObject({ leave: 0, peak: 100, segments: [{ t0: 0, t1: 0.1, a: -1000 }] })
  })

  it('does nothing over no distance', () => {
    expect(ramp(0, drive, 5, 1)).toEqual({ segments: [], leave: 0, peak: 0 })
  })

  it('is never faster than asked, joins without gaps, and covers the distance: the area under the speed', () => {
    const above = fc.double({ min: 0.01, max: 1e4, noNaN: true })
    fc.assert(fc.property(fc.double({ min: -1e3, max: 1e3, noNaN: true }), above, above, above, fc.double({ min: 0, max: 1, noNaN: true }), fc.double({ min: 0, max: 1, noNaN: true }),
      (distance, speed, acceleration, deceleration, enterPart, leavePart) => {
        const given = { speed, acceleration, deceleration, enter: enterPart * speed, leave: leavePart * speed }
        const { segments, peak, leave } = ramp(distance, given, 0, 0)
        expect(peak).toBeLessThanOrEqual(speed * (1 + 1e-12))
        let area = 0, clock = 0, place = 0, speedNow = given.enter
        for (const { t0, t1, x0, v0, a } of segments) {
          expect(t0).toBe(clock)
          expect(x0).toBeCloseTo(place, 6)
          expect(Math.abs(v0)).toBeCloseTo(speedNow, 6)
          // The trapezium under the line of speed from v0 to its end.
          area += (v0 + (v0 + a * (t1 - t0))) / 2 * (t1 - t0)
          place = area
          clock = t1
          speedNow = Math.abs(v0 + a * (t1 - t0))
        }
        expect(area).toBeCloseTo(distance, 5)
        if (segments.length > 0) expect(speedNow).toBeCloseTo(leave, 4)
      }))
  })
})
