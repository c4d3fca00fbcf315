import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { checkText, textRules } from '../../../../shared/settings/text-rules'

const codeOf = (text: string, rule: keyof typeof textRules) => {
  const checked = checkText(text, textRules[rule])
  return typeof checked === 'string' ? 'kept' : checked.code
}

describe('lengths', () => {
  it.each([
    ['serial', 1, 64], ['actuatorSerial', 1, 64], ['model', 1, 64], ['actuatorModel', 1, 64], ['firmware', 1, 32], ['exportedBy', 1, 80], ['note', 1, 2000],
    ['label', 1, 40], ['comment', 1, 200], ['extraKey', 1, 64], ['extraText', 0, 256],
  ] as const)('%s has %d to %d characters', (rule, min, max) => {
    expect(codeOf('a'.repeat(max), rule)).toBe('kept')
    expect(codeOf('a'.repeat(max + 1), rule)).toBe('text-length')
    expect(codeOf('a'.repeat(min), rule)).toBe('kept')
    if (min > 0) expect(codeOf('', rule)).toBe('text-length')
  })

  it('count code points, after NFC', () => {
    expect(codeOf('😀'.repeat(40), 'label')).toBe('kept')
    expect(codeOf('😀'.repeat(41), 'label')).toBe('text-length')
    expect(codeOf('e\u0301'.repeat(40), 'label')).toBe('kept')
    expect(codeOf('e\u0301'.repeat(41), 'label')).toBe('text-length')
  })
})

describe('texts are kept', () => {
  it('in NFC and never trimmed', () => {
    expect(checkText(' Mu\u0308ller ', textRules.label)).toBe(' M\u00fcller ')
    expect(checkText('\u212b', textRules.label)).toBe('\u00c5')
  })

  it('the same when checked again', () => {
    fc.assert(fc.property(fc.string({ unit: 'grapheme', maxLength: 30 }), (text) => {
      const checked = checkText(text, textRules.comment)
      return typeof checked !== 'string' || checkText(checked, textRules.comment) === checked
    }))
  })

  it('with joiners, non-breaking blanks, private and unassigned characters', () => {
    for (const text of ['a\u200db', 'a\u00a0b', '\ue000', '\u2028', '\u{1f1e9}\u{1f1ea}', '\u0378']) expect(codeOf(text, 'label')).toBe('kept')
  })
})

describe('characters that are refused', () => {
  it('are the control characters', () => {
    for (let code = 0; code < 0xa0; code += 1) {
      const control = code < 0x20 || code >= 0x7f
      expect(codeOf(`a${String.fromCharCode(code)}`, 'label'), `U+${code.toString(16)}`).toBe(control ? 'text-character' : 'kept')
    }
  })

  it('are the bidirectional controls and no others beside them', () => {
    for (let code = 0x2020; code <= 0x2070; code += 1) {
      const bidirectional = (code >= 0x202a && code <= 0x202e) || (code >= 0x2066 && code <= 0x2069)
      expect(codeOf(`a${String.fromCharCode(code)}b`, 'label'), `U+${code.toString(16)}`).toBe(bidirectional ? 'text-character' : 'kept')
    }
  })

  it('are lone surrogates and the byte-order mark', () => {
    for (const text of ['\ud800', 'a\udfff', '\ude00\ud83d', '\ud83da', '\ufeff', 'a\ufeffb']) expect(codeOf(text, 'label')).toBe('text-character')
    expect(codeOf('\ud83d\ude00', 'label')).toBe('kept')
  })

  it('are named', () => {
    expect(checkText('a\u202eb', textRules.label)).toEqual({ code: 'text-character', message: 'Character U+202E is not allowed here; take it out.' })
  })
})

describe('a note', () => {
  it('may have lines and tabs; CR LF becomes LF', () => {
    expect(checkText('one\r\n\ttwo\nthree', textRules.note)).toBe('one\n\ttwo\nthree')
    expect(codeOf('one\rtwo', 'note')).toBe('text-character')
    expect(codeOf('one\n\rtwo', 'note')).toBe('text-character')
    expect(codeOf('one\u000btwo', 'note')).toBe('text-character')
    expect(codeOf('one\u0085two', 'note')).toBe('text-character')
  })

  it('is the only text with lines', () => {
    expect(codeOf('one\ntwo', 'comment')).toBe('text-character')
    expect(codeOf('one\ttwo', 'extraText')).toBe('text-character')
  })
})

describe('a serial', () => {
  it.each(['HL40-2231-0087', 'a', 'A.b_c/d-9'])('may be %s', serial => expect(codeOf(serial, 'serial')).toBe('kept'))
  it.each(['HL40 0087', 'HL40#1', 'É1', 'ａ1', 'a:b', 'a\\b', '—'])('may not be %s', serial => expect(codeOf(serial, 'serial')).toBe('text-character'))
})
