import { describe, expect, it } from 'vitest'
import { readNumber, readOwnNumber, readWhole } from '../../../../shared/settings/read-number'
import { flagOf, readChoice, readFlag, readText } from '../../../../shared/settings/read-value'
import { textRules } from '../../../../shared/settings/text-rules'
import { cellReadingOf, readingOf } from '../../../support/settings-reading'

describe('readText', () => {
  const read = (text: string) => {
    const { reading, node, told } = readingOf(text)
    return [readText(reading, node, '/a', textRules.label), ...told()]
  }

  it.each([['"up"', 'up'], ['" up "', ' up '], [String.raw`"Mu\u0308ller"`, 'M\u00fcller'], ['"007"', '007']])('%s is kept', (text, value) => expect(read(text)).toEqual([value]))
  it.each([['7', 'json-syntax'], ['true', 'json-syntax'], ['{}', 'json-syntax'], [String.raw`"a\u0000"`, 'text-character'], [`"${'a'.repeat(41)}"`, 'text-length']])('%s: %s', (text, code) => {
    expect(read(text)).toEqual([undefined, `${code} /a`])
  })

  it('takes no unit in the CSV form', () => {
    const { reading, node, told } = cellReadingOf('up', 'mm')
    expect(readText(reading, node, '/a', textRules.label)).toBeUndefined()
    expect(told()).toEqual(['unit-unfit /a'])
  })
})

describe('readChoice', () => {
  it('takes the word alone, spelt exactly', () => {
    for (const [text, value] of [['"p"', 'p'], ['"n"', 'n'], ['"P"', undefined], ['"pnp"', undefined], ['1', undefined], ['true', undefined]] as const) {
      const { reading, node, told } = readingOf(text)
      expect(readChoice(reading, node, '/a', ['p', 'n'])).toBe(value)
      expect(told()).toEqual(value === undefined ? ['enum /a'] : [])
    }
  })

  it('lists the words and names the nearest', () => {
    const { reading, node, message } = readingOf('"hardstop"')
    readChoice(reading, node, '/a', ['hard-stop', 'index-pulse'])
    expect(message()).toBe('"hardstop" is not one of hard-stop, index-pulse.')
    expect(reading.problems.outcome().errors[0]?.meant).toBe('hard-stop')
  })
})

describe('readFlag', () => {
  it.each([['true', true], ['false', false], ['"true"', undefined], ['1', undefined], ['0', undefined]])('%s is %s', (text, value) => {
    const { reading, node, told } = readingOf(text)
    expect(readFlag(reading, node, '/a')).toBe(value)
    expect(told()).toEqual(value === undefined ? ['enum /a'] : [])
  })

  it.each([['true', true], ['TRUE', true], ['false', false], ['FALSE', false], ['True', undefined], ['wahr', undefined], ['1', undefined]])('the cell %s is %s', (text, value) => {
    expect(flagOf(text)).toBe(value)
    const { reading, node } = cellReadingOf(text)
    expect(readFlag(reading, node, '/a')).toBe(value)
  })
})

describe('a value refused before', () => {
  it('is passed over in silence by every reader', () => {
    const { reading, told } = readingOf('0')
    const node = { kind: 'refused' as const, offset: 0, end: 0 }
    const results = [
      readNumber(reading, node, '/a', 'mm'), readOwnNumber(reading, node, '/a'), readWhole(reading, node, '/a', 0, 1, 'row-number'),
      readText(reading, node, '/a', textRules.label), readChoice(reading, node, '/a', ['a']), readFlag(reading, node, '/a'),
    ]
    expect(results.every(result => result === undefined)).toBe(true)
    expect(told()).toEqual([])
  })
})
