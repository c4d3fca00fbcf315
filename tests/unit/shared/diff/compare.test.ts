import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { compareContents, type CompareOptions } from '../../../../shared/diff/compare'
import { diffContents } from '../../../../shared/diff/diff'
import type { FieldChange } from '../../../../shared/diff/types'
import type { Nameplate } from '../../../../shared/settings/nameplate'
import type { Content, Move, Setup } from '../../../../shared/settings/types'
import { emptyContent } from '../../../../shared/settings/content'
import { arbitraryContent } from '../../../support/arbitrary-content'
import { steppedTable } from '../../../support/entry-table'

const plate = (values: Partial<Nameplate>): Nameplate => ({ model: 'HL40-200V', axisKind: 'linear', stroke: 200, ...values })
const linear = emptyContent('linear')
const row: Move = { move: 5, kind: 'absolute', target: 150, speed: 250, acceleration: 2000 }
const ofTarget = (target: number, options: Partial<CompareOptions>) =>
  compareContents({ ...linear, moves: [row] }, { ...linear, moves: [{ ...row, target }] }, { sameUnit: true, ...options })
const ofSetup = (before: Setup, after: Setup, options: Partial<CompareOptions> = {}) =>
  compareContents({ ...linear, setup: before }, { ...linear, setup: after }, { sameUnit: true, ...options })

describe('a comparison', () => {
  it('of equal contents is identical', () => {
    fc.assert(fc.property(arbitraryContent(), (content) => {
      expect(compareContents(content, structuredClone(content), { sameUnit: true })).toEqual({ verdict: 'identical', differences: [], within: [], aside: [] })
    }), { numRuns: 50 })
  })

  it('puts each change in one place', () => {
    const both = fc.tuple(arbitraryContent({ kind: 'linear' }), arbitraryContent({ kind: 'linear' }))
    fc.assert(fc.property(both, fc.boolean(), ([a, b], sameUnit) => {
      const { verdict, differences, within, aside } = compareContents(a, b, { sameUnit, nameplate: plate({ resolution: 0.01, shownDigit: 0.1 }) })
      const names = (changes: readonly FieldChange[]) => changes.map(({ section, row: number, field }) => `${section} ${number} ${field}`).sort()
      const places = names([...differences, ...within, ...aside])
      expect(places).toEqual(names(diffContents(a, b)))
      expect(verdict).toBe(places.length === 0 ? 'identical' : differences.length === 0 ? 'same' : 'differs')
    }), { numRuns: 100 })
  })

  it('without resolution, digit or step is exact', () => {
    expect(ofTarget(150.000001, {}).verdict).toBe('differs')
    expect(ofTarget(150.000001, { nameplate: plate({}) }).differences[0]).not.toHaveProperty('tolerance')
  })
})

describe('positions', () => {
  const nameplate = plate({ resolution: 0.02, shownDigit: 0.1 })

  it('may be off by half a count and half a digit, inclusive', () => {
    expect(ofTarget(150.06, { nameplate })).toMatchObject({ verdict: 'same', within: [{ field: 'target', tolerance: 0.06 }] })
    expect(ofTarget(149.94, { nameplate }).verdict).toBe('same')
    expect(ofTarget(150.060001, { nameplate })).toMatchObject({ verdict: 'differs', differences: [{ field: 'target', tolerance: 0.06 }] })
  })

  it('may be off by a whole digit where the drive truncates', () => {
    const truncating = plate({ resolution: 0.02, shownDigit: 0.1, truncates: true })
    expect(ofTarget(150.11, { nameplate: truncating }).verdict).toBe('same')
    expect(ofTarget(150.110001, { nameplate: truncating }).verdict).toBe('differs')
  })

  it('go by what is known alone', () => {
    expect(ofTarget(150.01, { nameplate: plate({ resolution: 0.02 }) }).verdict).toBe('same')
    expect(ofTarget(150.05, { nameplate: plate({ shownDigit: 0.1 }) }).verdict).toBe('same')
    expect(ofTarget(150.050001, { nameplate: plate({ shownDigit: 0.1 }) }).verdict).toBe('differs')
  })

  it('are reckoned as decimals: a count of 0.0008 on either side', () => {
    expect(ofTarget(150.0004, { nameplate: plate({ resolution: 0.0008 }) }).verdict).toBe('same')
    expect(ofTarget(150.000401, { nameplate: plate({ resolution: 0.0008 }) }).verdict).toBe('differs')
  })

  it('that weigh harm are never off by more than one shown digit', () => {
    const coarse = plate({ resolution: 1, shownDigit: 0.1 })
    expect(ofSetup({ softLimitMax: 198 }, { softLimitMax: 198.1 }, { nameplate: coarse })).toMatchObject({ verdict: 'same', within: [{ tolerance: 0.1 }] })
    expect(ofSetup({ softLimitMax: 198 }, { softLimitMax: 198.2 }, { nameplate: coarse }).verdict).toBe('differs')
    expect(ofTarget(150.55, { nameplate: coarse }).verdict).toBe('same')
    expect(ofTarget(150.55, { nameplate: coarse, context: { flags: ['gravity'] } }).verdict).toBe('differs')
  })

  it('are windows, zones and approaches too, and angles of mounting are not', () => {
    expect(ofSetup({ inPositionWindow: 0.5 }, { inPositionWindow: 0.55 }, { nameplate }).verdict).toBe('same')
    expect(ofSetup({ mountingAngle: 90 }, { mountingAngle: 89.99 }, { nameplate }).verdict).toBe('differs')
    const zone = (to: number): Content => ({ ...linear, zones: [{ zone: 1, from: 0, to }] })
    expect(compareContents(zone(10), zone(10.06), { sameUnit: true, nameplate }).verdict).toBe('same')
  })
})

