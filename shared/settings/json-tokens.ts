import type { RawList, RawNode, RawNumber, RawObject } from './raw'
import type { FormatErrorCode } from './types'

/*
 * JSON (RFC 8259) in one pass, character by character. JSON.parse would lose what the format needs: the text of numbers,
 * duplicate keys and where things stand. Over 120 lines because a grammar reads best in one piece.
 */

export const maxNesting = 8

/** Reading stops at the first of these: what follows cannot be told. */
export class TokenError extends Error {
  constructor(readonly code: FormatErrorCode, readonly offset: number, message: string) {
    super(message)
    this.name = 'TokenError'
  }
}

const powersOfTen = [1, 10, 100, 1e3, 1e4, 1e5, 1e6]
const escapes: Readonly<Record<string, string>> = {
  '"': '"', '\\': '\\', '/': '/', 'b': '\b', 'f': '\f', 'n': '\n', 'r': '\r', 't': '\t',
}
const quote = 34, minus = 45, point = 46, zero = 48, nine = 57, backslash = 92, colon = 58, comma = 44
const openBrace = 123, closeBrace = 125, openBracket = 91, closeBracket = 93

class Tokens {
  at = 0
  constructor(readonly text: string) {}

  fail(message: string, offset = this.at): never {
    throw new TokenError('json-syntax', offset, message)
  }

  shown(): string {
    const code = this.text.codePointAt(this.at)
    return code === undefined ? 'the end of the file' : code > 32 ? `"${String.fromCodePoint(code)}"` : `character ${code}`
  }

  /** Skips space, tab, line feed, carriage return; answers the character after them, or NaN at the end. */
  space(): number {
    let code = this.text.charCodeAt(this.at)
    while (code === 32 || code === 10 || code === 13 || code === 9) code = this.text.charCodeAt(this.at += 1)
    return code
  }

  value(depth: number): RawNode {
    const code = this.space()
    const offset = this.at
    if (code === quote) return { kind: 'text', offset, text: this.string(), end: this.at }
    if (code === minus || (code >= zero && code <= nine)) return this.number()
    if (code === openBrace) return this.object(depth + 1)
    if (code === openBracket) return this.list(depth + 1)
    if (this.word('true')) return { kind: 'flag', offset, end: this.at, value: true }
    if (this.word('false')) return { kind: 'flag', offset, end: this.at, value: false }
    if (this.word('null')) return { kind: 'null', offset, end: this.at }
    return this.fail(`A value cannot begin with ${this.shown()}.`)
  }

  word(word: string): boolean {
    if (!this.text.startsWith(word, this.at)) return false
    this.at += word.length
    return true
  }

  deeper(depth: number): void {
    if (depth > maxNesting) throw new TokenError('nesting', this.at, `Objects and lists lie ${depth} deep here; at most ${maxNesting} are read.`)
  }

  object(depth: number): RawObject {
    this.deeper(depth)
    const node = { kind: 'object' as const, offset: this.at, end: 0, keys: [] as string[], keyOffsets: [] as number[], values: [] as RawNode[] }
    this.at += 1
    let code = this.space()
    while (code !== closeBrace) {
      if (code !== quote) this.fail(`A key in quotes belongs here, not ${this.shown()}.`)
      node.keyOffsets.push(this.at)
      node.keys.push(this.string())
      if (this.space() !== colon) this.fail(`A colon belongs after the key, not ${this.shown()}.`)
      this.at += 1
      node.values.push(this.value(depth))
      code = this.afterItem(closeBrace, '}')
    }
    node.end = this.at += 1
    return node
  }

  list(depth: number): RawList {
    this.deeper(depth)
    const node = { kind: 'list' as const, offset: this.at, end: 0, items: [] as RawNode[] }
    this.at += 1
    let code = this.space()
    while (code !== closeBracket) {
      node.items.push(this.value(depth))
      code = this.afterItem(closeBracket, ']')
    }
    node.end = this.at += 1
    return node
  }

