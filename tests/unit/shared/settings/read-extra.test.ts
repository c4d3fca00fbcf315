import { describe, expect, it } from 'vitest'
import { maxExtra, readExtra } from '../../../../shared/settings/read-extra'
import { objectReadingOf } from '../../../support/settings-reading'

function read(extra: unknown, limit = maxExtra) {
  const { reading, object, told } = objectReadingOf(typeof extra === 'string' ? extra : JSON.stringify(extra))
  return { extra: readExtra(reading, object, '/extra', limit), told: told() }
}

describe('values', () => {
  it.each([
    ['15'], ['true'], ['false'], ['"B"'], ['""'], ['{"value":3,"unit":"counts"}'], ['1e+40'], ['4294967295'], ['0.1'],
  ])('%s is kept', (text) => {
    expect(read(`{"K":${text}}`)).toEqual({ extra: { K: JSON.parse(text) as unknown }, told: [] })
  })

  it('null is left out', () => expect(read({ K: null, L: 1 })).toEqual({ extra: { L: 1 }, told: [] }))
  it('minus zero is zero', () => expect(Object.is(read('{"K":-0}').extra.K, 0)).toBe(true))

  it.each([
    ['[1]', 'json-syntax /extra/K'], ['9007199254740993', 'number-digits /extra/K'], ['1e99', 'number-range /extra/K'], [`"${'x'.repeat(257)}"`, 'text-length /extra/K'], [String.raw`"a\u0007"`, 'text-character /extra/K'],
    ['{"value":3}', 'missing /extra/K/unit'], ['{"unit":"A"}', 'missing /extra/K/value'], ['{"value":null,"unit":"A"}', 'missing /extra/K/value'], ['{"value":3,"unit":""}', 'missing /extra/K/unit'],
    ['{"value":"3","unit":"A"}', 'number-syntax /extra/K/value'], ['{"value":3,"unit":"text"}', 'not-allowed-here /extra/K/unit'], ['{"value":3,"unit":5}', 'json-syntax /extra/K/unit'],
    ['{"value":3,"unit":"A","x":1}', 'key-unknown /extra/K/x'], [`{"value":3,"unit":"${'u'.repeat(33)}"}`, 'text-length /extra/K/unit'],
  ])('%s: %s', (text, problem) => expect(read(`{"K":${text}}`)).toMatchObject({ told: [problem] }))
})

describe('keys', () => {
  it.each(['K-017', '101', 'a/b', 'm~n', 'constructor', 'toString', 'hasOwnProperty', 'two words', '=1', '\'', '😀'.repeat(64)])('%j is kept', (key) => {
    const { extra, told } = read({ [key]: 1 })
    expect(told).toEqual([])
    expect(Object.entries(extra)).toEqual([[key, 1]])
  })

  it.each([
    ['{"":1}', 'text-length /extra/'], [`{"${'k'.repeat(65)}":1}`, `text-length /extra/${'k'.repeat(65)}`], ['{" K":1}', 'text-character /extra/ K'], ['{"K ":1}', 'text-character /extra/K '], ['{"\u00a0K":1}', 'text-character /extra/\u00a0K'],
    [String.raw`{"a\u202eb":1}`, 'text-character /extra/a\u202eb'], ['{"__proto__":1}', 'not-allowed-here /extra/__proto__'], ['{"__proto__":{"value":1,"unit":"A"}}', 'not-allowed-here /extra/__proto__'],
  ])('%s: %s', (text, problem) => expect(read(text)).toEqual({ extra: {}, told: [problem] }))

  it('are kept in NFC, and two that are then the same are one too many', () => {
    expect(read('{"Gro\u0308\u00dfe":1}').extra).toEqual({ Größe: 1 })
    expect(read('{"Gro\u0308\u00dfe":1,"Gr\u00f6\u00dfe":2}')).toEqual({ extra: { Größe: 1 }, told: ['key-duplicate /extra/Gr\u00f6\u00dfe'] })
  })

  it('given twice are reported once', () => expect(read('{"K":1,"K":2}').told).toEqual(['key-duplicate /extra/K']))
  it('do not reach the prototype', () => {
    read('{"__proto__":{"polluted":true}}')
    expect(({} as Record<string, unknown>).polluted).toBeUndefined()
  })
})

describe('limits', () => {
  const many = (count: number) => Object.fromEntries(Array.from({ length: count }, (_, index) => [`k${index}`, index]))

  it('are told with the size', () => {
    const { reading, object, message } = objectReadingOf(JSON.stringify(many(5001)))
    expect(readExtra(reading, object, '/extra', maxExtra)).toEqual({})
    expect(message()).toBe('5001 values; at most 5000 are read.')
  })

  it('are reached without a problem', () => expect(read(many(5000)).told).toEqual([]))
})
