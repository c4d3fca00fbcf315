import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { changeSchema, renumberingSchema } from '../../../../shared/api/versions'
import { diffContents } from '../../../../shared/diff/diff'
import { diffRenumbered } from '../../../../shared/diff/renumber'
import { arbitraryPair } from '../../../support/arbitrary-content'

describe('a difference on the wire', () => {
  it('is what the contract says, and comes back the same', () => {
    fc.assert(fc.property(arbitraryPair(), ([a, b]) => {
      const reading = diffRenumbered(a, b)
      const changes = [...diffContents(a, b), ...reading?.changes ?? []]
      for (const change of changes) expect(changeSchema.parse(JSON.parse(JSON.stringify(change)))).toEqual(change)
      for (const run of reading?.renumbered ?? []) expect(renumberingSchema.parse(run)).toEqual(run)
    }), { numRuns: 100 })
  })

  it('never names a row by its own number as a field', () => {
    fc.assert(fc.property(arbitraryPair(), ([a, b]) => {
      for (const change of diffContents(a, b)) {
        if (change.section !== 'extra') expect(['move', 'zone']).not.toContain(change.field)
        expect(change.row === undefined).toBe(change.section !== 'move' && change.section !== 'zone')
      }
    }), { numRuns: 100 })
  })

  it('has a delta exactly where two numbers of one unit stand against each other', () => {
    fc.assert(fc.property(arbitraryPair(), ([a, b]) => {
      for (const { section, before, after, delta, percent, points, unit } of diffContents(a, b)) {
        if (section !== 'extra') expect(delta !== undefined).toBe(typeof before === 'number' && typeof after === 'number')
        expect(points !== undefined).toBe(delta !== undefined && unit === '%')
        if (percent !== undefined) expect(Math.sign(percent)).toBe(Math.sign(delta ?? NaN))
      }
    }), { numRuns: 100 })
  })
})
