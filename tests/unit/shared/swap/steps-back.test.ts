import { describe, expect, it } from 'vitest'
import { missingFor, stepOf, type Progress } from '../../../../shared/swap/steps'
import { swapStates, swapSteps } from '../../../../shared/swap/types'

const bits = [0, 1]
/** Every state that a swap can be in, 2⁵ ways to have done things times three ways to stand. */
const all: Progress[] = bits.flatMap(fitted => bits.flatMap(safe => bits.flatMap(readBack => bits.flatMap(firstMotion => bits.flatMap(running => ([null, 'released', 'abandoned'] as const).map(ended => (
  { fitted: fitted === 1, safe: safe === 1, readBack: readBack === 1, firstMotion: firstMotion === 1, running: running === 1, ended })))))))
const done = ({ fitted, safe, readBack, firstMotion, running, ended }: Progress) => [fitted, safe, readBack, firstMotion, running, ended === 'released']

describe('every state of a swap', () => {
  it('the next step is the first that is not done, whatever was done behind it', () => {
    for (const progress of all.filter(({ ended }) => ended === null)) expect(stepOf(progress)).toBe(swapSteps[done(progress).indexOf(false)])
  })

  it('one that has ended stands at how it ended, however far it came', () => {
    for (const progress of all.filter(({ ended }) => ended !== null)) expect(stepOf(progress)).toBe(progress.ended)
  })

  it('a step is missing all before it that are not done, and never itself or a later one', () => {
    for (const progress of all) for (const [index, step] of swapSteps.entries()) {
      expect(missingFor(step, progress)).toEqual(swapSteps.filter((_, at) => at < index && !done(progress)[at]))
    }
  })

  it('each state can be reached', () => expect(new Set(all.map(stepOf))).toEqual(new Set(swapStates)))
})

describe('a unit that is put back', () => {
  it('begins anew: what was done with the other one counts for nothing', () => {
    const before: Progress = { fitted: true, safe: true, readBack: true, firstMotion: false, running: false, ended: null }
    expect(stepOf({ ...before, fitted: false })).toBe('unit-in')
    expect(missingFor('first-motion', { ...before, fitted: false, safe: false, readBack: false })).toEqual(['unit-in', 'safe', 'read-back'])
  })
})
