import { describe, expect, it } from 'vitest'
import { beyondLimit, softLimits, turnsFreely } from '../../../../shared/checks/limits'
import { limits, linear, rotary } from '../../../support/check-input'

describe('soft limits', () => {
  it('names those that are not given', () => {
    expect(softLimits(linear(limits))).toEqual({ min: 0, max: 198, missing: [] })
    expect(softLimits(linear({ softLimitMax: 5 })).missing).toEqual(['softLimitMin'])
  })

  it('says which limit a place lies beyond, and by how much', () => {
    const both = softLimits(linear(limits))
    expect(beyondLimit(212.4, both)).toEqual({ limit: 198, beyond: 14.4, field: 'softLimitMax' })
    expect(beyondLimit(-0.5, both)).toEqual({ limit: 0, beyond: 0.5, field: 'softLimitMin' })
    expect([beyondLimit(0, both), beyondLimit(198, both), beyondLimit(500, softLimits(linear({ softLimitMin: 0 })))]).toEqual([undefined, undefined, undefined])
  })

  it('calls only a modulo axis free, and only with its limits off or absent', () => {
    expect(turnsFreely(rotary({ modulo: 360 }))).toBe(true)
    expect(turnsFreely(rotary({ modulo: 360, softLimitMin: 0, softLimitMax: 90, softLimitsActive: false }))).toBe(true)
    expect(turnsFreely(rotary({ modulo: 360, softLimitMin: 0 }))).toBe(false)
    expect(turnsFreely(rotary({ modulo: 360, softLimitsActive: true }))).toBe(false)
    expect(turnsFreely(rotary({ softLimitsActive: false }))).toBe(false)
  })
})
