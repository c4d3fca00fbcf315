import { describe, expect, it } from 'vitest'
import type { Content, Move } from '../../../../shared/settings/types'
import { drivenBack, mayFall } from '../../../../shared/swap/falls'
import { firstMotion } from '../../../../shared/swap/first-motion'
import { calledMoves } from '../../../../shared/swap/motion-items'
import { atReducedSpeed } from '../../../../shared/swap/reduced'

/* What a sheet lists for the first motion. */

const move = (number: number, more: Partial<Move> = {}): Move => ({ move: number, kind: 'absolute', target: 5, speed: 250, acceleration: 2000, ...more })
const content = (moves: readonly Move[], setup: Content['setup'] = {}): Content => ({ axisKind: 'linear', setup, zones: [], extra: {}, moves })

describe('the list of the first motion', () => {
  const list = content([move(0), move(3, { target: 96.5, next: 4 }), move(4, { target: 62, next: 5 }), move(5), move(9, { speed: 0, acceleration: 0 })], { softLimitMin: 0, softLimitMax: 180, pressSpeed: 20 })

  it('begins with jog, brake, enable loss and emergency stop, then each move or chain that is called', () => {
    const items = firstMotion({ content: list, flags: ['gravity'], speedPercent: 10 })
    expect(items.map(({ item }) => item)).toEqual(['jog', 'brake-hold', 'enable-loss', 'emergency-stop', 'move-0', 'chain-3'])
    expect(items.at(-1)).toMatchObject({ moves: [3, 4, 5], words: '3→4→5 runs by itself, 3 movements, ends at 5 mm.', end: 5 })
  })

  it('has no brake where nothing can fall', () => {
    expect(firstMotion({ content: list, flags: [], speedPercent: 10 }).map(({ item }) => item)).not.toContain('brake-hold')
  })

  it('gives times at the reduced speed: 175 mm at 25 mm/s with 2000 mm/s² take 175/25 + 25/2000 s', () => {
    expect(firstMotion({ content: list, flags: [], speedPercent: 10 }).find(({ item }) => item === 'move-0')?.seconds).toBeCloseTo(175 / 25 + 25 / 2000, 9)
  })
})

describe('what it is made of', () => {
  it('slows moves and press speeds, not accelerations', () => {
    const slow = atReducedSpeed(content([move(0, { pressSpeed: 20 })], { pressSpeed: 40 }), 10)
    expect(slow.moves[0]).toMatchObject({ speed: 25, pressSpeed: 2, acceleration: 2000 })
    expect(slow.setup).toEqual({ pressSpeed: 4 })
  })

  it('calls a loop once, by its lowest number', () => {
    expect(calledMoves([move(7, { next: 8 }), move(8, { next: 7 })]).map(({ moves, endless }) => [moves.map(one => one.move), endless])).toEqual([[[7, 8], true]])
  })

  it('tells what can fall', () => {
    expect(mayFall([], content([], { mountingAngle: -90 }))).toBe(true)
    expect(mayFall([], content([]))).toBe(false)
    expect(drivenBack([], content([], { mountingAngle: 90, payloadMass: 6, frictionForce: 100 }))).toBe(false)
    expect(drivenBack([], content([], { mountingAngle: 90, payloadMass: 6, frictionForce: 50 }))).toBe(true)
  })
})
