import { createHash } from 'node:crypto'
import canonicalize from 'canonicalize'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { CodedError } from '../../../../shared/errors/coded'
import { canonicalJson, canonicalText, contentParts } from '../../../../shared/settings/canonical'
import { exampleFiles } from '../../../../shared/settings/examples'
import { contentOf } from '../../../../shared/settings/content'
import type { Content } from '../../../../shared/settings/types'
import { arbitraryContent } from '../../../support/arbitrary-content'

function double(hex: string): number {
  const view = new DataView(new ArrayBuffer(8))
  view.setBigUint64(0, BigInt(`0x${hex}`))
  return view.getFloat64(0)
}

const sha256 = (text: string) => createHash('sha256').update(text, 'utf8').digest('hex')

const codeOf = (value: unknown) => {
  try {
    return `text ${canonicalJson(value)}`
  }
  catch (error) {
    return error instanceof CodedError ? error.code : String(error)
  }
}

describe('numbers', () => {
  // RFC 8785, Appendix B, table 1.
  it.each([
    ['0000000000000000', '0'], ['8000000000000000', '0'], ['0000000000000001', '5e-324'], ['8000000000000001', '-5e-324'],
    ['7fefffffffffffff', '1.7976931348623157e+308'], ['ffefffffffffffff', '-1.7976931348623157e+308'],
    ['4340000000000000', '9007199254740992'], ['c340000000000000', '-9007199254740992'], ['4430000000000000', '295147905179352830000'],
    ['44b52d02c7e14af5', '9.999999999999997e+22'], ['44b52d02c7e14af6', '1e+23'], ['44b52d02c7e14af7', '1.0000000000000001e+23'],
    ['444b1ae4d6e2ef4e', '999999999999999700000'], ['444b1ae4d6e2ef4f', '999999999999999900000'], ['444b1ae4d6e2ef50', '1e+21'],
    ['3eb0c6f7a0b5ed8c', '9.999999999999997e-7'], ['3eb0c6f7a0b5ed8d', '0.000001'],
    ['41b3de4355555553', '333333333.3333332'], ['41b3de4355555554', '333333333.33333325'], ['41b3de4355555555', '333333333.3333333'],
    ['41b3de4355555556', '333333333.3333334'], ['41b3de4355555557', '333333333.33333343'],
    ['becbf647612f3696', '-0.0000033333333333333333'], ['43143ff3c1cb0959', '1424953923781206.2'],
  ])('%s is %s', (hex, text) => expect(canonicalJson(double(hex))).toBe(text))

  it.each(['7fffffffffffffff', '7ff0000000000000', 'fff0000000000000'])('%s is refused', hex => expect(codeOf(double(hex))).toBe('not-canonical'))
})

describe('objects', () => {
  // RFC 8785, 3.2.2 to 3.2.4: the object of the RFC and its bytes.
  it('are those of the RFC', () => {
    const sent = String.raw`{"numbers": [333333333.33333329, 1E30, 4.50, 2e-3, 0.000000000000000000000000001],
      "string": "\u20ac$\u000F\u000aA'\u0042\u0022\u005c\\\"\/", "literals": [null, true, false]}`
    const text = canonicalJson(JSON.parse(sent))
    expect(text).toBe(String.raw`{"literals":[null,true,false],"numbers":[333333333.3333333,1e+30,4.5,0.002,1e-27],"string":"€$\u000f\nA'B\"\\\\\"/"}`)
    expect(new TextEncoder().encode(text)).toHaveLength(118)
    expect(sha256(text)).toBe('2d5e01a318d0f0879ab568c4be289c8b1f64ef8921a53c6277d5e069978baacb')
  })

  // RFC 8785, 3.2.3: sorted by UTF-16 code units, where the emoji comes before the Hebrew letter.
  it('are sorted as the RFC says', () => {
    const names = { '\u20ac': 'Euro Sign', '\r': 'Carriage Return', '\ufb33': 'Hebrew Letter Dalet With Dagesh', '1': 'One', '\ud83d\ude00': 'Emoji: Grinning Face', '\u0080': 'Control', '\u00f6': 'Latin Small Letter O With Diaeresis' }
    const text = canonicalJson(names)
    expect([...text.matchAll(/:"([^"]*)"/g)].map(match => match[1])).toEqual([
      'Carriage Return', 'One', 'Control', 'Latin Small Letter O With Diaeresis', 'Euro Sign', 'Emoji: Grinning Face', 'Hebrew Letter Dalet With Dagesh',
    ])
    expect(sha256(text)).toBe('5e321556d22018a9656991a9e94f77ec175fa193e52a2429d312f8419ec8b08c')
  })

  it('keep their texts as they are: no Unicode normalisation', () => {
    expect(canonicalJson({ a: 'A\u030a' })).toBe('{"a":"A\u030a"}')
  })

  it('agree with canonicalize 4 on any JSON value', () => {
    fc.assert(fc.property(fc.jsonValue({ maxDepth: 4, stringUnit: 'grapheme' }), value => canonicalJson(value) === canonicalize(value)), { numRuns: 500 })
  })

  it('escape what JSON.stringify escapes', () => {
    fc.assert(fc.property(fc.string({ unit: 'binary' }), text => canonicalJson(text) === JSON.stringify(text)))
  })
})

