import { describe, expect, it } from 'vitest'
import { chainAfterPress } from '../../../../shared/checks/chain-after-press'
import { absolute, judgeInput, limits, linear, press, relative, told, unused } from '../../../support/check-input'

type Moves = Parameters<typeof linear>[1] & object
const after = (...moves: Moves) => told(chainAfterPress, judgeInput(linear(limits, moves)))

describe('chain-after-press', () => {
  it('notes that a follower starts where the press ended', () => {
    const moves = [press(2, 100, 150, { next: 3 }), absolute(3, 10)]
    expect(after(...moves)).toEqual(['note: Move 3 starts when press 2 ends, between 100 mm and 150 mm.'])
    expect(chainAfterPress.judge(judgeInput(linear(limits, moves)))).toMatchObject([{ at: ['/moves/0/next'], values: { move: 2, next: 3, approach: 100, target: 150 } }])
  })

  it('adds where a relative follower gets to', () => {
    expect(after(press(2, 100, 150, { next: 3 }), relative(3, -20))).toEqual(['note: Move 3 starts when press 2 ends, between 100 mm and 150 mm: it ends −20 mm from there.'])
  })

  it('tells a press that follows itself, and each of several: the border of what follows', () => {
    expect(after(press(2, 100, 150, { next: 2 }), press(4, 100, 150, { next: 2 }))).toHaveLength(2)
  })

  it('names the furthest place where the approach is not known', () => {
    expect(after(press(2, 100, 150, { next: 3, approach: undefined }), absolute(3, 10))).toEqual(['note: Move 3 starts when press 2 ends, at 150 mm at the latest.'])
  })

  it('leaves followers that are not there to chain-target', () => {
    expect(after(press(2, 100, 150, { next: 9 }), press(4, 100, 150, { next: 5 }), unused(5))).toEqual([])
  })

  it('does not apply to presses that nothing follows, nor to chains without a press', () => {
    expect(after(press(2, 100, 150), absolute(3, 10, { next: 2 }))).toEqual(['not applicable'])
    expect(after(absolute(3, 10, { next: 4 }), absolute(4, 0))).toEqual(['not applicable'])
  })
})
