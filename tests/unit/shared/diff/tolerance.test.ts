import { describe, expect, it } from 'vitest'
import { toleranceOf } from '../../../../shared/diff/tolerance'
import type { FieldChange } from '../../../../shared/diff/types'
import { liftPlate, steppedTable } from '../../../support/entry-table'

const change = (section: FieldChange['section'], field: string, weight: FieldChange['weight'] = 'motion'): FieldChange =>
  ({ at: '', section, field, weight, watched: true })
const nameplate = { axisKind: 'linear', resolution: 0.02, shownDigit: 0.1, entryTable: steppedTable(1, 10) } as const

describe('read-back tolerance', () => {
  it.each([
    ['move', 'target', 0.06], ['move', 'window', 0.06], ['move', 'approach', 0.06], ['zone', 'from', 0.06], ['setup', 'softLimitMax', 0.06],
    ['setup', 'modulo', 0.06], ['setup', 'followingErrorWindow', 0.06],
    ['move', 'speed', 0.5], ['move', 'pressSpeed', 0.5], ['setup', 'speedLimit', 0.5],
    ['move', 'acceleration', 5], ['move', 'deceleration', 5], ['setup', 'quickStopDeceleration', 5],
    ['move', 'forceLimit', 0], ['move', 'next', 0], ['move', 'kind', 0], ['move', 'dwell', 0], ['setup', 'mountingAngle', 0], ['setup', 'jerk', 0],
    ['setup', 'payloadMass', 0], ['setup', 'brakeFitted', 0], ['extra', 'target', 0], ['file', 'axisKind', 0],
  ] as const)('of %s %s is %d', (section, field, tolerance) => {
    expect(toleranceOf(change(section, field), nameplate).toNumber()).toBe(tolerance)
  })

  it('is a whole digit or step where the drive truncates', () => {
    const truncating = { ...nameplate, truncates: true }
    expect(toleranceOf(change('move', 'target'), truncating).toNumber()).toBe(0.11)
    expect(toleranceOf(change('move', 'speed'), truncating).toNumber()).toBe(1)
  })

  it('of harm is at most one shown digit', () => {
    expect(toleranceOf(change('setup', 'softLimitMax', 'harm'), { ...nameplate, truncates: true }).toNumber()).toBe(0.1)
    expect(toleranceOf(change('setup', 'softLimitMax', 'harm'), nameplate).toNumber()).toBe(0.06)
  })

  it('of a speed that the entry rounds down is a whole step, of a harm value at most one digit of its list', () => {
    // m/s in steps of 0.005 with three digits: steps of 5 mm/s, of which the list shows 1 mm/s.
    expect(toleranceOf(change('setup', 'speedLimit'), liftPlate).toNumber()).toBe(5)
    expect(toleranceOf(change('setup', 'speedLimit', 'harm'), liftPlate).toNumber()).toBe(1)
  })

  it('is 0 for what the entry table has without a step, and on an axis of unknown kind', () => {
    expect(toleranceOf(change('move', 'speed'), liftPlate).toNumber()).toBe(0)
    expect(toleranceOf(change('setup', 'speedLimit'), { entryTable: liftPlate.entryTable }).toNumber()).toBe(0)
  })

  it('is 0 where nothing is known', () => {
    expect(toleranceOf(change('move', 'target'), {}).toNumber()).toBe(0)
    expect(toleranceOf(change('move', 'speed'), {}).toNumber()).toBe(0)
  })
})
