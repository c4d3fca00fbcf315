import fc from 'fast-check'
import jsonpatch from 'fast-json-patch'
import { describe, expect, it } from 'vitest'
import { applyFlat } from '../../../../shared/diff/apply'
import { diffContents } from '../../../../shared/diff/diff'
import { jsonPatchOf } from '../../../../shared/diff/json-patch'
import { arbitraryContent, arbitraryPair } from '../../../support/arbitrary-content'

const anyTwo = fc.oneof(arbitraryPair(), fc.tuple(arbitraryContent(), arbitraryContent()))

describe('the flat reading', () => {
  it('leads from the first content to the second', () => {
    fc.assert(fc.property(anyTwo, ([a, b]) => { expect(applyFlat(a, diffContents(a, b))).toEqual(b) }), { numRuns: 300 })
  })
  it('as a JSON Patch leads a general library there', () => {
    fc.assert(fc.property(anyTwo, ([a, b]) => {
      const patched = jsonpatch.applyPatch(structuredClone(a), structuredClone(jsonPatchOf(a, b)) as jsonpatch.Operation[], true).newDocument
      expect(patched).toEqual(b)
    }), { numRuns: 300 })
  })
})
