import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { extentOf } from '../../../../shared/pictures/scale'
import { layoutSteps, nearLimits, type StepPoint, type StepsInput } from '../../../../utils/pictures/steps'

const day = 86_400_000
const begin = Date.parse('2025-02-12T09:00:00.000Z')
const at = (days: number) => begin + days * day
const base: StepsInput = {
  points: [{ at: at(0), value: 34 }, { at: at(110), value: 36, balloon: 1 }, { at: at(280), value: 42, balloon: 2 }, { at: at(282), value: 36, balloon: 3 }, { at: at(650), value: 55, balloon: 4, hot: true }],
  until: at(652), zone: 'Europe/Vienna',
  bands: [{ from: at(112), to: at(652), value: 36, label: 'known-good v2' }],
  limits: [{ from: at(200), to: at(652), at: 45, label: 'site rule, at most 45' }, { from: at(0), to: at(652), at: 250, label: 'nameplate, at most 250' }],
  cuts: [{ at: at(340), label: 'HL40-24-00817' }],
}
const numbersOf = (path: string) => (path.match(/-?\d+(\.\d+)?/g) ?? []).map(Number)
const texts = (input: StepsInput, width = 1376) => layoutSteps(input, width).texts.map(({ text }) => text)

describe('layoutSteps', () => {
  it('draws steps, never slopes: levels joined by upright lines', () => {
    expect(layoutSteps(base, 1376).line).toMatch(/^M[\d.]+ [\d.]+H[\d.]+(V[\d.]+H[\d.]+){4}$/)
  })

  it('has a balloon for each change and none where the record begins; what wants someone is filled', () => {
    const { balloons } = layoutSteps(base, 1376)
    expect(balloons.map(({ number }) => number).sort()).toEqual([1, 2, 3, 4])
    expect(balloons.filter(({ hot }) => hot).map(({ number }) => number)).toEqual([4])
  })

  it('names values, the limit that is near, what was known-good, and where another unit came in', () => {
    expect(texts(base)).toEqual(expect.arrayContaining(['34', '36', '55', 'site rule, at most 45', 'known-good v2', 'HL40-24-00817']))
    expect(texts(base)).not.toContain('nameplate, at most 250')
    expect(nearLimits(base).map(({ at: limit }) => limit)).toEqual([45])
  })

  it('breaks the line where the value is not set', () => {
    const gap: StepPoint[] = [{ at: at(0), value: 34 }, { at: at(100), value: null, balloon: 1 }, { at: at(200), value: 36, balloon: 2 }]
    expect(layoutSteps({ ...base, points: gap }, 800).line).toMatch(/^M[\d.]+ [\d.]+H[\d.]+M[\d.]+ [\d.]+H[\d.]+$/)
  })

  it('gives words a level each, named at the left, in the order in which they came', () => {
    const words: StepPoint[] = [{ at: at(0), value: 'hard-stop' }, { at: at(100), value: 'limit-switch', balloon: 1 }, { at: at(200), value: 'hard-stop', balloon: 2 }]
    const layout = layoutSteps({ ...base, points: words, bands: [], limits: [] }, 800)
    expect(layout.texts.filter(({ anchor }) => anchor === 'end').map(({ text }) => text)).toEqual(expect.arrayContaining(['hard-stop', 'limit-switch']))
    const [first, second] = [...new Set(numbersOf(layout.line).filter((_, index) => index === 1 || index === 3))]
    expect(second).toBeLessThan(first ?? 0)
    expect(texts({ ...base, points: [{ at: at(0), value: true }], bands: [], limits: [] })).toContain('on')
  })

  it('folds changes that find no room to a count, and loses none', () => {
    const many: StepPoint[] = [{ at: at(0), value: 1 }, ...Array.from({ length: 60 }, (_, index) => ({ at: at(300 + index / 10), value: index % 2, balloon: index + 1 }))]
    const { balloons, crowds } = layoutSteps({ ...base, points: many }, 320)
    expect([...balloons.map(({ number }) => number), ...crowds.flatMap(({ moves }) => moves)].sort((a, b) => a - b)).toEqual(many.slice(1).map(({ balloon }) => balloon))
  })

  it('draws sister axes on the same scale and the same time, and begins them with what they held then', () => {
    const sisters = [{ tag: 'LID-01.Z', points: [{ at: at(-90), value: 20 }, { at: at(-30), value: 34 }, { at: at(300), value: 70 }] }, { tag: 'LID-04.Z', points: [{ at: at(400), value: 36 }] }]
    const layout = layoutSteps({ ...base, sisters }, 1376)
    const alone = layoutSteps(base, 1376)
    expect(alone.sisters).toBe('')
    expect(layout.sisters.match(/M/g)).toHaveLength(2)
    const [, first = '', second = ''] = /^(M[^M]+)(M[^M]+)$/.exec(layout.sisters) ?? []
    expect(first).toMatch(/^M[\d.]+ [\d.]+H[\d.]+V[\d.]+H[\d.]+$/)
    const heights = (path: string) => [...path.matchAll(/(?:M[\d.]+ |V)([\d.]+)/g)].map(match => Number(match[1]))
    expect(heights(first)[0]).toBe(heights(layout.line)[0])
    expect(Math.min(...heights(first))).toBeLessThan(Math.min(...heights(layout.line)))
    expect(numbersOf(second)[0]).toBeGreaterThan(numbersOf(layout.line)[0] ?? 0)
    expect(layout.texts.map(({ text }) => text)).toContain('60')
  })

  it('draws one value, and no value at all', () => {
    expect(layoutSteps({ ...base, points: [{ at: at(0), value: 0 }], bands: [], limits: [] }, 320).line).toMatch(/^M[\d.]+ [\d.]+H[\d.]+$/)
    expect(layoutSteps({ ...base, points: [], bands: [], limits: [], cuts: [] }, 320).line).toBe('')
  })

  it('law: at every width labels of time stand 46 px apart or more, texts meet nowhere, and all stays within the picture', () => {
    const step = fc.record({ days: fc.integer({ min: 0, max: 900 }), value: fc.double({ min: -500, max: 500, noNaN: true }).map(value => Number(value.toFixed(2))), hot: fc.boolean() })
    fc.assert(fc.property(fc.array(step, { minLength: 1, maxLength: 14 }), fc.integer({ min: 288, max: 2496 }), fc.integer({ min: -400, max: 400 }), (steps, width, limit) => {
      const points = steps.toSorted((a, b) => a.days - b.days).map(({ days, value, hot }, index) => ({ at: at(days), value, hot, ...(index > 0 && { balloon: index }) }))
      const layout = layoutSteps({ ...base, points, until: at(901), bands: [{ from: at(3), to: at(901), value: points[0]?.value ?? 0, label: 'known-good v1' }], limits: [{ from: at(0), to: at(901), at: limit, label: `site rule, at most ${limit}` }] }, width)
      const labels = layout.ticks.filter(({ label }) => label !== null).map(({ x }) => x)
      for (const [index, x] of labels.entries()) if (index > 0) expect(x - (labels[index - 1] ?? 0)).toBeGreaterThanOrEqual(46)
      const inside = layout.texts.filter(({ anchor, x, y }) => !(anchor === 'end' && x < numberAt(layout.frame, 0)) && y > 14)
      for (const [index, one] of inside.entries()) {
        const [from, to] = extentOf(one)
        expect(from).toBeGreaterThanOrEqual(0)
        expect(to).toBeLessThanOrEqual(width)
        for (const other of inside.slice(index + 1)) {
          const [otherFrom, otherTo] = extentOf(other)
          expect(Math.abs(one.y - other.y) < 14 && from < otherTo && otherFrom < to, `${one.text} meets ${other.text}`).toBe(false)
        }
      }
      for (const path of [layout.line, layout.bands, layout.limits]) for (const number of numbersOf(path)) expect(number >= 0 && number <= Math.max(width, layout.height)).toBe(true)
    }), { numRuns: 150 })
  })
})

const numberAt = (path: string, index: number) => numbersOf(path)[index] ?? 0
