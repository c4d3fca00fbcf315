import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { windowGrid } from '../../../../shared/checks/window-grid'
import type { Move } from '../../../../shared/settings/types'
import { absolute, judgeInput, linear, plate, press, told, unused } from '../../../support/check-input'

const grid = (inPositionWindow: number | undefined, resolution?: number, repeatability?: number, moves: readonly Move[] = []) =>
  judgeInput(linear({ inPositionWindow }, moves), { nameplate: plate({ resolution, repeatability }) })

describe('window-grid', () => {
  it('is silent for ±0.05 mm on counts of 0.01 mm, repeating to ±0.02 mm', () => {
    expect(told(windowGrid, grid(0.05, 0.01, 0.02))).toEqual([])
  })

  it('warns below two counts: ±0.015 mm < 2 · 0.01 mm', () => {
    const input = grid(0.015, 0.01, 0.01)
    expect(told(windowGrid, input)).toEqual(['warn: The in-position window of ±0.015 mm is less than two counts of 0.01 mm, ±0.02 mm.'])
    expect(windowGrid.judge(input)).toMatchObject([{ at: ['/setup/inPositionWindow'], values: { window: 0.015, least: 0.02, resolution: 0.01 } }])
  })

  it('warns below the repeatability, where the counts are finer', () => {
    expect(told(windowGrid, grid(0.015, 0.001, 0.02))).toEqual(['warn: The in-position window of ±0.015 mm is finer than the ±0.02 mm to which the unit repeats.'])
  })

  it('lets exactly two counts and exactly the repeatability pass', () => {
    expect(told(windowGrid, grid(0.02, 0.01, 0.02))).toEqual([])
    // 2 · 0.1 = 0.2, the setup's own 0.2.
    expect(told(windowGrid, grid(0.2, 0.1, 0.1))).toEqual([])
  })

  it('looks at the windows of moves, presses and unused rows aside', () => {
    const moves = [absolute(1, 10, { window: 0.01 }), press(2, 100, 150, { window: 0.001 }), absolute(3, 10, { window: 0.02 }), { ...unused(4), window: 0.001 }]
    const input = grid(undefined, 0.01, 0.01, moves)
    expect(told(windowGrid, input)).toEqual(['warn: Move 1: a window of ±0.01 mm is less than two counts of 0.01 mm, ±0.02 mm.'])
    expect(windowGrid.judge(input)).toMatchObject([{ at: ['/moves/0/window'], values: { move: 1 } }])
  })

  it('names what is missing, and judges by the other', () => {
    expect(told(windowGrid, grid(0.015, undefined, 0.02))).toEqual([
      'warn: The in-position window of ±0.015 mm is finer than the ±0.02 mm to which the unit repeats.',
      'unknown: How fine the windows are cannot be judged without nameplate.resolution.',
    ])
    expect(windowGrid.judge(judgeInput(linear({ inPositionWindow: 1 })))[0]!.missing).toEqual(['nameplate.resolution', 'nameplate.repeatability'])
  })

  it('does not apply where no window is set', () => {
    expect(told(windowGrid, grid(undefined, 0.01, 0.01, [absolute(1, 10), press(2, 100, 150, { window: 0.001 })]))).toEqual(['not applicable'])
  })

  it('never warns of a wider window where it let a narrower one pass', () => {
    const thousandths = fc.integer({ min: 1, max: 200 }).map(n => n / 1000)
    fc.assert(fc.property(thousandths, thousandths, thousandths, thousandths, (window, more, resolution, repeatability) => {
      if (windowGrid.judge(grid(window, resolution, repeatability)).length === 0) expect(windowGrid.judge(grid(window + more, resolution, repeatability))).toEqual([])
    }))
  })
})
