import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { extentOf, figure, labelPixels, scaleLabels, scaleSteps, scaleTicks, tickPixels } from '../../../../shared/pictures/scale'

const kinds = fc.constantFrom('linear' as const, 'rotary' as const)

describe('scaleSteps', () => {
  it('keeps ticks 5 px and labels 46 px apart, labels on ticks', () => {
    fc.assert(fc.property(fc.double({ min: 1e-3, max: 2000, noNaN: true }), kinds, (perUnit, kind) => {
      const { tick, label } = scaleSteps(perUnit, kind)
      expect(tick * perUnit).toBeGreaterThanOrEqual(tickPixels)
      expect(label * perUnit).toBeGreaterThanOrEqual(labelPixels)
      expect(Math.abs(label / tick - Math.round(label / tick))).toBeLessThan(1e-6)
    }))
  })

  it('counts a 200 mm rule in mm and tens on a desk, in fives and fifties on a phone', () => {
    expect(scaleSteps(6.26, 'linear')).toEqual({ tick: 1, label: 10 })
    expect(scaleSteps(1.59, 'linear')).toEqual({ tick: 5, label: 50 })
  })

  it('counts a turn in quarters and eighths, never in tens of ten', () => {
    expect(scaleSteps(1, 'rotary').label).toBe(90)
    expect(scaleSteps(3.4, 'rotary')).toEqual({ tick: 2, label: 30 })
  })

  it('gives wide numbers more room', () => {
    expect(scaleSteps(6.26, 'linear', 80).label).toBe(20)
  })
})

describe('scaleTicks', () => {
  it('begins and ends inside the rule', () => {
    const ticks = scaleTicks(-1.35, 12, { tick: 1, label: 10 })
    expect(ticks[0]?.at).toBe(-1)
    expect(ticks.at(-1)?.at).toBe(12)
    expect(ticks.filter(tick => tick.height === 10).map(tick => tick.at)).toEqual([0, 10])
    expect(ticks.filter(tick => tick.height === 7).map(tick => tick.at)).toEqual([5])
  })

  it('has no noise of binary fractions', () => {
    expect(scaleTicks(0, 0.6, { tick: 0.1, label: 0.5 }).map(tick => tick.at)).toEqual([0, 0.1, 0.2, 0.3, 0.4, 0.5, 0.6])
  })
})

describe('scaleLabels', () => {
  it('never lets two labels touch, whatever the rule and its width', () => {
    fc.assert(fc.property(fc.integer({ min: -5000, max: 5000 }), fc.double({ min: 0.5, max: 9000, noNaN: true }), fc.integer({ min: 240, max: 2400 }), kinds, (low, span, width, kind) => {
      const perUnit = (width - 28) / span
      const steps = scaleSteps(perUnit, kind)
      const x = (at: number) => 14 + (at - low) * perUnit
      const extents = scaleLabels(scaleTicks(low, low + span, steps), steps.label, x, 14, width - 14).map(extentOf)
      for (const [index, extent] of extents.entries()) {
        const next = extents[index + 1]
        if (next) expect(extent[1]).toBeLessThanOrEqual(next[0])
      }
    }))
  })

  it('turns the labels at the ends inwards', () => {
    const steps = { tick: 10, label: 50 }
    const labels = scaleLabels(scaleTicks(0, 200, steps), 50, at => 14 + at * 1.6, 14, 334)
    expect(labels.map(label => [label.text, label.anchor])).toEqual([['0', 'start'], ['50', 'middle'], ['100', 'middle'], ['150', 'middle'], ['200', 'end']])
  })
})

describe('figure', () => {
  it('writes a true minus', () => {
    expect(figure(-1.35)).toBe('−1.35')
  })
})
