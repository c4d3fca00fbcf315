import type { Normalised } from './types'
import { decodeWindows1252 } from './windows-1252'

export type Encoding = Normalised['encoding']

/** The text without its byte-order mark, or where and why it cannot be read. */
export type Decoded
  = | { readonly ok: true, readonly text: string, readonly encoding: Encoding }
    | { readonly ok: false, readonly byte: number | undefined, readonly message: string }

const startsWith = (bytes: Uint8Array, ...start: number[]) => start.every((byte, index) => bytes[index] === byte)
const small = 0x73, capital = 0x53

/** The encoding that the first bytes tell, by byte-order mark or by the `s` of the header in two bytes; else undefined. */
function markedEncoding(bytes: Uint8Array): { readonly encoding: Encoding, readonly label: string, readonly skip: number } | undefined {
  if (startsWith(bytes, 0xef, 0xbb, 0xbf)) return { encoding: 'utf-8-bom', label: 'utf-8', skip: 3 }
  if (startsWith(bytes, 0xff, 0xfe)) return { encoding: 'utf-16le', label: 'utf-16le', skip: 2 }
  if (startsWith(bytes, 0xfe, 0xff)) return { encoding: 'utf-16be', label: 'utf-16be', skip: 2 }
  if (startsWith(bytes, small, 0) || startsWith(bytes, capital, 0)) return { encoding: 'utf-16le', label: 'utf-16le', skip: 0 }
  if (startsWith(bytes, 0, small) || startsWith(bytes, 0, capital)) return { encoding: 'utf-16be', label: 'utf-16be', skip: 0 }
  return undefined
}

function strictly(bytes: Uint8Array, label: string): string | undefined {
  try {
    return new TextDecoder(label, { fatal: true, ignoreBOM: true }).decode(bytes)
  }
  catch (error) {
    if (error instanceof TypeError) return undefined
    throw error
  }
}

/** The first byte that is no UTF-8: where the text that a forgiving decoder makes stops coming back as the same bytes. */
function firstBadByte(bytes: Uint8Array): number {
  const again = new TextEncoder().encode(new TextDecoder('utf-8', { ignoreBOM: true }).decode(bytes))
  const differs = bytes.findIndex((byte, index) => byte !== again[index])
  return differs === -1 ? bytes.length : differs
}

/** The CSV form: byte-order mark, then UTF-16 told by the header's first letter, then UTF-8, then Windows-1252. */
export function decodeCsv(bytes: Uint8Array): Decoded {
  const marked = markedEncoding(bytes)
  if (marked) {
    const text = strictly(bytes.subarray(marked.skip), marked.label)
    return text === undefined
      ? { ok: false, byte: undefined, message: `The file begins as ${marked.label.toUpperCase()} and does not go on as such. Save it as UTF-8.` }
      : { ok: true, text, encoding: marked.encoding }
  }
  const utf8 = strictly(bytes, 'utf-8')
  if (utf8 !== undefined) return { ok: true, text: utf8, encoding: 'utf-8' }
  const text = decodeWindows1252(bytes)
  if (typeof text === 'string') return { ok: true, text, encoding: 'windows-1252' }
  return { ok: false, byte: text, message: `Byte ${hex(bytes[text])} is a character of neither UTF-8 nor Windows-1252. Save the file as UTF-8.` }
}

/** The JSON form: UTF-8 (RFC 8259, section 8.1), a byte-order mark at the beginning let pass. */
export function decodeJson(bytes: Uint8Array): Decoded {
  const marked = markedEncoding(bytes)
  if (marked && marked.label !== 'utf-8') {
    return { ok: false, byte: 0, message: `The JSON form is UTF-8; this file is ${marked.label.toUpperCase()}. Save it as UTF-8.` }
  }
  const body = marked ? bytes.subarray(marked.skip) : bytes
  const text = strictly(body, 'utf-8')
  if (text !== undefined) return { ok: true, text, encoding: marked?.encoding ?? 'utf-8' }
  const byte = firstBadByte(body)
  return { ok: false, byte, message: `The JSON form is UTF-8; byte ${hex(body[byte])} is not. Save the file as UTF-8.` }
}

function hex(byte: number | undefined): string {
  return byte === undefined ? 'at the end' : byte.toString(16).toUpperCase().padStart(2, '0')
}

/** Line and column of a byte in a file whose lines end with LF; a column counts bytes. */
export function placeOfByte(bytes: Uint8Array, byte: number): { readonly line: number, readonly column: number } {
  const before = bytes.subarray(0, byte)
  const lines = before.filter(each => each === 0x0a).length
  return { line: lines + 1, column: byte - before.lastIndexOf(0x0a) }
}
