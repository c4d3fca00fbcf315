import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { targetGrid } from '../../../../shared/checks/target-grid'
import type { Nameplate } from '../../../../shared/settings/nameplate'
import type { Move, Setup } from '../../../../shared/settings/types'
import { absolute, judgeInput, linear, plate, press, relative, told, unused } from '../../../support/check-input'

const grid = (moves: readonly Move[], more: Partial<Nameplate> = {}, setup: Setup = { inPositionWindow: 0.05 }) =>
  judgeInput(linear(setup, moves), { nameplate: plate({ resolution: 0.1, repeatability: 0.1, ...more }) })

describe('target-grid', () => {
  it('is silent for 10.3 mm on counts of 0.1 mm, whatever binary noise a division leaves', () => {
    expect(told(targetGrid, grid([absolute(1, 10.3), absolute(2, 0), relative(3, -0.7)]))).toEqual([])
  })

  it('notes 10.03 mm, 0.03 mm off 10.0 where half the window is 0.025 mm', () => {
    const input = grid([absolute(1, 10.03)])
    expect(told(targetGrid, input)).toEqual([
      'note: Move 1 has its target between counts of 0.1 mm: to 10.03 mm it ends up to 0.03 mm off, more than the 0.025 mm that pass unseen.',
    ])
    const { at, values } = targetGrid.judge(input)[0]!
    expect(at).toEqual(['/moves/0/target'])
    expect(values).toMatchObject({ moves: [1], worst: 1, bound: 0.025, resolution: 0.1 })
    expect(values.off).toBeCloseTo(0.03, 9)
  })

  it('lets just half the window pass: 10.025 mm is 0.025 mm off', () => {
    expect(told(targetGrid, grid([absolute(1, 10.025)]))).toEqual([])
    expect(told(targetGrid, grid([absolute(1, 10.025001)]))).toHaveLength(1)
  })

  it('takes the repeatability where it is less than half the window, and a window of the move before the setup’s', () => {
    expect(told(targetGrid, grid([absolute(1, 10.02)], { repeatability: 0.01 }))[0]).toMatch(/0\.02 mm off, more than the 0\.01 mm/)
    expect(told(targetGrid, grid([absolute(1, 10.02, { window: 0.03 })]))[0]).toMatch(/0\.02 mm off, more than the 0\.015 mm/)
  })

  it('makes one line for all, led by the worst: 20.05 is 0.05 off, 10.03 and −5.04 less', () => {
    expect(told(targetGrid, grid([absolute(1, 10.03), absolute(2, 20.05), relative(3, -5.04), unused(9)]))).toEqual([
      'note: Moves 1 to 3 have targets between counts of 0.1 mm: move 2 to 20.05 mm ends up to 0.05 mm off, more than the 0.025 mm that pass unseen.',
    ])
  })

  it('holds a press against the repeatability only', () => {
    expect(told(targetGrid, grid([press(1, 100, 150.03)]))).toEqual([])
    expect(told(targetGrid, grid([press(1, 100, 150.03)], { repeatability: 0.02 }))).toHaveLength(1)
  })

  it('names what is missing', () => {
    expect(told(targetGrid, judgeInput(linear({}, [absolute(1, 10)])))).toEqual(['unknown: How targets fall on counts cannot be judged without nameplate.resolution.'])
    expect(told(targetGrid, grid([absolute(1, 10), absolute(2, 10, { window: 0.1 })], { repeatability: undefined }, {})))
      .toEqual(['unknown: How the targets of move 1 fall on counts cannot be judged without nameplate.repeatability.'])
  })

  it('does not apply to an empty table', () => {
    expect(told(targetGrid, grid([unused(1)]))).toEqual(['not applicable'])
  })

  it('never notes a target on a count', () => {
    const resolution = fc.constantFrom(0.001, 0.005, 0.01, 0.1, 1 / 3, 360 / 131072)
    fc.assert(fc.property(resolution, fc.integer({ min: -20000, max: 20000 }), (count, n) => {
      expect(targetGrid.judge(grid([absolute(1, n * count)], { resolution: count, repeatability: 1e-6 }))).toEqual([])
    }))
  })
})
