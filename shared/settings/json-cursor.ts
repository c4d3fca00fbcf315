import type { FormatErrorCode } from './types'

/** Reading stops at the first of these: what follows cannot be told. */
export class TokenError extends Error {
  constructor(readonly code: FormatErrorCode, readonly offset: number, message: string) {
    super(message)
    this.name = 'TokenError'
  }
}

/** A place in a JSON text, moved on by the readers of its parts. Beyond the end every character code is NaN. */
export class JsonCursor {
  at = 0
  constructor(readonly text: string) {}

  /** The character here; NaN at the end. */
  here(): number {
    return this.text.charCodeAt(this.at)
  }

  /** Moves on by one character and answers the one that is then here. */
  next(): number {
    return this.text.charCodeAt(this.at += 1)
  }

  /** Skips space, tab, line feed, carriage return; answers the character after them. */
  space(): number {
    const { text } = this
    let { at } = this
    let code = text.charCodeAt(at)
    while (code === 32 || code === 10 || code === 13 || code === 9) code = text.charCodeAt(at += 1)
    this.at = at
    return code
  }

  /** Passes a word over if it stands here. */
  word(word: string): boolean {
    if (!this.text.startsWith(word, this.at)) return false
    this.at += word.length
    return true
  }

  /** The character here as a message names it. */
  shown(): string {
    const code = this.text.codePointAt(this.at)
    return code === undefined ? 'the end of the file' : code > 32 ? `"${String.fromCodePoint(code)}"` : `character ${code}`
  }

  fail(message: string, offset = this.at): never {
    throw new TokenError('json-syntax', offset, message)
  }
}
