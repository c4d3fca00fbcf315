import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { TokenError } from '../../../../shared/settings/json-cursor'
import { jsonTree, maxNesting } from '../../../../shared/settings/json-tokens'
import type { RawNode } from '../../../../shared/settings/raw'

/** What JSON.parse would make of the tree; of two equal keys the last counts, as there. */
function plain(node: RawNode, text: string): unknown {
  switch (node.kind) {
    case 'object': {
      const object: Record<string, unknown> = {}
      node.keys.forEach((key, index) => Object.defineProperty(object, key, { value: plain(node.values[index] as RawNode, text), enumerable: true, configurable: true, writable: true }))
      return object
    }
    case 'list': return node.items.map(item => plain(item, text))
    case 'text': return node.text
    case 'number': return Number(text.slice(node.offset, node.end))
    case 'flag': return node.value
    default: return null
  }
}

function outcome(text: string): { readonly value: unknown } | { readonly code: string, readonly offset: number } {
  try {
    return { value: plain(jsonTree(text), text) }
  }
  catch (error) {
    if (error instanceof TokenError) return { code: error.code, offset: error.offset }
    throw error
  }
}

function parsed(text: string): { readonly value: unknown } | undefined {
  try {
    return { value: JSON.parse(text) as unknown }
  }
  catch (error) {
    if (error instanceof SyntaxError) return undefined
    throw error
  }
}

const fault = (text: string) => {
  const result = outcome(text)
  return 'code' in result ? `${result.code} ${result.offset}` : 'read'
}

const document = fc.json({ maxDepth: 5, stringUnit: 'binary' })

describe('held against JSON.parse', () => {
  it('reads every document that JSON.stringify writes', () => {
    fc.assert(fc.property(document, (text) => {
      expect(outcome(text)).toEqual(parsed(text))
    }), { numRuns: 200 })
  })

  it('reads them with white space anywhere between the signs', () => {
    fc.assert(fc.property(fc.jsonValue({ maxDepth: 4 }), fc.string({ unit: fc.constantFrom(' ', '\t'), maxLength: 4 }), (value, indent) => {
      const text = `\r\n${JSON.stringify(value, null, indent)}\t \n`
      expect(outcome(text)).toEqual(parsed(text))
    }), { numRuns: 300 })
  })

  it('gives the same verdict on broken documents', () => {
    const broken = fc.tuple(document, fc.nat(), fc.nat({ max: 2 }), fc.constantFrom(...'{}[]",:\\-+.eE0159tfn\u0000\n u\u00a0\ufeff')).map(([text, at, cut, sign]) => {
      const index = at % (text.length + 1)
      return text.slice(0, index) + sign + text.slice(index + cut)
    })
    fc.assert(fc.property(broken, (text) => {
      const expected = parsed(text)
      const result = outcome(text)
      if (expected === undefined) expect(result).toHaveProperty('code')
      else expect(result).toEqual(expected)
    }), { numRuns: 1000 })
  })

  it('gives the same verdict on any short text of JSON signs', () => {
    fc.assert(fc.property(fc.string({ unit: fc.constantFrom(...'{}[]",:\\-+.eE019', 'true', 'null', '"a"', ' '), maxLength: 9 }), (text) => {
      const expected = parsed(text)
      expect('value' in outcome(text)).toBe(expected !== undefined)
    }), { numRuns: 2000 })
  })
})

