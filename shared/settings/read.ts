import type { ReadOutcome } from './types'
import { readCsv } from './csv-reader'
import { type Decoded, decodeCsv, decodeJson, placeOfByte } from './decode'
import { readJson } from './json-reader'

export const maxFileBytes = 2 * 1024 * 1024

export interface ReadOptions {
  /** The decimal sign of a CSV file that does not show it itself. */
  readonly decimal?: 'point' | 'comma'
}

type Failed = Extract<ReadOutcome, { ok: false }>

const utf8Mark = [0xef, 0xbb, 0xbf]
const blanks = new Set([0x20, 0x09, 0x0a, 0x0d])
const jsonStarts = new Set([0x7b, 0x5b])

/** Which form the bytes are: JSON where the first sign is { or [, else CSV; marks and zero bytes of UTF-16 are passed over. */
export function formOf(bytes: Uint8Array): 'json' | 'csv' {
  let at = utf8Mark.every((byte, index) => bytes[index] === byte) ? 3 : 0
  if ((bytes[0] === 0xff && bytes[1] === 0xfe) || (bytes[0] === 0xfe && bytes[1] === 0xff)) at = 2
  while (blanks.has(bytes[at] ?? -1) || bytes[at] === 0) at += 1
  return jsonStarts.has(bytes[at] ?? -1) ? 'json' : 'csv'
}

/** Reads a settings file of either form from its bytes; the form and the encoding are told by the bytes alone. */
export function readSettings(bytes: Uint8Array, options: ReadOptions = {}): ReadOutcome {
  const form = formOf(bytes)
  const decoded = decode(bytes, form)
  if ('errors' in decoded) return decoded
  return form === 'json' ? readJson(decoded.text, decoded.encoding) : readCsv(decoded.text, { ...options, encoding: decoded.encoding })
}

/** As readSettings, from a text that a person put in; a byte-order mark at its beginning is passed over. */
export function readSettingsText(text: string, options: ReadOptions = {}): ReadOutcome {
  return readSettings(new TextEncoder().encode(text), options)
}

/** The text of a file of at most 2 MiB without its byte-order mark, or why there is none. */
export function decode(bytes: Uint8Array, form: 'json' | 'csv'): Extract<Decoded, { ok: true }> | Failed {
  if (bytes.length > maxFileBytes) return tooLong(bytes.length)
  const decoded = form === 'json' ? decodeJson(bytes) : decodeCsv(bytes)
  return decoded.ok ? decoded : notDecoded(bytes, decoded)
}

function tooLong(bytes: number): Failed {
  const message = `The file has ${bytes} bytes; at most ${maxFileBytes} are read.`
  return { ok: false, errors: [{ at: '', code: 'limit', message, value: String(bytes) }], more: 0 }
}

function notDecoded(bytes: Uint8Array, { byte, message }: Extract<Decoded, { ok: false }>): Failed {
  const place = byte === undefined ? {} : placeOfByte(bytes, byte)
  return { ok: false, errors: [{ at: '', ...place, code: 'encoding', message }], more: 0 }
}
