import { describe, expect, it } from 'vitest'
import { drivenRows, surroundings } from '../../../../shared/checks/driven'
import { absolute, judgeInput, linear, plate, press, unused } from '../../../support/check-input'

describe('drivenRows', () => {
  it('tells each used row with its ways, from where rows before it end', () => {
    const input = judgeInput(linear({}, [unused(0), absolute(1, 50, { next: 2 }), absolute(2, 100)]))
    expect(drivenRows(input).map(({ row, ways }) => [row.move.move, row.index, ways.map(({ profile, known }) => known ? profile.from : 'anywhere')]))
      .toEqual([[1, 1, ['anywhere', 'anywhere']], [2, 2, [50]]])
  })

  it('goes by the setup and by the unit: one that rests at the approach takes longer', () => {
    const content = linear({ pressSpeed: 10 }, [absolute(1, 0, { next: 2 }), press(2, 100, 150, { pressSpeed: undefined })])
    const takes = (stopsAtApproach: boolean) => drivenRows(judgeInput(content, { nameplate: plate({ stopsAtApproach }) }))[1]!.ways[0]!.profile.duration
    // 0.5201 + 5.0025 s against 0.525 + 5.005 s, as in the spec of profile.
    expect(takes(false)).toBeCloseTo(5.5226, 9)
    expect(takes(true)).toBeCloseTo(5.53, 9)
    expect(surroundings(judgeInput(content))).toEqual({ setup: { pressSpeed: 10 }, stopsAtApproach: undefined })
  })

  it('is reckoned once for an input, and anew for the next', () => {
    const input = judgeInput(linear({}, [absolute(1, 50)]))
    expect(drivenRows(input)).toBe(drivenRows(input))
    expect(drivenRows({ ...input })).not.toBe(drivenRows(input))
    expect(drivenRows({ ...input })).toEqual(drivenRows(input))
  })
})
