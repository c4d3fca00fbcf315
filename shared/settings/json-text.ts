import type { JsonCursor } from './json-cursor'

const quote = 34, backslash = 92, firstAllowed = 32
const escapes: ReadonlyMap<string, string> = new Map([
  ['"', '"'], ['\\', '\\'], ['/', '/'], ['b', '\b'], ['f', '\f'], ['n', '\n'], ['r', '\r'], ['t', '\t'],
])

/** Reads a JSON text (RFC 8259, section 7) from its opening quote; lone surrogates come through and are refused later. */
export function readJsonText(cursor: JsonCursor): string {
  const { text } = cursor
  const start = cursor.at + 1
  let at = start
  let code = text.charCodeAt(at)
  while (code !== quote && code !== backslash && code >= firstAllowed) code = text.charCodeAt(at += 1)
  cursor.at = at
  if (code === backslash) return readEscaped(cursor, start)
  if (code !== quote) failAt(cursor, code)
  cursor.at += 1
  return text.slice(start, at)
}

function failAt(cursor: JsonCursor, code: number): never {
  return cursor.fail(Number.isNaN(code) ? 'The text is not closed: a quote is missing.' : `Character ${code} must be written as an escape inside a text.`)
}

/** As above from the first backslash on; pieces between escapes are cut out whole. */
function readEscaped(cursor: JsonCursor, start: number): string {
  let text = ''
  let piece = start
  for (let code = cursor.here(); code !== quote; code = cursor.here()) {
    if (code === backslash) {
      text += cursor.text.slice(piece, cursor.at) + readEscape(cursor)
      piece = cursor.at
      continue
    }
    if (!(code >= firstAllowed)) failAt(cursor, code)
    cursor.at += 1
  }
  cursor.at += 1
  return text + cursor.text.slice(piece, cursor.at - 1)
}

function readEscape(cursor: JsonCursor): string {
  const sign = cursor.text[cursor.at + 1] ?? ''
  const plain = escapes.get(sign)
  if (plain !== undefined) {
    cursor.at += 2
    return plain
  }
  const digits = cursor.text.slice(cursor.at + 2, cursor.at + 6)
  if (sign !== 'u' || !/^[0-9a-fA-F]{4}$/.test(digits)) cursor.fail(`"\\${sign}${sign === 'u' ? digits : ''}" is no escape; a backslash itself is written \\\\.`)
  cursor.at += 6
  return String.fromCharCode(Number.parseInt(digits, 16))
}