describe('speeds and accelerations', () => {
  const nameplate = plate({ entryTable: steppedTable(1, 10) })
  it('may be off by half a step of the entry table, a whole one where the drive truncates', () => {
    expect(ofSetup({ jogSpeed: 30 }, { jogSpeed: 30.5 }, { nameplate }).verdict).toBe('same')
    expect(ofSetup({ jogSpeed: 30 }, { jogSpeed: 30.500001 }, { nameplate }).verdict).toBe('differs')
    expect(ofSetup({ quickStopDeceleration: 8000 }, { quickStopDeceleration: 8005 }, { nameplate }).verdict).toBe('same')
    expect(ofSetup({ quickStopDeceleration: 8000 }, { quickStopDeceleration: 8010 }, { nameplate }).verdict).toBe('differs')
    expect(ofSetup({ quickStopDeceleration: 8000 }, { quickStopDeceleration: 8010 }, { nameplate: { ...nameplate, truncates: true } }).verdict).toBe('same')
  })
  it('are exact without a step, whatever the digits of positions', () => {
    expect(ofSetup({ jogSpeed: 30 }, { jogSpeed: 30.01 }, { nameplate: plate({ resolution: 0.1, shownDigit: 0.1 }) }).verdict).toBe('differs')
  })
})

describe('everything else', () => {
  const nameplate = plate({ resolution: 1, shownDigit: 1, entryTable: steppedTable(10, 100) })
  it.each([
    ['percentages', { thrustLimit: 80 }, { thrustLimit: 80.1 }], ['times', { startPulseTime: 12 }, { startPulseTime: 12.1 }],
    ['choices', { inputSwitching: 'p' }, { inputSwitching: 'n' }], ['flags', { brakeFitted: true }, { brakeFitted: false }],
    ['the drive’s own number', { velocityGain: 2 }, { velocityGain: 2.0000001 }], ['a value that is gone', { jogSpeed: 30 }, {}],
  ] as const)('is exact: %s', (_, before, after) => {
    expect(ofSetup(before, after, { nameplate }).verdict).toBe('differs')
  })

  it('is exact: followers, kinds, rows and the drive’s own values', () => {
    const moves = (...rows: Move[]): Content => ({ ...linear, moves: rows })
    const options = { sameUnit: true, nameplate }
    expect(compareContents(moves({ ...row, next: 1 }), moves({ ...row, next: 2 }), options).verdict).toBe('differs')
    expect(compareContents(moves(row), moves({ ...row, kind: 'relative' }), options).verdict).toBe('differs')
    expect(compareContents(moves(row), moves(), options).differences).toHaveLength(4)
    expect(compareContents(moves(), moves({ ...row, turn: 'signed' }), options).differences).toHaveLength(5)
    expect(compareContents({ ...linear, extra: { a: 1 } }, { ...linear, extra: { a: 1.1 } }, options).verdict).toBe('differs')
  })

  it('that is a default written out counts as what it stands for', () => {
    const moves = (deceleration?: number): Content => ({ ...linear, moves: [deceleration === undefined ? row : { ...row, deceleration }] })
    expect(compareContents(moves(), moves(2000), { sameUnit: true })).toMatchObject({ verdict: 'same', within: [{ field: 'deceleration', tolerance: 0 }] })
    expect(compareContents(moves(2000), moves(), { sameUnit: true }).verdict).toBe('same')
    expect(compareContents(moves(), moves(2004), { sameUnit: true, nameplate }).verdict).toBe('same')
    expect(compareContents(moves(), moves(2004), { sameUnit: true }).verdict).toBe('differs')
    expect(ofSetup({ softLimitMax: 198 }, { softLimitMax: 198, softLimitsActive: true }).verdict).toBe('same')
  })
})

describe('set aside', () => {
  it('is the home offset of another unit, and not of the same', () => {
    expect(ofSetup({ homeOffset: 3.5 }, { homeOffset: 4.1 }, { sameUnit: false })).toMatchObject({ verdict: 'same', aside: [{ field: 'homeOffset', before: 3.5, after: 4.1 }] })
    expect(ofSetup({ homeOffset: 3.5 }, { homeOffset: 4.1 }, { sameUnit: true })).toMatchObject({ verdict: 'differs', aside: [] })
  })

  it('is what is to be taught on this swap, absent values too', () => {
    const taught = ['positionGain', 'homeOffset'] as const
    expect(ofSetup({ positionGain: 40, homeOffset: 3.5 }, { positionGain: 35 }, { taught })).toMatchObject({ verdict: 'same', differences: [] })
    expect(ofSetup({ positionGain: 40, jogSpeed: 30 }, { jogSpeed: 31 }, { taught })).toMatchObject({ verdict: 'differs', aside: [{ field: 'positionGain' }], differences: [{ field: 'jogSpeed' }] })
  })

  it('is nothing outside the setup', () => {
    const extra = (homeOffset: number): Content => ({ ...linear, extra: { homeOffset } })
    expect(compareContents(extra(1), extra(2), { sameUnit: false }).verdict).toBe('differs')
  })
})
