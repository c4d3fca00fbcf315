import { describe, expect, it } from 'vitest'
import { unusedRows } from '../../../../shared/checks/unused-rows'
import { absolute, judgeInput, linear, told, unused } from '../../../support/check-input'

describe('unused-rows', () => {
  it('is silent where every row is in use', () => {
    expect(told(unusedRows, judgeInput(linear({}, [absolute(0, 0)])))).toEqual([])
  })

  it('folds all of them into one line', () => {
    const input = judgeInput(linear({}, [absolute(0, 0), unused(1), unused(5), unused(6), unused(7)]))
    expect(told(unusedRows, input)).toEqual(['note: Rows 1 and 5 to 7 are unused: 4 of 5.'])
    expect(unusedRows.judge(input)).toMatchObject([{ at: ['/moves/1', '/moves/2', '/moves/3', '/moves/4'], values: { moves: [1, 5, 6, 7] } }])
    expect(told(unusedRows, judgeInput(linear({}, [unused(3)])))).toEqual(['note: Row 3 is unused: 1 of 1.'])
  })

  it('counts a row only where speed and acceleration are both 0: one of the two is no empty row', () => {
    const half = [absolute(1, 0, { speed: 0 }), absolute(2, 0, { acceleration: 0 }), absolute(3, 0, { speed: 0.000001, acceleration: 0.000001 })]
    expect(told(unusedRows, judgeInput(linear({}, half)))).toEqual([])
    expect(told(unusedRows, judgeInput(linear({}, [...half, unused(4)])))).toEqual(['note: Row 4 is unused: 1 of 4.'])
  })

  it('does not apply to an empty table', () => {
    expect(told(unusedRows, judgeInput(linear()))).toEqual(['not applicable'])
  })
})