// Typed in by the grammar of RFC 8259: what must be read, and what must not, with the place of the first sign out of order.
describe('the grammar of RFC 8259', () => {
  it.each([
    '0', '-0', '1', '-1.5', '1e5', '1E-5', '1.25e+10', '""', '"a"', 'true', 'false', 'null', '[]', '{}', ' [ ] ', '[[[]]]', '{"":""}', '{"a":1,"b":[1,2,{"c":null}]}',
    String.raw`"\"\\\/\b\f\n\r\t"`, String.raw`"\u0041\uD83D\uDE00\ud83d"`, '"\u007f"', '"\u2028"', '"é😀"', '[1 ,2]', '{"a" : 1}', '123456789012345678901234567890',
  ])('reads %s', text => expect(outcome(text)).toEqual(parsed(text)))

  it.each([
    ['', 0], [' ', 1], ['[', 1], ['[1', 2], ['[1,', 3], ['[1,]', 3], ['[,1]', 1], ['[1 2]', 3], ['[1}', 2], ['{', 1], ['{"a"', 4], ['{"a":', 5], ['{"a":1', 6], ['{"a":1,}', 7],
    ['{"a" 1}', 5], ['{a:1}', 1], ['{\'a\':1}', 1], ['{1:1}', 1], ['{"a":1 "b":2}', 7], ['{"a"::1}', 5], ['nul', 0], ['True', 0], ['NaN', 0], ['Infinity', 0], ['undefined', 0],
    ['-', 1], ['+1', 0], ['.5', 0], ['5.', 2], ['1.e5', 2], ['1e', 2], ['1e+', 3], ['01', 0], ['-01', 1], ['1.2.3', 3], ['0x1', 1], ['1_000', 1], ['--1', 1],
    ['"', 1], ['"a', 2], ['"\\', 1], ['"\\a"', 1], ['"\\u12"', 1], ['"\\u12g4"', 1], ['"\\U0041"', 1], ['"a\nb"', 2], ['"\u0000"', 1], ['"\u001f"', 1],
    ['1 2', 2], ['[] []', 3], ['{}}', 2], ['//x', 0], ['/* x */ 1', 0], ['\ufeff1', 0], ['\u00a01', 0], ['[1]\u0000', 3], ['"a""b"', 3], ['truefalse', 4],
  ])('refuses %j at %d', (text, offset) => expect(fault(text)).toBe(`json-syntax ${offset}`))
})

describe('places', () => {
  it('are those of each value and key', () => {
    const text = '{ "a": [10, "x"], "b": { "c": true } }'
    fc.assert(fc.property(fc.constant(text), () => {
      const root = jsonTree(text)
      if (root.kind !== 'object') return false
      expect(root.keyOffsets.map(offset => text.slice(offset, offset + 3))).toEqual(['"a"', '"b"'])
      expect(root.values.map(value => text.slice(value.offset, value.end))).toEqual(['[10, "x"]', '{ "c": true }'])
      return text.slice(root.offset, root.end) === text
    }))
  })

  it('cut every value of any document out as JSON of its own', () => {
    const walk = (node: RawNode, text: string): void => {
      expect(JSON.parse(text.slice(node.offset, node.end))).toEqual(plain(node, text))
      if (node.kind === 'object') node.values.forEach(value => walk(value, text))
      if (node.kind === 'list') node.items.forEach(item => walk(item, text))
    }
    fc.assert(fc.property(fc.json({ maxDepth: 3 }), text => walk(jsonTree(text), text)), { numRuns: 200 })
  })
})

describe('numbers', () => {
  const valueOf = (text: string) => {
    const node = jsonTree(text)
    return node.kind === 'number' ? node.value : undefined
  }

  it('come with their value where 15 digits and 6 places hold it', () => {
    const plainNumber = fc.tuple(fc.constantFrom('', '-'), fc.integer({ min: 0, max: 999_999_999 }), fc.string({ unit: fc.constantFrom(...'0123456789'), maxLength: 6 }))
      .map(([sign, whole, tail]) => `${sign}${whole}${tail && `.${tail}`}`)
    fc.assert(fc.property(plainNumber, text => Object.is(valueOf(text), Number(text) + 0)), { numRuns: 2000 })
  })

  it.each(['1e3', '0.1234567', '1234567890123456', '1.0000000'])('leave %s to decimal arithmetic', text => expect(valueOf(text)).toBeNaN())

  it('never answer minus zero', () => expect(Object.is(valueOf('-0.00'), 0)).toBe(true))
})

describe('nesting', () => {
  const nested = (depth: number, open: string, close: string) => open.repeat(depth) + close.repeat(depth)

  it('is read to eight levels', () => {
    expect(maxNesting).toBe(8)
    expect(fault(nested(8, '[', ']'))).toBe('read')
    expect(fault(`${'{"a":'.repeat(8)}1${'}'.repeat(8)}`)).toBe('read')
  })

  it('is refused at the sign that opens the ninth', () => {
    expect(fault(nested(9, '[', ']'))).toBe('nesting 8')
    expect(fault(`${'{"a":'.repeat(8)}[]${'}'.repeat(8)}`)).toBe('nesting 40')
  })

  it('does not exhaust the stack: 2 MiB of brackets are refused at once', () => {
    expect(fault('['.repeat(2 ** 21))).toBe('nesting 8')
    expect(fault('{"a":'.repeat(400_000))).toBe('nesting 40')
  })
})
