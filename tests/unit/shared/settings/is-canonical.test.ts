import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { CodedError } from '../../../../shared/errors/coded'
import { canonicalJson } from '../../../../shared/settings/canonical'
import { isCanonicalText } from '../../../../shared/settings/is-canonical'

const said = (text: string) => isCanonicalText(text, JSON.parse(text))

/** The naive way: print it again and compare. */
function naive(text: string): boolean {
  try {
    return canonicalJson(JSON.parse(text)) === text
  }
  catch (error) {
    if (error instanceof CodedError) return false
    throw error
  }
}

describe('a canonical text', () => {
  it.each([
    ['{"a":1,"b":[true,null,"ä"]}', true], ['{"b":1,"a":2}', false], ['{"a":{"d":1,"c":2}}', false], ['{"a": 1}', false], ['{"a":1.0}', false], ['{"a":1e3}', false], ['{"a":-0}', false],
    ['{"a":1,"a":1}', false], ['"\\u00e4"', false], ['"\\/"', false], ['"\\ud800"', false], ['"a\\\\ud"', true], ['{"10":1,"9":2}', true], ['{"9":1,"10":2}', false], ['{"a":"\\u0001"}', true], ['{"a":"\\n"}', true], ['1e+21', true],
    ['{"":1,"A":2,"a":3,"é":4,"😀":5}', true], ['{"😀":1,"ﬀ":2}', true], ['{"ﬀ":1,"😀":2}', false],
  ])('%s: %s', (text, canonical) => {
    expect(said(text)).toBe(canonical)
    expect(naive(text)).toBe(canonical)
  })

  it('law: is what canonicalJson prints, and nothing else is', () => {
    fc.assert(fc.property(fc.json({ maxDepth: 4 }), (text) => {
      expect(said(text)).toBe(naive(text))
      const printed = canonicalJson(JSON.parse(text))
      expect(said(printed)).toBe(true)
    }), { numRuns: 500 })
  })

  it('law: with one sign changed is judged as by printing it again', () => {
    fc.assert(fc.property(fc.json({ maxDepth: 3 }), fc.nat(), fc.constantFrom(' ', '0', '"', '1', '.', 'e', '\\', 'b', ','), (text, at, sign) => {
      const printed = canonicalJson(JSON.parse(text))
      const changed = printed.slice(0, at % (printed.length + 1)) + sign + printed.slice(at % (printed.length + 1))
      let value: unknown
      try {
        value = JSON.parse(changed)
      }
      catch {
        return
      }
      expect(isCanonicalText(changed, value)).toBe(naive(changed))
    }), { numRuns: 500 })
  })

  it('may be deeper than a log entry ever is', () => {
    expect(said(`${'['.repeat(500)}${']'.repeat(500)}`)).toBe(true)
    expect(said(`${'['.repeat(2000)}${']'.repeat(2000)}`)).toBe(false)
  })
})
