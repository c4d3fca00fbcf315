import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { zoneReach } from '../../../../shared/checks/zone-reach'
import type { Setup, Zone } from '../../../../shared/settings/types'
import { absolute, judgeInput, limits, linear, rotary, told, unused } from '../../../support/check-input'

const zone = (number: number, from: number, to: number): Zone => ({ zone: number, from, to })
const zones = (list: readonly Zone[], setup: Setup = limits) => judgeInput(linear(setup, [absolute(1, 10)], { zones: list }))
const turning = (list: readonly Zone[], setup: Setup = {}) => told(zoneReach, judgeInput(rotary({ modulo: 360, ...setup }, [], { zones: list })))

describe('zone-reach', () => {
  it('is silent for zones that lie apart, within 0 … 198 mm', () => {
    expect(told(zoneReach, zones([zone(1, 0, 12), zone(2, 98, 198)]))).toEqual([])
  })

  it('warns of a zone wholly outside: 200 > 198', () => {
    const input = zones([zone(1, 200, 210)])
    expect(told(zoneReach, input)).toEqual(['warn: Zone 1 from 200 mm to 210 mm lies wholly outside the soft limits from 0 mm to 198 mm.'])
    expect(zoneReach.judge(input)).toMatchObject([{ at: ['/zones/0/from', '/zones/0/to'], values: { zone: 1, from: 200, to: 210, min: 0, max: 198 } }])
  })

  it('notes a zone partly outside, down to one that only touches the limit', () => {
    expect(told(zoneReach, zones([zone(1, -5, 12)]))).toEqual(['note: Zone 1 from −5 mm to 12 mm lies partly outside the soft limits from 0 mm to 198 mm.'])
    expect(told(zoneReach, zones([zone(1, 198, 210)]))[0]).toMatch(/^note/)
    expect(told(zoneReach, zones([zone(1, 198.000001, 210)]))[0]).toMatch(/^warn/)
  })

  it('notes zones that overlap, and not zones that meet', () => {
    const input = zones([zone(1, 0, 50), zone(2, 40, 60), zone(3, 49, 55), zone(4, 60, 70)])
    expect(told(zoneReach, input)).toEqual([
      'note: Zone 1 overlaps zones 2 and 3: their signals are on together there.',
      'note: Zone 2 overlaps zone 3: their signals are on together there.',
    ])
    expect(zoneReach.judge(input)[0]).toMatchObject({ values: { zone: 1, zones: [2, 3] } })
  })

  it('notes a zone narrower than the way between two looks: 250 mm/s · 20 ms = 5 mm', () => {
    const looked = (to: number, controllerScan?: number) => told(zoneReach, { ...zones([zone(1, 10, to)]), axis: { axisKind: 'linear', flags: [], ...controllerScan === undefined ? {} : { controllerScan } } })
    expect(looked(14.9, 20)).toEqual(['note: Zone 1 is 4.9 mm wide: at 250 mm/s the axis goes 5 mm between two looks of the controller.'])
    expect(looked(15, 20)).toEqual([])
    expect(looked(10.1)).toEqual([])
  })

  it('goes by the fastest row in use, however slow: 0.5 mm/s · 20 ms = 0.01 mm; without a row nothing crosses a zone', () => {
    const slow = (to: number, moves = [absolute(1, 10, { speed: 0.5 }), unused(2)]) =>
      told(zoneReach, { ...judgeInput(linear(limits, moves, { zones: [zone(1, 10, to)] })), axis: { axisKind: 'linear', flags: [], controllerScan: 20 } })
    expect(slow(10.01)).toEqual([])
    expect(slow(10.009)).toEqual(['note: Zone 1 is 0.009 mm wide: at 0.5 mm/s the axis goes 0.01 mm between two looks of the controller.'])
    expect(slow(10.009, [unused(2)])).toEqual([])
  })

  it('names missing limits, and judges by the one that is there', () => {
    expect(told(zoneReach, zones([zone(1, -10, -5)], { softLimitMin: 0 }))).toEqual([
      'warn: Zone 1 from −10 mm to −5 mm lies wholly outside the soft limits from 0 mm on.',
      'unknown: Whether the axis reaches its zones cannot be judged without softLimitMax.',
    ])
    expect(zoneReach.judge(zones([zone(1, 0, 1)], {})).map(({ missing }) => missing)).toEqual([['softLimitMin', 'softLimitMax']])
  })

  it('does not apply without zones', () => {
    expect(told(zoneReach, zones([]))).toEqual(['not applicable'])
  })

  it('reaches everything on an axis that turns freely, and knows zones that wrap: 350 … 10 overlaps 5 … 20', () => {
    expect(turning([zone(1, 350, 10), zone(2, 10, 20)])).toEqual([])
    expect(turning([zone(1, 350, 10), zone(2, 5, 20)])).toEqual(['note: Zone 1 overlaps zone 2: their signals are on together there.'])
    expect(turning([zone(1, 5, 20), zone(2, 350, 10)])).toHaveLength(1)
    expect(turning([zone(1, 5, 20), zone(2, 365, 366)])).toHaveLength(1)
  })

  it('looks at limits on an axis that wraps, whole turns aside: 0 … 90', () => {
    const quarter = { softLimitMin: 0, softLimitMax: 90 }
    expect(turning([zone(1, 370, 380)], quarter)).toEqual([])
    expect(turning([zone(1, 100, 200)], quarter)[0]).toMatch(/^warn/)
    expect(turning([zone(1, 350, 10)], quarter)[0]).toMatch(/^note: Zone 1 from 350 deg to 10 deg lies partly/)
    expect(turning([zone(1, 350, 10)], { softLimitMin: 0, softLimitMax: 360 })).toEqual([])
  })

  it('finds overlaps as a person does who walks round the table', () => {
    const stretch = fc.record({ from: fc.integer({ min: 0, max: 35 }), length: fc.integer({ min: 1, max: 18 }) })
    fc.assert(fc.property(stretch, stretch, (one, other) => {
      const covered = (at: number, { from, length }: typeof one) => (((at - from) % 36) + 36) % 36 < length
      const share = Array.from({ length: 36 }, (_, i) => i + 0.5).some(at => covered(at, one) && covered(at, other))
      const asZone = (number: number, { from, length }: typeof one) => zone(number, from * 10, ((from + length) % 36) * 10)
      expect(turning([asZone(1, one), asZone(2, other)]).length > 0).toBe(share)
    }))
  })
})
