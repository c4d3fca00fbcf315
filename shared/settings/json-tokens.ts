import { JsonCursor, TokenError } from './json-cursor'
import { readJsonNumber } from './json-number'
import { readJsonText } from './json-text'
import { cutText } from './problems'
import type { RawList, RawNode, RawObject } from './raw'

/*
 * JSON (RFC 8259) in one pass, character by character. JSON.parse would lose what the format needs: the text of numbers,
 * duplicate keys and where things stand.
 */

export const maxNesting = 8

const quote = 34, minus = 45, zero = 48, nine = 57, colon = 58, comma = 44
const openBrace = 123, closeBrace = 125, openBracket = 91, closeBracket = 93

/** `key` is the one that the value belongs to; undefined in a list and at the top. */
function readValue(cursor: JsonCursor, depth: number, key?: string): RawNode {
  const code = cursor.space()
  const offset = cursor.at
  if (code === quote) return { kind: 'text', offset, text: readJsonText(cursor), end: cursor.at }
  if (code === minus || (code >= zero && code <= nine)) return readJsonNumber(cursor)
  if (code === openBrace) return readObject(cursor, depth + 1)
  if (code === openBracket) return readList(cursor, depth + 1)
  if (cursor.word('true')) return { kind: 'flag', offset, end: cursor.at, value: true }
  if (cursor.word('false')) return { kind: 'flag', offset, end: cursor.at, value: false }
  if (cursor.word('null')) return { kind: 'null', offset, end: cursor.at }
  return failWithoutValue(cursor, code, key)
}

function failWithoutValue(cursor: JsonCursor, code: number, key: string | undefined): never {
  const missing = key === undefined ? 'A value is missing' : `The value of "${cutText(key)}" is missing`
  if (Number.isNaN(code)) cursor.fail(`${missing}: the file ends here. Was it cut short? Export it again.`)
  if (code === comma || code === closeBrace || code === closeBracket) cursor.fail(`${missing} before ${cursor.shown()}.`)
  return cursor.fail(`A value cannot begin with ${cursor.shown()}.`)
}

function open(cursor: JsonCursor, depth: number): number {
  if (depth > maxNesting) throw new TokenError('nesting', cursor.at, `Objects and lists lie ${depth} deep here; at most ${maxNesting} are read.`)
  cursor.at += 1
  return cursor.space()
}

function readObject(cursor: JsonCursor, depth: number): RawObject {
  const node = { kind: 'object' as const, offset: cursor.at, end: 0, keys: [] as string[], keyOffsets: [] as number[], values: [] as RawNode[] }
  for (let code = open(cursor, depth); code !== closeBrace; code = afterItem(cursor, closeBrace, '}')) {
    if (code !== quote) cursor.fail(`A key in quotes belongs here, not ${cursor.shown()}.`)
    node.keyOffsets.push(cursor.at)
    const key = readJsonText(cursor)
    node.keys.push(key)
    if (cursor.space() !== colon) cursor.fail(`A colon belongs after the key, not ${cursor.shown()}.`)
    cursor.at += 1
    node.values.push(readValue(cursor, depth, key))
  }
  node.end = cursor.at += 1
  return node
}

function readList(cursor: JsonCursor, depth: number): RawList {
  const node = { kind: 'list' as const, offset: cursor.at, end: 0, items: [] as RawNode[] }
  for (let code = open(cursor, depth); code !== closeBracket; code = afterItem(cursor, closeBracket, ']')) node.items.push(readValue(cursor, depth))
  node.end = cursor.at += 1
  return node
}

/** Passes a comma that has something behind it, or stays at the closing sign; answers the character that is then here. */
function afterItem(cursor: JsonCursor, close: number, sign: string): number {
  const code = cursor.space()
  if (code === close) return code
  if (code !== comma) cursor.fail(`A comma or "${sign}" belongs here, not ${cursor.shown()}.`)
  cursor.at += 1
  const next = cursor.space()
  if (next === close) cursor.fail(`Nothing follows the comma before "${sign}": take the comma out.`)
  return next
}

/** The tree of one JSON text. Throws TokenError 'json-syntax' at the first character that is out of place, 'nesting' beyond 8 levels. */
export function jsonTree(text: string): RawNode {
  const cursor = new JsonCursor(text)
  const node = readValue(cursor, 0)
  cursor.space()
  if (cursor.at < text.length) cursor.fail(`Nothing may follow the closing sign; ${cursor.shown()} does.`)
  return node
}
