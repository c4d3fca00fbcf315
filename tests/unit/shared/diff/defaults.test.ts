import { describe, expect, it } from 'vitest'
import { effectiveInMove, effectiveInSetup, goByPressSpeed, sameMotionInMove, sameMotionInSetup } from '../../../../shared/diff/defaults'
import type { Move } from '../../../../shared/settings/types'

const row: Move = { move: 5, kind: 'absolute', target: 150, speed: 250, acceleration: 2000 }
const press: Move = { ...row, kind: 'press', forceLimit: 30, approach: 140 }

describe('what stands in for an absent value', () => {
  it('of a move', () => {
    expect(effectiveInMove('deceleration', row, {})).toBe(2000)
    expect(effectiveInMove('deceleration', { ...row, deceleration: 1500 }, {})).toBe(1500)
    expect(effectiveInMove('pressSpeed', press, { pressSpeed: 8 })).toBe(8)
    expect(effectiveInMove('pressSpeed', { ...press, pressSpeed: 5 }, { pressSpeed: 8 })).toBe(5)
    expect(effectiveInMove('pressSpeed', press, {})).toBeUndefined()
    expect(effectiveInMove('pressSpeed', row, { pressSpeed: 8 })).toBeUndefined()
    expect(effectiveInMove('turn', row, {})).toBe('signed')
    expect(effectiveInMove('window', row, { inPositionWindow: 0.1 })).toBeUndefined()
  })

  it('of the setup: soft limits are active where any is given', () => {
    expect(effectiveInSetup('softLimitsActive', {})).toBeUndefined()
    expect(effectiveInSetup('softLimitsActive', { softLimitMin: 0 })).toBe(true)
    expect(effectiveInSetup('softLimitsActive', { softLimitMax: 0, softLimitsActive: false })).toBe(false)
    expect(effectiveInSetup('jogSpeed', { jogSpeed: 5 })).toBeUndefined()
  })
})

describe('the same motion', () => {
  it('goes by the setup of each side', () => {
    const was = { move: press, setup: { pressSpeed: 8 } }
    const is = (pressSpeed: number) => ({ move: { ...press, pressSpeed }, setup: { pressSpeed: 12 } })
    expect(sameMotionInMove('pressSpeed', was, is(8))).toBe(true)
    expect(sameMotionInMove('pressSpeed', was, is(12))).toBe(false)
    expect(sameMotionInMove('window', was, is(8))).toBe(false)
  })

  it('is not that of limits that came at the same time', () => {
    expect(sameMotionInSetup('softLimitsActive', {}, { softLimitMax: 9, softLimitsActive: true })).toBe(false)
    expect(sameMotionInSetup('softLimitsActive', { softLimitMax: 9 }, { softLimitMax: 9, softLimitsActive: true })).toBe(true)
  })
})

describe('moves that go by the press speed of the setup', () => {
  it('are presses that name none of their own on either side', () => {
    expect(goByPressSpeed(press, press)).toBe(true)
    expect(goByPressSpeed(press, { ...press, pressSpeed: 5 })).toBe(false)
    expect(goByPressSpeed(row, press)).toBe(false)
  })
})