  /** A comma with something behind it, or the closing sign. */
  afterItem(close: number, sign: string): number {
    const code = this.space()
    if (code === close) return code
    if (code !== comma) this.fail(`A comma or "${sign}" belongs here, not ${this.shown()}.`)
    this.at += 1
    const next = this.space()
    if (next === close) this.fail(`Nothing follows the comma before "${sign}": take the comma out.`)
    return next
  }

  string(): string {
    const { text } = this
    const start = this.at += 1
    for (let code = text.charCodeAt(start); code !== quote; code = text.charCodeAt(this.at += 1)) {
      if (code === backslash) return this.escapedString(start)
      if (!(code >= 32)) this.failInString(code)
    }
    this.at += 1
    return text.slice(start, this.at - 1)
  }

  failInString(code: number): never {
    return this.fail(Number.isNaN(code) ? 'The text is not closed: a quote is missing.' : `Character ${code} must be written as an escape inside a text.`)
  }

  escapedString(start: number): string {
    const { text } = this
    let result = text.slice(start, this.at)
    for (let code = text.charCodeAt(this.at); code !== quote; code = text.charCodeAt(this.at)) {
      if (code === backslash) {
        result += this.escape()
      }
      else {
        if (!(code >= 32)) this.failInString(code)
        result += text[this.at]
        this.at += 1
      }
    }
    this.at += 1
    return result
  }

  escape(): string {
    const { text } = this
    const sign = text[this.at + 1] ?? ''
    const plain = Object.hasOwn(escapes, sign) ? escapes[sign] : undefined
    if (plain !== undefined) {
      this.at += 2
      return plain
    }
    const digits = text.slice(this.at + 2, this.at + 6)
    if (sign !== 'u' || !/^[0-9a-fA-F]{4}$/.test(digits)) this.fail(`"\\${sign}${sign === 'u' ? digits : ''}" is no escape; a backslash itself is written \\\\.`)
    this.at += 6
    return String.fromCharCode(Number.parseInt(digits, 16))
  }

  /** A whole number of up to 15 digits with up to 6 of them after the point divides exactly rounded: no decimal arithmetic needed. */
  number(): RawNumber {
    const { text } = this
    const offset = this.at
    let code = text.charCodeAt(offset)
    const negative = code === minus
    if (negative) code = text.charCodeAt(this.at += 1)
    if (!(code >= zero && code <= nine)) this.fail(`A digit belongs here, not ${this.shown()}.`)
    const first = this.at
    let digits = 0
    const leadingZero = code === zero
    for (; code >= zero && code <= nine; code = text.charCodeAt(this.at += 1)) digits = digits * 10 + (code - zero)
    if (leadingZero && this.at - first > 1) this.fail('A number does not begin with 0 before other digits.', first)
    let count = this.at - first
    let places = 0
    if (code === point) {
      const start = this.at += 1
      for (code = text.charCodeAt(start); code >= zero && code <= nine; code = text.charCodeAt(this.at += 1)) digits = digits * 10 + (code - zero)
      places = this.at - start
      if (places === 0) this.fail(`A digit belongs after the point, not ${this.shown()}.`)
      count += places
    }
    const plain = !this.exponent(code) && count <= 15 && places <= 6
    const size = plain ? digits / (powersOfTen[places] ?? NaN) : NaN
    return { kind: 'number', offset, end: this.at, value: negative ? 0 - size : size }
  }

  exponent(code: number): boolean {
    if (code !== 101 && code !== 69) return false
    let next = this.text.charCodeAt(this.at += 1)
    if (next === 43 || next === minus) next = this.text.charCodeAt(this.at += 1)
    if (!(next >= zero && next <= nine)) this.fail(`A digit belongs in the exponent, not ${this.shown()}.`)
    while (next >= zero && next <= nine) next = this.text.charCodeAt(this.at += 1)
    return true
  }
}

/** The tree of one JSON text. Throws TokenError 'json-syntax' at the first character that is out of place, 'nesting' beyond 8 levels. */
export function jsonTree(text: string): RawNode {
  const tokens = new Tokens(text)
  const node = tokens.value(0)
  tokens.space()
  if (tokens.at < text.length) tokens.fail(`Nothing may follow the closing sign; ${tokens.shown()} does.`)
  return node
}
