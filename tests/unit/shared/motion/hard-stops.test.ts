import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { endsByHardStop, homeReading } from '../../../../shared/motion/hard-stops'

describe('homeReading', () => {
  // IEC 61800-7-201, object 607Ch: zero position = home position + home offset, so that home reads the negative offset.
  it('is minus the offset, and the offset itself on a drive that counts the other way', () => {
    expect(homeReading({ homeOffset: -1.55 })).toBe(1.55)
    expect(homeReading({ homeOffset: 3 }, 'zero-is-home-plus-offset')).toBe(-3)
    expect(homeReading({ homeOffset: 3 }, 'home-reads-offset')).toBe(3)
  })

  it('is plain 0 for an offset of 0, and not known without one', () => {
    expect(Object.is(homeReading({ homeOffset: 0 }), 0)).toBe(true)
    expect(homeReading({})).toBeUndefined()
  })
})

describe('endsByHardStop', () => {
  const plate = { stroke: 200, hardMargin: 1 }

  it('goes up from the stop that negative homing finds: 3 … 3 + 200 + 2·1', () => {
    expect(endsByHardStop({ homeOffset: -3, homingDirection: 'negative' }, plate)).toEqual({ hardLow: 3, low: 4, high: 204, hardHigh: 205 })
  })

  it('goes down from the stop that positive homing finds: 205 − 200 − 2·1 … 205', () => {
    expect(endsByHardStop({ homeOffset: -205, homingDirection: 'positive' }, plate)).toEqual({ hardLow: 3, low: 4, high: 204, hardHigh: 205 })
  })

  it('takes 0 for a margin that is not given', () => {
    expect(endsByHardStop({ homeOffset: 0, homingDirection: 'negative' }, { stroke: 200 })).toEqual({ hardLow: 0, low: 0, high: 200, hardHigh: 200 })
  })

  it('is not known without offset, direction or nameplate', () => {
    expect(endsByHardStop({ homingDirection: 'negative' }, plate)).toBeUndefined()
    expect(endsByHardStop({ homeOffset: 0 }, plate)).toBeUndefined()
    expect(endsByHardStop({ homeOffset: 0, homingDirection: 'positive' }, undefined)).toBeUndefined()
  })

  it('keeps stroke and margins, whichever end is home', () => {
    const hundredths = (max: number) => fc.integer({ min: 0, max: max * 100 }).map(n => n / 100)
    fc.assert(fc.property(fc.integer({ min: -50000, max: 50000 }).map(n => n / 100), hundredths(1000), hundredths(10), fc.constantFrom('negative' as const, 'positive' as const), (homeOffset, stroke, hardMargin, homingDirection) => {
      const ends = endsByHardStop({ homeOffset, homingDirection }, { stroke, hardMargin })!
      expect(ends.high - ends.low).toBeCloseTo(stroke, 6)
      expect(ends.low - ends.hardLow).toBeCloseTo(hardMargin, 6)
      expect(ends.hardHigh - ends.high).toBeCloseTo(hardMargin, 6)
      expect(homingDirection === 'negative' ? ends.hardLow : ends.hardHigh).toBe(homeReading({ homeOffset }))
    }))
  })
})
