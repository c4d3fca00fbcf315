import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { missingFor, stepOf, type Progress } from '../../../../shared/swap/steps'
import { swapSteps } from '../../../../shared/swap/types'

const nothing: Progress = { fitted: false, safe: false, readBack: false, firstMotion: false, running: false, ended: null }
const progress = fc.record({ fitted: fc.boolean(), safe: fc.boolean(), readBack: fc.boolean(), firstMotion: fc.boolean(), running: fc.boolean(), ended: fc.constantFrom('released', 'abandoned', null) })

describe('the steps of a swap', () => {
  it('come one after the other', () => {
    expect(stepOf(nothing)).toBe('unit-in')
    expect(stepOf({ ...nothing, fitted: true })).toBe('safe')
    expect(stepOf({ ...nothing, fitted: true, safe: true, readBack: true })).toBe('first-motion')
    expect(stepOf({ ...nothing, fitted: true, safe: true, readBack: true, firstMotion: true, running: true })).toBe('release')
    expect(stepOf({ ...nothing, ended: 'abandoned' })).toBe('abandoned')
  })

  it('name all that come first, in order', () => {
    expect(missingFor('unit-in', nothing)).toEqual([])
    expect(missingFor('release', { ...nothing, fitted: true, readBack: true })).toEqual(['safe', 'first-motion', 'running'])
  })

  it('the step that is next is the one before which nothing is missing', () => fc.assert(fc.property(progress, (at) => {
    const step = stepOf(at)
    if (step === 'released' || step === 'abandoned') return at.ended === step
    return missingFor(step, at).length === 0 && swapSteps.slice(swapSteps.indexOf(step) + 1).every(later => missingFor(later, at).includes(step))
  })))
})
