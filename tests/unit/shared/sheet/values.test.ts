import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { besideValue, isForcePercent, newtons, printed } from '../../../../shared/sheet/beside'
import { extraLabel, labelOf, unitOf } from '../../../../shared/sheet/labels'
import { sheetTaught, sheetValues } from '../../../../shared/sheet/values'
import { formatNumber } from '../../../../shared/units/number'
import type { Content } from '../../../../shared/settings/types'
import { contentOf } from '../../../../shared/settings/content'
import { arbitraryContent } from '../../../support/arbitrary-content'
import { liftFile, liftPlate } from '../../../support/entry-table'
import { lidPress } from '../../../support/lid-press'

const none = { left: [], prove: [] }
const plain: Content = { axisKind: 'linear', setup: { softLimitMin: -2.5, thrustLimit: 38, homingMethod: 'hard-stop', brakeFitted: false, inPositionWindow: 0.05, homeOffset: 0.45 }, zones: [{ zone: 2, from: 98, to: 106 }], moves: [], extra: { 'Filter': 'B', 'Ramp': { value: 3, unit: 'counts' }, 'K-017': 15, 'Auto': true } }
const rows = (values: ReturnType<typeof sheetValues>) => values.map(({ number, label, value, unit, beside, group }) => [group, number, label, value, unit, beside].join('|'))

describe('the values of a sheet', () => {
  it('without an entry table stand by group, in the order of the format, with a real minus sign', () => {
    expect(rows(sheetValues({ content: plain, ...none }))).toEqual([
      'travel||Soft limit, min|−2.5|mm|', 'travel||Home offset|0.45|mm|', 'homing||Method|hard-stop||',
      'motion||In-position window|0.05|± mm|', 'force||Thrust limit|38|%|', 'io||Brake fitted|false||off',
      'zones||Zone 2, from|98|mm|', 'zones||Zone 2, to|106|mm|',
      'extra values||Filter|B||', 'extra values||Ramp|3|counts|', 'extra values||K-017|15||', 'extra values||Auto|true||',
    ])
  })

  it('have newtons beside a percentage where the nameplate says what 100 % is, and say what is to be proved', () => {
    const nameplate = { model: 'HL40', axisKind: 'linear' as const, stroke: 200, ratedThrust: 640 }
    const told = sheetValues({ content: plain, nameplate, left: [], prove: ['homeOffset'] })
    expect(told.find(({ label }) => label === 'Thrust limit')?.beside).toBe('243.2 N')
    expect(told.find(({ label }) => label === 'Home offset')?.beside).toBe('prove')
  })

  it('with an entry table are the drive’s own numbers, signs and steps, in its order; the rest follows by group', () => {
    expect(rows(sheetValues({ content: contentOf(liftFile), nameplate: liftPlate, ...none }))).toEqual([
      'travel|K-001|Positive direction|1||retract', 'travel|K-003|Soft limit, min|−2,5|mm|', 'travel|K-004|Soft limit, max|184,5|mm|',
      'motion|K-012|Speed limit|0,250|m/s|= 250 mm/s', 'motion|K-020|In-position window|50||= 0.05 ± mm', 'tuning|K-031|Velocity gain|310,25||',
      'io|K-040|Brake fitted|1||on', 'io|K-050|Ramp|3|counts|', 'zones||Zone 1, from|10|mm|', 'zones||Zone 1, to|25|mm|', 'extra values||K-017|15||',
    ])
  })

  it('print what the drive writes for a value that is not set, so that it is written too', () => {
    const nameplate = { ...liftPlate, entryTable: { ...liftPlate.entryTable, parameters: [{ number: 'K-9', field: 'jogSpeed', none: '0' }] } }
    expect(rows(sheetValues({ content: { ...plain, setup: {}, zones: [], extra: {} }, nameplate, ...none }))).toEqual(['motion|K-9|Jog speed|0|mm/s|not set'])
  })

  it('leave out what is taught, which has an empty place of its own', () => {
    const source = { content: { ...contentOf(liftFile), setup: { positiveDirection: 'retract' as const } }, nameplate: liftPlate, left: ['velocityGain', 'homeOffset', 'extra:Ramp'], prove: [] }
    expect(sheetValues(source).some(({ label }) => ['Velocity gain', 'Home offset'].includes(label))).toBe(false)
    expect(sheetTaught(source)).toEqual([
      { number: 'K-031', label: 'Velocity gain', unit: '' }, { number: '', label: 'Home offset', unit: 'mm' }, { number: 'K-050', label: 'Ramp', unit: '' },
    ])
  })

  it('hold every value of any content exactly once', () => {
    fc.assert(fc.property(arbitraryContent(), (content) => {
      const many = Object.keys(content.setup).length + 2 * content.zones.length + Object.keys(content.extra).length
      const values = sheetValues({ content, ...none })
      expect(values).toHaveLength(many)
      for (const [name, value] of Object.entries(content.setup)) {
        const text = typeof value === 'number' ? printed(formatNumber(value)) : String(value)
        expect(values.filter(one => one.label === labelOf(name)).map(one => one.value), name).toContain(text)
      }
    }))
  })

  it('are those of the invented lid press', () => {
    const file = lidPress()
    expect(sheetValues({ content: contentOf(file), ...none })).toHaveLength(Object.keys(file.setup).length + 2 * file.zones.length + Object.keys(file.extra).length)
  })
})

