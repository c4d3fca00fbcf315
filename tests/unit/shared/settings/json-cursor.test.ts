import { describe, expect, it } from 'vitest'
import { JsonCursor, TokenError } from '../../../../shared/settings/json-cursor'

describe('a cursor', () => {
  it('tells the character here and the next one, and nothing beyond the end', () => {
    const cursor = new JsonCursor('ab')
    expect([cursor.here(), cursor.next(), cursor.next(), cursor.here()]).toEqual([97, 98, Number.NaN, Number.NaN])
    expect(cursor.at).toBe(2)
  })

  /* RFC 8259, section 2: white space is space, tab, line feed and carriage return, and no other blank of Unicode. */
  it('passes the four blanks of JSON over and stops at every other', () => {
    const cursor = new JsonCursor(' \t\n\r  x')
    expect([cursor.space(), cursor.at]).toEqual([120, 6])
    expect([cursor.space(), cursor.at]).toEqual([120, 6])
    for (const blank of ['\u000b', '\u000c', '\u00a0', '\u2028', '\ufeff']) expect(new JsonCursor(blank).space()).toBe(blank.charCodeAt(0))
    expect(new JsonCursor('  ').space()).toBeNaN()
  })

  it('passes a word over where it stands, and stays where it does not', () => {
    const cursor = new JsonCursor('[true')
    expect([cursor.word('true'), cursor.at]).toEqual([false, 0])
    cursor.at = 1
    expect([cursor.word('false'), cursor.word('true'), cursor.at]).toEqual([false, true, 5])
  })

  it('names what stands here as a person would', () => {
    const shown = (text: string) => new JsonCursor(text).shown()
    expect([shown('x'), shown('é'), shown('😀'), shown(' '), shown('\u0007'), shown('')]).toEqual(['"x"', '"é"', '"😀"', 'character 32', 'character 7', 'the end of the file'])
  })

  it('fails here, or where it is told to', () => {
    const cursor = new JsonCursor('abc')
    cursor.at = 2
    const offsetOf = (fail: () => never) => {
      try { return fail() }
      catch (error) { return error instanceof TokenError ? [error.code, error.offset, error.message] : error }
    }
    expect(offsetOf(() => cursor.fail('No.'))).toEqual(['json-syntax', 2, 'No.'])
    expect(offsetOf(() => cursor.fail('No.', 0))).toEqual(['json-syntax', 0, 'No.'])
  })
})
