import { describe, expect, it } from 'vitest'
import type { Content, Move, Setup } from '../../../../shared/settings/types'
import { firstMotion } from '../../../../shared/swap/first-motion'
import { calledMoves } from '../../../../shared/swap/motion-items'
import { atReducedSpeed } from '../../../../shared/swap/reduced'

const absolute = (move: number, target: number, more: Partial<Move> = {}): Move => ({ move, kind: 'absolute', target, speed: 100, acceleration: 1000, ...more })
const relative = (move: number, target: number, more: Partial<Move> = {}): Move => ({ ...absolute(move, target, more), kind: 'relative' })
const content = (moves: readonly Move[], setup: Setup = { softLimitMin: 0, softLimitMax: 180, selectInputs: 4 }): Content => ({ axisKind: 'linear', extra: {}, moves, setup, zones: [] })
const items = (moves: readonly Move[], more: Partial<Parameters<typeof firstMotion>[0]> = {}) => firstMotion({ content: content(moves), flags: [], speedPercent: 10, ...more })
const last = (moves: readonly Move[], more: Partial<Parameters<typeof firstMotion>[0]> = {}) => items(moves, more).at(-1)
const numbers = (moves: readonly Move[]) => calledMoves(moves).map(({ moves: run, endless }) => `${run.map(({ move }) => move).join('→')}${endless ? '…' : ''}`)

describe('what a call sets going', () => {
  it('is a move, or a chain with all that follow', () => {
    expect(numbers([absolute(0, 0), absolute(5, 1, { next: 6 }), absolute(6, 2, { next: 7 }), absolute(7, 3, { next: 8 }), absolute(8, 4)])).toEqual(['0', '5→6→7→8'])
    expect(numbers([absolute(1, 1, { next: 5 }), absolute(2, 2, { next: 5 }), absolute(5, 3)])).toEqual(['1→5', '2→5'])
  })

  it('goes round where the last names one before, a loop that nothing leads into from its lowest number', () => {
    expect(numbers([absolute(1, 1, { next: 2 }), absolute(2, 2, { next: 3 }), absolute(3, 3, { next: 2 })])).toEqual(['1→2→3…'])
    expect(numbers([absolute(7, 1, { next: 4 }), absolute(4, 2, { next: 7 })])).toEqual(['4→7…'])
    expect(numbers([absolute(1, 1, { speed: 0, acceleration: 0 }), absolute(2, 2)])).toEqual(['2'])
  })
})

describe('the first motion', () => {
  it('begins with direction, stops, and the brake where a load can fall', () => {
    expect(items([]).map(({ item }) => item)).toEqual(['jog', 'enable-loss', 'emergency-stop'])
    expect(items([], { flags: ['gravity'] }).map(({ item }) => item)).toEqual(['jog', 'brake-hold', 'enable-loss', 'emergency-stop'])
  })

  it('shows a chain as a chain', () => {
    const chain = [absolute(5, 10, { next: 6 }), absolute(6, 90, { next: 7 }), absolute(7, 30, { next: 8 }), absolute(8, 120)]
    expect(last(chain)).toMatchObject({ item: 'chain-5', kind: 'chain', words: '5→6→7→8 runs by itself, 4 movements, ends at 120 mm.', moves: [5, 6, 7, 8], end: 120, endless: false })
    expect(last([absolute(5, 10, { next: 6 }), absolute(6, 90, { next: 5 })])).toMatchObject({ words: '5→6 runs by itself without end: stop it by calling another move.', endless: true, end: null })
  })

  it('takes its times at the reduced speed: 180 mm at 10 mm/s and 1000 mm/s² take 18.01 s', () => {
    // v/a + d/v = 0.01 + 18; from the farther soft limit.
    expect(last([absolute(3, 180)])?.seconds).toBeCloseTo(18.01, 9)
    expect(last([relative(3, -20)])).toMatchObject({ direction: 'negative', end: null, words: 'Move 3 goes 20 mm towards minus.' })
    expect(last([relative(3, -20)])?.seconds).toBeCloseTo(2.01, 9)
    expect(last([absolute(3, 180)], { content: content([absolute(3, 180)], {}) })?.seconds).toBeNull()
  })

  it('says the way where it does not hang on where the axis stands', () => {
    expect(last([absolute(3, 180)])?.direction).toBe('positive')
    expect(last([absolute(3, 90)])?.direction).toBe('either')
    expect(last([{ move: 2, kind: 'press', approach: 130, target: 150, speed: 100, acceleration: 1000, forceLimit: 38 }])).toMatchObject({ direction: 'positive', words: 'Move 2 presses from 130 mm with 38 %, to 150 mm at most.' })
  })

  it('names the inputs that are on: binary, input 0 weighs 1 (common practice, no source)', () => {
    const plate = { model: 'A', axisKind: 'linear', stroke: 200 } as const
    expect(last([absolute(5, 10)])?.inputs).toEqual([0, 2])
    expect(last([absolute(0, 10)])?.inputs).toEqual([])
    expect(last([absolute(5, 10)], { nameplate: { ...plate, firstMove: 1 } })?.inputs).toEqual([2])
    expect(last([absolute(5, 10)], { nameplate: { ...plate, allOff: 'none' } })?.inputs).toEqual([1, 2])
    expect(last([absolute(16, 10)])?.inputs).toBeNull()
    expect(last([absolute(5, 10)], { content: content([absolute(5, 10)], { selectInputs: 0 }) })?.inputs).toBeNull()
  })
})

describe('the reduced speed', () => {
  it('slows every speed and no acceleration, and leaves empty rows empty', () => {
    const { moves, setup } = atReducedSpeed({ moves: [absolute(1, 5, { speed: 33.333333, pressSpeed: 20 }), absolute(2, 5, { speed: 0, acceleration: 0 })], setup: { pressSpeed: 30, jogSpeed: 50 } }, 10)
    expect(moves).toMatchObject([{ speed: 3.333333, acceleration: 1000, pressSpeed: 2 }, { speed: 0, acceleration: 0 }])
    expect(setup).toEqual({ pressSpeed: 3, jogSpeed: 50 })
    expect(atReducedSpeed({ moves: [absolute(1, 5, { speed: 0.000001 })], setup: {} }, 1).moves[0]?.speed).toBe(0.000001)
  })
})
