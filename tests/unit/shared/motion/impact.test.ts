import { describe, expect, it } from 'vitest'
import { linearImpact, rotaryImpact } from '../../../../shared/motion/impact'

describe('impact', () => {
  it('is ½ m v²: 8 kg at 500 mm/s hold ½·8·0.25 = 1 J', () => {
    expect(linearImpact(8, 500)).toBe(1)
    expect(linearImpact(8, 250)).toBe(0.25)
    expect(linearImpact(8, 0)).toBe(0)
  })

  it('is ½ J ω²: 2000 kg·cm² = 0.2 kg·m² at 180 deg/s = π rad/s hold 0.1·π² = 0.98696044 J', () => {
    expect(rotaryImpact(2000, 180)).toBeCloseTo(0.98696044, 8)
    expect(rotaryImpact(2000, -180)).toBeCloseTo(0.98696044, 8)
  })
})
