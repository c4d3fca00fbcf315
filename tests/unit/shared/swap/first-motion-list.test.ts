import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { Move, Setup } from '../../../../shared/settings/types'
import { firstMotion, type FirstMotionCase } from '../../../../shared/swap/first-motion'
import { calledMoves } from '../../../../shared/swap/motion-items'
import { absolute, limits, linear, plate, press, relative, rotary, unused } from '../../../support/check-input'

const motion = (moves: readonly Move[], setup: Setup = limits, more: Partial<FirstMotionCase> = {}) => firstMotion({ content: linear(setup, moves), flags: [], speedPercent: 10, ...more })
const last = (...of: Parameters<typeof motion>) => motion(...of).at(-1)
const seconds = (...of: Parameters<typeof motion>) => last(...of)?.seconds ?? NaN

describe('the four that come before any move', () => {
  it('have a sentence each, and neither end nor time', () => {
    const four = motion([], limits, { flags: ['gravity'] })
    expect(four.map(({ kind, words }) => `${kind}: ${words}`)).toEqual([
      'jog: Jog a little both ways: the axis goes the way that counts up, and the position with it.',
      'brake-hold: Take the enable away at rest: the load stays where it is.',
      'enable-loss: Take the enable away while it jogs: it stops as it should, and stays.',
      'emergency-stop: Press emergency stop while it jogs: it stops, and does not start again by itself.',
    ])
    for (const item of four) expect(item).toMatchObject({ item: item.kind, moves: [], endless: false, end: null, seconds: null, atLeast: false, inputs: null })
    expect(four.map(({ direction }) => direction)).toEqual(['either', null, null, null])
  })

  it('ask for the brake where gravity drives the axis back, by the values as well as by the flag', () => {
    const steep: Setup = { ...limits, mountingAngle: 90, payloadMass: 2, frictionForce: 20 }
    // 2 kg pull 19.6 N, less than the friction; with the 1 kg of the moving part 29.4 N, more.
    expect(motion([], steep).map(({ kind }) => kind)).not.toContain('brake-hold')
    expect(motion([], steep, { nameplate: plate({ movingMass: 1 }) }).map(({ kind }) => kind)).toContain('brake-hold')
  })
})

describe('times at the reduced speed, from the farther soft limit', () => {
  // t = v/a + d/v where the speed is reached, else 2·√(d/a); soft limits 0 and 198 mm.
  it.each([
    ['10 %: 25 mm/s, 198 mm', 10, 7.9325], // 0.0125 + 7.92
    ['50 %: 125 mm/s', 50, 1.6465], // 0.0625 + 1.584
    ['100 %: 250 mm/s', 100, 0.917], // 0.125 + 0.792
  ])('%s', (_words, speedPercent, expected) => expect(seconds([absolute(1, 0)], limits, { speedPercent })).toBeCloseTo(expected, 9))

  it('a way too short for the speed: 20 mm at 2000 mm/s² take 2·√0.01 = 0.2 s', () => {
    // The speed would be reached after 250²/2000 = 31.25 mm.
    expect(seconds([relative(1, 20)], limits, { speedPercent: 100 })).toBeCloseTo(0.2, 9)
  })

  it('a press: down to its press speed at the approach, then on without a part', () => {
    // At 10 %: v 25, w 1 mm/s, a 2000: to 150 mm 0.0125 + 0.012 + (150 − 0.15625 − 0.156)/25 = 6.01201 s, then 20 mm: (20 − 0.00025)/1 + 0.0005 = 20.00025 s.
    expect(seconds([press(1, 150, 170)])).toBeCloseTo(26.01226, 8)
    // From rest at the approach it speeds up once more: 20 mm/1 + 1/2000, after 150/25 + 25/2000.
    expect(seconds([press(1, 150, 170)], limits, { nameplate: plate({ stopsAtApproach: true }) })).toBeCloseTo(26.013, 8)
  })

  it('a chain: each movement, its smoothing and the dwell before the next', () => {
    const chain = [absolute(1, 99, { next: 2, dwell: 500 }), relative(2, 50)]
    // 99 mm from either end: 0.0125 + 3.96, dwell 0.5, then 0.0125 + 2; smoothing 40 ms twice.
    expect(seconds(chain)).toBeCloseTo(6.485, 9)
    expect(seconds(chain, { ...limits, smoothingTime: 40 })).toBeCloseTo(6.565, 9)
  })

  it('an endless chain: one lap from where it comes round', () => {
    // 20 to 120 and back at 25 mm/s: twice 0.0125 + 4.
    expect(last([absolute(1, 20, { next: 2 }), absolute(2, 120, { next: 1 })])).toMatchObject({ endless: true, end: null, kind: 'chain', item: 'chain-1' })
    expect(seconds([absolute(1, 20, { next: 2 }), absolute(2, 120, { next: 1 })])).toBeCloseTo(8.025, 9)
  })

  it('are at least so long where a jerk limit makes them longer', () => {
    expect([last([absolute(1, 0)])?.atLeast, last([absolute(1, 0)], { ...limits, jerk: 5000 })?.atLeast]).toEqual([false, true])
  })

  it('never grow when more of the speed is allowed', () => fc.assert(fc.property(
    fc.integer({ min: 0, max: 198 }), fc.integer({ min: 1, max: 100 }), fc.integer({ min: 1, max: 100 }), (target, one, other) => {
      const at = (speedPercent: number) => seconds([absolute(1, target)], limits, { speedPercent })
      expect(at(Math.max(one, other))).toBeLessThanOrEqual(at(Math.min(one, other)) + 1e-9)
    },
  )))
})

