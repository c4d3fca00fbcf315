import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { decodeCsv, decodeJson, placeOfByte } from '../../../../shared/settings/decode'

const utf8 = (text: string) => new TextEncoder().encode(text)
const utf16le = (text: string) => new Uint8Array(Buffer.from(text, 'utf16le'))
const utf16be = (text: string) => new Uint8Array(Buffer.from(text, 'utf16le').swap16())
const marked = (mark: readonly number[], bytes: Uint8Array) => Uint8Array.from([...mark, ...bytes])
const header = 'section,row,field,value,unit\nunit,,model,Größe ² 😀,\n'

describe('the CSV form', () => {
  it.each([
    ['UTF-8', utf8(header), 'utf-8'], ['UTF-8 with mark', marked([0xef, 0xbb, 0xbf], utf8(header)), 'utf-8-bom'],
    ['UTF-16, low first, with mark', marked([0xff, 0xfe], utf16le(header)), 'utf-16le'], ['UTF-16, high first, with mark', marked([0xfe, 0xff], utf16be(header)), 'utf-16be'],
    ['UTF-16, low first, without mark', utf16le(header), 'utf-16le'], ['UTF-16, high first, without mark', utf16be(header), 'utf-16be'],
    ['UTF-16 with a capital first', utf16le(header.replace('s', 'S')), 'utf-16le', header.replace('s', 'S')],
  ])('is read as %s', (_, bytes, encoding, text = header) => {
    expect(decodeCsv(bytes)).toEqual({ ok: true, text, encoding })
  })

  it('is Windows-1252 where it is not UTF-8', () => {
    expect(decodeCsv(Uint8Array.from([0x73, 0xe4, 0x80]))).toEqual({ ok: true, text: 'sä€', encoding: 'windows-1252' })
  })

  it('is UTF-8 where it could be either', () => {
    fc.assert(fc.property(fc.string({ unit: 'grapheme', minLength: 1 }).filter(text => !['\0', 's\0', 'S\0', '\ufeff'].some(start => text.startsWith(start))), (text) => {
      const decoded = decodeCsv(utf8(text))
      return decoded.ok && decoded.text === text
    }))
  })

  it('is refused where no encoding has the byte', () => {
    expect(decodeCsv(Uint8Array.from([0x73, 0xe4, 0x81]))).toMatchObject({ ok: false, byte: 2 })
  })

  it('is refused where UTF-16 is cut or a surrogate stands alone', () => {
    expect(decodeCsv(marked([0xff, 0xfe], Uint8Array.from([0x73])))).toMatchObject({ ok: false })
    expect(decodeCsv(marked([0xff, 0xfe], Uint8Array.from([0x73, 0, 0x3d, 0xd8])))).toMatchObject({ ok: false })
  })

  it('keeps a second mark, for the reader to refuse', () => {
    expect(decodeCsv(marked([0xef, 0xbb, 0xbf], utf8('\ufeffs')))).toEqual({ ok: true, text: '\ufeffs', encoding: 'utf-8-bom' })
  })
})

describe('the JSON form', () => {
  it('is UTF-8, with or without mark', () => {
    expect(decodeJson(utf8('{"a":"é"}'))).toEqual({ ok: true, text: '{"a":"é"}', encoding: 'utf-8' })
    expect(decodeJson(marked([0xef, 0xbb, 0xbf], utf8('{}')))).toEqual({ ok: true, text: '{}', encoding: 'utf-8-bom' })
  })

  it('is not UTF-16', () => {
    expect(decodeJson(marked([0xff, 0xfe], utf16le('{}')))).toMatchObject({ ok: false, byte: 0 })
    expect(decodeJson(marked([0xfe, 0xff], utf16be('{}')))).toMatchObject({ ok: false, byte: 0 })
  })

  // RFC 3629: no overlong forms, no surrogates, nothing beyond U+10FFFF, no lone or missing continuation bytes.
  it.each([[[0xc0, 0xaf], 'overlong'], [[0xed, 0xa0, 0x80], 'surrogate'], [[0xf4, 0x90, 0x80, 0x80], 'beyond'], [[0x80], 'lone'], [[0xe2, 0x82], 'cut'], [[0xff], 'never']])(
    'is refused with %j (%s)', (bytes) => {
      expect(decodeJson(Uint8Array.from([0x7b, ...bytes, 0x7d]))).toMatchObject({ ok: false, byte: 1 })
    })

  it('names the first byte that is wrong, also after a real replacement character', () => {
    const bytes = Uint8Array.from([...utf8('{"a":"\ufffd'), 0xe4, 0x22, 0x7d])
    expect(decodeJson(bytes)).toMatchObject({ ok: false, byte: utf8('{"a":"\ufffd').length })
  })

  it('is refused wherever one byte of a valid text is spoilt', () => {
    fc.assert(fc.property(fc.string({ unit: 'grapheme', maxLength: 12 }), fc.nat(), (text, at) => {
      const bytes = utf8(`{${text}}`)
      const spoilt = 1 + (at % (bytes.length - 1))
      bytes[spoilt] = 0xff
      const decoded = decodeJson(bytes)
      return !decoded.ok && decoded.byte !== undefined && decoded.byte <= spoilt && decoded.byte > spoilt - 4
    }))
  })
})

describe('placeOfByte', () => {
  it.each([[0, 1, 1], [2, 1, 3], [3, 2, 1], [4, 2, 2], [5, 3, 1]])('byte %d is line %d, column %d', (byte, line, column) => {
    expect(placeOfByte(utf8('ab\nc\nd'), byte)).toEqual({ line, column })
  })
})