describe('words beside a value', () => {
  const context = { axisKind: 'linear' as const, base: 800, prove: [] }
  const beside = (name: string, value: number | string | boolean, cell = String(value), told = false) => besideValue(context, name, value, { cell, told })

  // 30.4 % of 800 N = 243.2 N; 0.00625 % of 800 N = 0.05 N: half-even to 0.0; 0.01875 % = 0.15 N: to 0.2.
  it.each([[30.4, 800, '243.2 N'], [0.00625, 800, '0 N'], [0.01875, 800, '0.2 N'], [38, 640, '243.2 N'], [-10, 640, '−64 N']])('%d %% of %d N is %s', (percent, base, words) => {
    expect(newtons(percent, base, 'linear')).toBe(words)
  })

  it('are newton metres on a rotary axis', () => expect(newtons(33.3, 1.25, 'rotary')).toBe('0.416 N·m'))

  it('stand beside forces alone', () => {
    expect(beside('overloadLevel', 60)).toBe('480 N')
    expect(beside('velocityFeedForward', 85)).toBe('')
    expect(isForcePercent('inertiaRatio')).toBe(false)
  })

  it('say what a coded value means', () => {
    expect(beside('inputSwitching', 'p', '1')).toBe('p, pulls to plus')
    expect(beside('outputSwitching', 'n')).toBe('n, pulls to 0 V')
    expect(beside('onEnableLoss', 'stop-and-hold', '0')).toBe('stop and hold')
    expect(beside('softLimitsActive', true, '1')).toBe('on')
  })

  it('tell the value where the list counts another way, and are silent where it only writes more digits', () => {
    expect(beside('softLimitMin', 2, '2,00', true)).toBe('')
    expect(beside('softLimitMin', 2.04, '2,0', true)).toBe('= 2.04 mm')
  })

  it('make a minus sign of a hyphen before a digit alone', () => {
    expect(['-1.5', '-', '-x', '1-2'].map(printed)).toEqual(['−1.5', '-', '-x', '1-2'])
  })
})

describe('labels', () => {
  it('are words with a capital, or the name where nobody knows it', () => {
    expect(['softLimitMin', 'zone:12:from', 'colour'].map(labelOf)).toEqual(['Soft limit, min', 'Zone 12, from', 'Colour'])
    expect(extraLabel('K-017', { 'K-017': { name: 'filter step' } })).toBe('filter step (K-017)')
    expect(extraLabel('toString', {})).toBe('toString')
  })

  it('have the unit of the kind of axis', () => {
    expect([unitOf('softLimitMin', 'rotary', undefined), unitOf('zone:1:to', 'rotary', undefined), unitOf('followingErrorWindow', 'linear', undefined), unitOf('homingMethod', 'linear', undefined)]).toEqual(['deg', 'deg', '± mm', ''])
    expect(unitOf('extra:K', 'linear', { dictionary: { K: { unit: 'counts' } } })).toBe('counts')
    expect(unitOf('extra:toString', 'linear', { dictionary: {} })).toBe('')
  })
})