describe('what has no canonical form', () => {
  it.each([
    ['undefined', undefined], ['undefined in an object', { a: undefined }], ['undefined in a list', [undefined]], ['a hole in a list', Array.from({ length: 1 })],
    ['NaN', { a: [Number.NaN] }], ['a whole number of any size', 10n], ['a function', { a: () => 1 }], ['a symbol', Symbol('a')],
    ['a date', new Date(0)], ['a map', new Map([['a', 1]])], ['bytes', new Uint8Array(1)], ['a lone high surrogate', 'a\ud83d'], ['a lone low surrogate', '\ude00a'],
    ['a lone surrogate in a key', { '\ud83d': 1 }], ['surrogates in the wrong order', '\ude00\ud83d'],
  ])('%s', (_, value) => expect(codeOf(value)).toBe('not-canonical'))

  it('a value that holds itself', () => {
    const loop: unknown[] = []
    loop.push(loop)
    expect(codeOf(loop)).toBe('not-canonical')
  })
})

describe('canonicalText', () => {
  it('is canonicalJson and canonicalize for any content', () => {
    fc.assert(fc.property(arbitraryContent(), (content) => {
      const text = canonicalText(content)
      return text === canonicalJson(content) && text === canonicalize(content)
    }), { numRuns: 300 })
  })

  it('does not hang on the order in which keys were set', () => {
    const reversed = (value: unknown): unknown => {
      if (Array.isArray(value)) return value.map(reversed)
      if (typeof value !== 'object' || value === null) return value
      return Object.fromEntries(Object.entries(value).reverse().map(([key, each]) => [key, reversed(each)]))
    }
    fc.assert(fc.property(arbitraryContent(), content => canonicalText(reversed(content) as Content) === canonicalText(content)), { numRuns: 100 })
  })

  it('refuses a number that is none, and a lone surrogate', () => {
    const content = contentOf(exampleFiles[0] as (typeof exampleFiles)[number])
    const codes = [
      { ...content, setup: { softLimitMin: Number.NaN } }, { ...content, extra: { Filter: '\ud83d' } },
      { ...content, zones: [{ zone: 1, from: 0, to: Number.POSITIVE_INFINITY }] },
    ].map((each) => {
      try {
        return canonicalText(each)
      }
      catch (error) {
        return error instanceof CodedError ? error.code : 'another error'
      }
    })
    expect(codes).toEqual(['not-canonical', 'not-canonical', 'not-canonical'])
  })
})

describe('contentParts', () => {
  it('make the canonical text, and that without the home offset', () => {
    fc.assert(fc.property(arbitraryContent(), (content) => {
      const { homeOffset, ...setup } = content.setup
      const parts = contentParts(content)
      expect(parts.before + parts.setup + parts.after).toBe(canonicalText(content))
      expect(parts.before + parts.copySetup + parts.after).toBe(canonicalText({ ...content, setup }))
      return (parts.copySetup === parts.setup) === (homeOffset === undefined)
    }), { numRuns: 200 })
  })

  it('give one copy to two units with their own home offsets', () => {
    for (const file of exampleFiles) {
      const content = contentOf(file)
      const other = { ...content, setup: { ...content.setup, homeOffset: 77.25 } }
      expect(contentParts(other).copySetup).toBe(contentParts(content).copySetup)
      expect(contentParts(other).setup).not.toBe(contentParts(content).setup)
    }
  })
})
