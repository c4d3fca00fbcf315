import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { distanceOf } from '../../../../shared/motion/distance'
import type { Turn } from '../../../../shared/settings/types'

const to = (target: number, from: number, turn?: Turn, modulo: number | undefined = 360) => distanceOf({ kind: 'absolute', target, turn }, from, modulo)

describe('distanceOf', () => {
  it('is target − place, exact: 212.4 − 198 = 14.4', () => {
    expect(distanceOf({ kind: 'absolute', target: 212.4 }, 198)).toEqual({ distance: 14.4, halfTurn: false })
    expect(distanceOf({ kind: 'relative', target: -5 }, 198).distance).toBe(-5)
    expect(distanceOf({ kind: 'press', target: 100 }, 150).distance).toBe(-50)
  })

  it('is its own distance for a relative move, on a modulo axis as well: half a turn is told by its sign', () => {
    for (const target of [180, -180, 540]) {
      expect(distanceOf({ kind: 'relative', target, turn: 'shortest' }, 10, 360)).toEqual({ distance: target, halfTurn: false })
    }
  })

  it('goes round as turn says: from 350 to 10 deg', () => {
    expect(to(10, 350).distance).toBe(-340)
    expect(to(10, 350, 'signed').distance).toBe(-340)
    expect(to(10, 350, 'positive').distance).toBe(20)
    expect(to(10, 350, 'negative').distance).toBe(-340)
    expect(to(10, 350, 'shortest').distance).toBe(20)
    expect(to(350, 10, 'shortest').distance).toBe(-20)
    expect(to(350, 10, 'negative').distance).toBe(-20)
  })

  it('says that just half a turn is open, and takes the negative way as the formula does', () => {
    expect(to(180, 0, 'shortest')).toEqual({ distance: -180, halfTurn: true })
    expect(to(179.999999, 0, 'shortest')).toEqual({ distance: 179.999999, halfTurn: false })
    expect(to(180.000001, 0, 'shortest')).toEqual({ distance: -179.999999, halfTurn: false })
    expect(to(180, 0, 'positive').halfTurn).toBe(false)
  })

  it('stays where it is already, a full turn away too', () => {
    for (const turn of ['positive', 'negative', 'shortest'] as const) expect(to(370, 10, turn)).toEqual({ distance: 0, halfTurn: false })
    // 0.3 is three times 0.1, which doubles would miss.
    expect(to(0.3, 0, 'positive', 0.1).distance).toBe(0)
  })

  it('asks no turn of an axis without modulo', () => {
    expect(distanceOf({ kind: 'absolute', target: 10, turn: 'positive' }, 350).distance).toBe(-340)
  })

  it('arrives at the target but for full turns, the shortest within half a turn', () => {
    const place = fc.integer({ min: -2000, max: 2000 })
    fc.assert(fc.property(place, place, fc.constantFrom('positive' as const, 'negative' as const, 'shortest' as const), (target, from, turn) => {
      const { distance } = to(target, from, turn)
      expect(Math.abs((from + distance - target) % 360)).toBe(0)
      expect(Math.abs(distance)).toBeLessThanOrEqual(turn === 'shortest' ? 180 : 359)
      if (turn === 'positive') expect(distance).toBeGreaterThanOrEqual(0)
      if (turn === 'negative') expect(distance).toBeLessThanOrEqual(0)
    }))
  })
})
