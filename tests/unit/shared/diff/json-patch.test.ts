import fc from 'fast-check'
import { applyPatch, type Operation } from 'fast-json-patch'
import { describe, expect, it } from 'vitest'
import { jsonPatchOf } from '../../../../shared/diff/json-patch'
import { arbitraryContent, arbitraryPair } from '../../../support/arbitrary-content'

const anyTwo = fc.oneof(arbitraryPair(), fc.tuple(arbitraryContent(), arbitraryContent()))

describe('JSON Patch', () => {
  it('leads a general library from the first content to the second', () => {
    fc.assert(fc.property(anyTwo, ([a, b]) => {
      const operations = structuredClone(jsonPatchOf(a, b)) as Operation[]
      expect(applyPatch(structuredClone(a), operations, true).newDocument).toEqual(b)
    }), { numRuns: 300 })
  })
})
