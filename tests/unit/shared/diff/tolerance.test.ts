import { describe, expect, it } from 'vitest'
import { toleranceOf } from '../../../../shared/diff/tolerance'
import type { FieldChange } from '../../../../shared/diff/types'

const change = (section: FieldChange['section'], field: string, weight: FieldChange['weight'] = 'motion'): FieldChange =>
  ({ at: '', section, field, weight, watched: true })
const nameplate = { resolution: 0.02, shownDigit: 0.1 }
const steps = { speed: 1, acceleration: 10 }

describe('read-back tolerance', () => {
  it.each([
    ['move', 'target', 0.06], ['move', 'window', 0.06], ['move', 'approach', 0.06], ['zone', 'from', 0.06], ['setup', 'softLimitMax', 0.06],
    ['setup', 'modulo', 0.06], ['setup', 'followingErrorWindow', 0.06],
    ['move', 'speed', 0.5], ['move', 'pressSpeed', 0.5], ['setup', 'speedLimit', 0.5],
    ['move', 'acceleration', 5], ['move', 'deceleration', 5], ['setup', 'quickStopDeceleration', 5],
    ['move', 'forceLimit', 0], ['move', 'next', 0], ['move', 'kind', 0], ['move', 'dwell', 0], ['setup', 'mountingAngle', 0], ['setup', 'jerk', 0],
    ['setup', 'payloadMass', 0], ['setup', 'brakeFitted', 0], ['extra', 'target', 0], ['file', 'axisKind', 0],
  ] as const)('of %s %s is %d', (section, field, tolerance) => {
    expect(toleranceOf(change(section, field), nameplate, steps).toNumber()).toBe(tolerance)
  })

  it('is a whole digit or step where the drive truncates', () => {
    const truncating = { ...nameplate, truncates: true }
    expect(toleranceOf(change('move', 'target'), truncating, steps).toNumber()).toBe(0.11)
    expect(toleranceOf(change('move', 'speed'), truncating, steps).toNumber()).toBe(1)
  })

  it('of harm is at most one shown digit', () => {
    expect(toleranceOf(change('setup', 'softLimitMax', 'harm'), { ...nameplate, truncates: true }, steps).toNumber()).toBe(0.1)
    expect(toleranceOf(change('setup', 'softLimitMax', 'harm'), nameplate, steps).toNumber()).toBe(0.06)
  })

  it('is 0 where nothing is known', () => {
    expect(toleranceOf(change('move', 'target'), {}, {}).toNumber()).toBe(0)
    expect(toleranceOf(change('move', 'speed'), {}, {}).toNumber()).toBe(0)
  })
})