describe('what is said of a move', () => {
  it('one that is alone in its loop runs without end', () => {
    expect(last([relative(3, 5, { next: 3 })])).toMatchObject({ item: 'move-3', kind: 'move', words: '3 runs by itself without end: stop it by calling another move.', endless: true, moves: [3] })
  })

  it('ends where its last place is, wherever it begins; relative moves alone end nowhere that is known', () => {
    expect(last([absolute(1, 20, { next: 2 }), relative(2, 15)])).toMatchObject({ end: 35, words: '1→2 runs by itself, 2 movements, ends at 35 mm.' })
    expect(last([relative(1, 15, { next: 2 }), absolute(2, 20)])).toMatchObject({ end: 20, words: '1→2 runs by itself, 2 movements, ends at 20 mm.' })
    expect(last([relative(1, 15, { next: 2 }), relative(2, 20)])).toMatchObject({ end: null, words: '1→2 runs by itself, 2 movements.' })
    expect(last([absolute(1, 20)], { softLimitMax: 198 })).toMatchObject({ end: null, seconds: null, atLeast: false })
  })

  it('on a turning axis ends within the turn', () => {
    const turn = (target: number, more: Partial<Move> = {}) => firstMotion({ content: rotary({ modulo: 360 }, [absolute(1, target, more)]), flags: [], speedPercent: 10 }).at(-1)
    expect([turn(90, { turn: 'positive' })?.end, turn(90, { turn: 'shortest' })?.end, turn(450)?.end, turn(-90)?.end]).toEqual([90, 90, 90, 270])
    expect(turn(90)?.words).toBe('Move 1 goes to 90 deg.')
  })

  it('its words tell the kinds apart', () => {
    const words = (move: Move) => last([move])?.words
    expect(words(absolute(4, -3))).toBe('Move 4 goes to −3 mm.')
    expect(words(relative(4, 0.5))).toBe('Move 4 goes 0.5 mm towards plus.')
    expect(words(press(4, 120, 150))).toBe('Move 4 presses from 120 mm with 30 %, to 150 mm at most.')
  })

  it('the way is said where it is one from everywhere', () => {
    const way = (...of: Parameters<typeof motion>) => last(...of)?.direction
    expect([way([absolute(1, 0)]), way([absolute(1, 198)]), way([absolute(1, 99)])]).toEqual(['negative', 'positive', 'either'])
    expect([way([relative(1, 5)]), way([relative(1, -5)]), way([relative(1, 0)])]).toEqual(['positive', 'negative', null])
    expect([way([press(1, 120, 150)]), way([press(1, 150, 120)]), way([press(1, 150, 150)])]).toEqual(['positive', 'negative', null])
    expect(way([absolute(1, 0)], {})).toBe('either')
    // A lap of 1→2 begins at 120 mm, but whoever calls it may stand at 0 as well.
    expect(way([absolute(1, 20, { next: 2 }), absolute(2, 120, { next: 1 })])).toBe('either')
  })

  it('slow speeds of the setup count too: a press that names none of its own', () => {
    // At 10 %: v 25, w 4 mm/s, a 2000: 0.0125 + 0.0105 + (150 − 0.15625 − 0.15225)/25 = 6.01066 s, then (20 − 0.004)/4 + 0.002 = 5.001 s.
    const { pressSpeed: _none, ...bare } = press(1, 150, 170)
    expect(seconds([bare], { ...limits, pressSpeed: 40 })).toBeCloseTo(11.01166, 9)
  })
})

