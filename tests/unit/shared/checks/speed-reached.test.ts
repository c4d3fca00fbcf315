import { describe, expect, it } from 'vitest'
import { speedReached } from '../../../../shared/checks/speed-reached'
import { absolute, judgeInput, linear, press, relative, told, unused } from '../../../support/check-input'

const reached = (...moves: Parameters<typeof linear>[1] & object) => told(speedReached, judgeInput(linear({}, moves)))

describe('speed-reached', () => {
  it('is silent where the way is long enough, to the last bit: 2·250²/(2·2000) = 31.25 mm', () => {
    expect(reached(relative(1, 100))).toEqual([])
    expect(reached(relative(1, 31.25))).toEqual([])
  })

  it('notes what a short way gives: 5 mm at 3000 mm/s² reach √(3000·5) = 122.474487 mm/s', () => {
    const input = judgeInput(linear({}, [relative(1, 5, { acceleration: 3000 })]))
    expect(told(speedReached, input)).toEqual(['note: Move 1 reaches 122.5 of the 250 mm/s asked: its way is too short.'])
    const [found] = speedReached.judge(input)
    expect(found).toMatchObject({ at: ['/moves/0/speed'], values: { move: 1, asked: 250 } })
    expect(found!.values.reached).toBeCloseTo(122.474487, 6)
  })

  it('turns at the way that just reaches it: 31.25 mm do, 31.24 mm reach √(2000·31.24) = 249.96 mm/s', () => {
    expect(reached(relative(1, 31.25))).toEqual([])
    expect(reached(relative(1, 31.24))).toEqual(['note: Move 1 reaches 249.96 of the 250 mm/s asked: its way is too short.'])
    expect(reached(relative(1, -31.25), relative(2, -31.24))).toHaveLength(1)
  })

  it('goes by where a row starts, and by the longest way of several', () => {
    // From 90 to 100: √(2000·10) = 141.42 mm/s; from 50 as well: 50 mm are enough.
    expect(reached(absolute(1, 90, { next: 2 }), absolute(2, 100))).toEqual(['note: Move 2 reaches 141.4 of the 250 mm/s asked: its way is too short.'])
    expect(reached(absolute(1, 90, { next: 3 }), absolute(2, 50, { next: 3 }), absolute(3, 100))).toEqual([])
  })

  it('says nothing where nobody knows how long the way is, and of a move that goes nowhere', () => {
    expect(reached(absolute(1, 100, { speed: 9999 }))).toEqual([])
    expect(reached(absolute(1, 90, { next: 3 }), relative(2, 40, { next: 3 }), absolute(3, 100))).toEqual([])
    expect(reached(relative(1, 0), absolute(2, 50, { next: 3 }), absolute(3, 50))).toEqual([])
  })

  it('looks at a press on its way to the approach: 10 mm, vk² = (8e7 + 2e5)/4000 = 20050', () => {
    expect(reached(absolute(1, 90, { next: 2 }), press(2, 100, 150))).toEqual(['note: Move 2 reaches 141.6 of the 250 mm/s asked: its way is too short.'])
  })

  it('does not apply without moves', () => {
    expect(reached(unused(1))).toEqual(['not applicable'])
  })
})
