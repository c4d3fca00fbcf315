import { describe, expect, it } from 'vitest'
import { forceBaseOf } from '../../../../shared/motion/force-base'

describe('forceBaseOf', () => {
  it('is the rated thrust unless the nameplate says the peak', () => {
    expect(forceBaseOf({ ratedThrust: 640, peakThrust: 1600 })).toBe(640)
    expect(forceBaseOf({ ratedThrust: 640, peakThrust: 1600, forceBase: 'rated-thrust' })).toBe(640)
    expect(forceBaseOf({ ratedThrust: 640, peakThrust: 1600, forceBase: 'peak-thrust' })).toBe(1600)
  })

  it('takes neither thrust for the other where the one asked for is not given', () => {
    expect(forceBaseOf({ ratedThrust: 640, forceBase: 'peak-thrust' })).toBeUndefined()
    expect(forceBaseOf({ peakThrust: 1600 })).toBeUndefined()
    expect(forceBaseOf(undefined)).toBeUndefined()
  })
})
