import { describe, expect, it } from 'vitest'
import { softLimitsOff } from '../../../../shared/checks/soft-limits-off'
import type { AxisFlag } from '../../../../shared/settings/types'
import { judgeInput, limits, linear, told } from '../../../support/check-input'

const off = (flags: readonly AxisFlag[], softLimitsActive: boolean | undefined = false) =>
  judgeInput(linear({ ...limits, softLimitsActive }), { axis: { axisKind: 'linear', flags } })

describe('soft-limits-off', () => {
  it('is silent while they are on', () => {
    expect(told(softLimitsOff, off([], true))).toEqual([])
    expect(told(softLimitsOff, off(['gravity'], true))).toEqual([])
  })

  it('warns on an axis that carries and presses nothing', () => {
    expect(told(softLimitsOff, off([]))).toEqual(['warn: The soft limits are off: the drive lets every move run on to the hard stop.'])
    expect(softLimitsOff.judge(off([]))).toMatchObject([{ at: ['/setup/softLimitsActive'], values: { flags: [] } }])
  })

  it('stops on a gravity or press axis', () => {
    expect(told(softLimitsOff, off(['gravity']))).toEqual(['stop: The soft limits are off on a gravity axis: the drive lets every move run on to the hard stop.'])
    expect(told(softLimitsOff, off(['press', 'collision']))[0]).toMatch(/^stop: The soft limits are off on a press axis/)
    expect(told(softLimitsOff, off(['gravity', 'press']))[0]).toMatch(/off on a gravity and press axis/)
  })

  it('only warns where the axis can merely hit something: the border between the two levels', () => {
    expect(told(softLimitsOff, off(['collision']))[0]).toMatch(/^warn/)
  })

  it('has nothing to say where the field is not written: then limits count as on, and unknown ones are told by travel-span', () => {
    expect(told(softLimitsOff, judgeInput(linear(limits)))).toEqual(['not applicable'])
    expect(told(softLimitsOff, judgeInput(linear()))).toEqual(['not applicable'])
  })
})
