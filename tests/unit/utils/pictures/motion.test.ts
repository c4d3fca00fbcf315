import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { motionAt, profile } from '../../../../shared/motion/profile'
import type { Content } from '../../../../shared/settings/types'
import { cruiseSeconds, motionOf } from '../../../../utils/motion'
import { layoutMotion } from '../../../../utils/pictures/motion'
import type { CurveLayout } from '../../../../utils/pictures/time-chart'
import { after, before } from '../../../support/axis-answers'

const was = motionOf(before, 1)
const is = motionOf(after, 1)

describe('motionOf', () => {
  it('sets off where the row before ends, and takes what the arithmetic says', () => {
    // d = 57 mm, v = 250, a = b = 2000: v/a + d/v = 0.125 + 0.228 s. d = 65, v = 320, a = 3200, b = 2000 mm/s².
    expect(was?.start.move).toBe(0)
    expect(was?.profile.duration).toBeCloseTo(0.353, 9)
    expect(is?.profile.duration).toBeCloseTo(320 / 3200 + 320 / 2000 + (65 - 320 ** 2 / 6400 - 320 ** 2 / 4000) / 320, 9)
    expect(is && cruiseSeconds(is.profile.segments, 320)).toBeCloseTo(0.073125, 9)
    expect(is && cruiseSeconds(is.profile.segments, 321)).toBe(0)
  })
  it('knows no motion of an unused row, of a first row, and of a row that is not there', () => {
    const unused: Content = { ...before, moves: before.moves.map(move => move.move === 1 ? { ...move, speed: 0, acceleration: 0 } : move) }
    expect([motionOf(unused, 1), motionOf(before, 99)]).toEqual([undefined, undefined])
    expect(motionOf({ ...before, moves: before.moves.slice(0, 1) }, 0)).toBeUndefined()
  })
})

const curve = (layout: CurveLayout, tone: 'before' | 'after') => layout.curves.find(one => one.tone === tone)?.d ?? ''
const numbersOf = (path: string) => (path.match(/-?\d+(\.\d+)?/g) ?? []).map(Number)

describe('layoutMotion', () => {
  it('draws position as the profile has it, at the joints and at the middle of each piece', () => {
    if (!was || !is) throw new Error('both motions are known')
    const layout = layoutMotion({ what: 'position', before: was.profile, after: is.profile, lines: [] }, 480)
    const [x0 = 0, y0 = 0, ...rest] = numbersOf(curve(layout, 'after'))
    const last = rest.slice(-2)
    const perSecond = ((last[0] ?? 0) - x0) / is.profile.duration
    const perUnit = ((last[1] ?? 0) - y0) / (is.profile.end - is.profile.from)
    let [x, y] = [x0, y0]
    for (let index = 0; index < rest.length; index += 4) {
      const [cx = 0, cy = 0, nx = 0, ny = 0] = rest.slice(index, index + 4)
      const [mx, my] = [(x + 2 * cx + nx) / 4, (y + 2 * cy + ny) / 4]
      expect(my - y0).toBeCloseTo((motionAt(is.profile, (mx - x0) / perSecond).x - is.profile.from) * perUnit, 0)
      ;[x, y] = [nx, ny]
    }
  })

  it('draws both on one time base, the shorter one ending to the left', () => {
    if (!was || !is) throw new Error('both motions are known')
    const layout = layoutMotion({ what: 'speed', before: was.profile, after: is.profile, lines: [{ at: 400, word: 'speed limit' }] }, 480)
    expect(numbersOf(curve(layout, 'after')).at(-2)).toBeLessThan(numbersOf(curve(layout, 'before')).at(-2) ?? 0)
    expect(layout.texts.some(text => text.text === 'speed limit 400')).toBe(true)
    expect(layout.texts.filter(text => text.tone !== 'line').map(text => text.text)).toEqual(['0.333', '0.353'])
  })

  it('never lets the two end times touch, and keeps inside its frame', () => {
    const speeds = fc.double({ min: 1, max: 2000, noNaN: true })
    fc.assert(fc.property(speeds, speeds, fc.double({ min: -500, max: 500, noNaN: true }), fc.integer({ min: 260, max: 900 }), (one, other, target, width) => {
      const of = (speed: number) => profile({ move: 1, kind: 'absolute', target, speed, acceleration: 3000 }, 10)
      const layout = layoutMotion({ what: 'speed', before: of(one), after: of(other), lines: [] }, width)
      const [a, b] = layout.texts.filter(text => text.tone !== 'line')
      if (!a || !b) throw new Error('both end times are written')
      expect(a.y !== b.y || Math.abs(a.x - b.x) >= (a.text.length + b.text.length) / 2 * 7.2).toBe(true)
      for (const path of [curve(layout, 'before'), curve(layout, 'after')]) {
        const numbers = numbersOf(path)
        expect(Math.max(...numbers.filter((_, index) => index % 2 === 0), 0)).toBeLessThanOrEqual(width)
        expect(Math.min(...numbers.filter((_, index) => index % 2 === 1), 999)).toBeGreaterThanOrEqual(0)
      }
    }), { numRuns: 60 })
  })
})