describe('which inputs are on', () => {
  it('their weights add up to the code, for every number of inputs, first move and meaning of none (common practice, no source)', () => {
    for (const selectInputs of [0, 1, 2, 3, 4, 5]) for (const firstMove of [0, 1] as const) for (const allOff of ['first', 'none', 'home'] as const) {
      const table = Array.from({ length: 40 }, (_, move) => absolute(move, 10))
      const items = motion(table, { ...limits, selectInputs }, { nameplate: plate({ firstMove, allOff }) }).filter(({ kind }) => kind === 'move')
      for (const { inputs, moves: [move = NaN] } of items) {
        const code = move - firstMove + (allOff === 'first' ? 0 : 1)
        const can = selectInputs > 0 && code >= (allOff === 'first' ? 0 : 1) && code <= 2 ** selectInputs - 1
        expect(inputs === null ? null : inputs.reduce((sum, input) => sum + 2 ** input, 0), `${move} of ${selectInputs}`).toBe(can ? code : null)
      }
    }
  })
})

describe('the calls of any table', () => {
  const rows = fc.uniqueArray(fc.record({ move: fc.nat(9), next: fc.option(fc.nat(11), { nil: undefined }), empty: fc.integer({ min: 0, max: 5 }).map(one => one === 0) }), { selector: row => row.move })
    .map(list => list.map(({ move, next, empty }) => empty ? unused(move) : absolute(move, move, next === undefined ? {} : { next })))

  it('follow `next` row by row, begin where nothing leads in, leave no used row out and come in order', () => fc.assert(fc.property(rows, (moves) => {
    const used = moves.filter(({ speed }) => speed > 0)
    const calls = calledMoves(moves)
    const firsts = calls.map(call => call.moves[0]?.move ?? NaN)
    expect(firsts).toEqual([...firsts].sort((a, b) => a - b))
    expect([...new Set(calls.flatMap(call => call.moves.map(({ move }) => move)))].sort()).toEqual(used.map(({ move }) => move).sort())
    for (const call of calls) {
      const numbers = call.moves.map(({ move }) => move)
      expect(call.moves.slice(0, -1).map(({ next }) => next)).toEqual(numbers.slice(1))
      const after = used.find(({ move }) => move === call.moves.at(-1)?.next)
      expect(call.endless).toBe(after !== undefined)
      if (after) expect(numbers).toContain(after.move)
      const led = used.some(({ next }) => next === numbers[0])
      // Only a loop that nothing leads into begins at a row that another names: at its lowest.
      if (led) expect(numbers[0]).toBe(Math.min(...numbers))
    }
    for (const { move } of used.filter(row => !used.some(({ next }) => next === row.move))) expect(firsts).toContain(move)
  })))
})
