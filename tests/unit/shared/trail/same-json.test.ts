import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { canonicalJson } from '../../../../shared/settings/canonical'
import { isSameJson } from '../../../../shared/trail/same-json'

describe('two values of JSON', () => {
  it.each([
    [{ a: 1, b: 2 }, { b: 2, a: 1 }, true], [{ a: 1 }, { a: 1, b: null }, false], [{ a: null }, {}, false], [{ a: null }, { b: null }, false], [[1, 2], [2, 1], false], [[1], { 0: 1 }, false], [[], {}, false],
    [0, -0, true], [1, '1', false], [true, 1, false], [null, 0, false], [null, undefined, false], [undefined, undefined, true], ['ä', 'a\u0308', false],
  ])('%j and %j: %s', (one, other, same) => {
    expect(isSameJson(one, other)).toBe(same)
    expect(isSameJson(other, one)).toBe(same)
  })

  it('law: are the same where their canonical forms are', () => {
    const value = fc.jsonValue({ maxDepth: 3, noUnicodeString: true })
    fc.assert(fc.property(value, value, (one, other) => {
      expect(isSameJson(one, other)).toBe(canonicalJson(one) === canonicalJson(other))
      expect(isSameJson(one, JSON.parse(canonicalJson(one)))).toBe(true)
    }), { numRuns: 500 })
  })
})
