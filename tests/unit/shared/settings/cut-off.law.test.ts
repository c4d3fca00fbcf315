import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { diffContents } from '../../../../shared/diff/diff'
import { canonicalText } from '../../../../shared/settings/canonical'
import { readEntryFile } from '../../../../shared/settings/entry-table/read-entry'
import { maxFileBytes, readSettings } from '../../../../shared/settings/read'
import type { Content, FormatError, ReadOutcome } from '../../../../shared/settings/types'
import { liftFile, liftLines, liftPlate } from '../../../support/entry-table'

/*
 * Transfers break off, disks fill up, and people copy half of a text. Each file of the fixtures is cut at every byte.
 */

const bytesOf = (file: string) => new Uint8Array(readFileSync(new URL(`../../../../fixtures/settings/${file}`, import.meta.url)))
const whole = (outcome: ReadOutcome): Content => {
  if (!outcome.ok) throw new Error(JSON.stringify(outcome.errors.slice(0, 3)))
  return outcome.value.content
}

/** An error that says nothing, or whose line and column lie outside of the text. */
const astray = ({ at, line, column, message }: FormatError, lines: number) =>
  message === '' || !(at === '' || at.startsWith('/')) || (line === undefined) !== (column === undefined) || (line ?? 1) < 1 || (line ?? 1) > lines || (column ?? 1) < 1

const newlines = (bytes: Uint8Array) => bytes.filter(byte => byte === 0x0a || byte === 0x0d).length

/** The first of the spoilt files that throws, or is answered with an error astray, or is read as it should not be. */
function firstWrong(files: Iterable<Uint8Array>, wrong: (content: Content, length: number) => boolean, read: (bytes: Uint8Array) => ReadOutcome = readSettings): string | undefined {
  for (const file of files) {
    const outcome = read(file)
    const found = outcome.ok ? wrong(outcome.value.content, file.length) : outcome.errors.length === 0 || outcome.errors.some(error => astray(error, newlines(file) + 1))
    if (found) return `${file.length} bytes: ${JSON.stringify(outcome).slice(0, 400)}`
  }
  return undefined
}
const cuts = (bytes: Uint8Array) => Array.from(bytes, (_, length) => bytes.subarray(0, length))

describe('a file cut off at every byte', () => {
  it.each(['json/press.json', 'json/press-one-line.json', 'json/turntable.json', 'json/not-set.json'])('%s is refused with a place, or all of it is there but blanks', (file) => {
    const full = canonicalText(whole(readSettings(bytesOf(file))))
    expect(firstWrong(cuts(bytesOf(file)), content => canonicalText(content) !== full)).toBeUndefined()
  })

  it.each(['csv/press.csv', 'csv/press-utf-16le.csv', 'csv/rotary-units.csv', 'csv/extra-without-a-unit.csv'])('%s is refused with a place, or holds what its whole lines say, the last line aside', (file) => {
    const full = whole(readSettings(bytesOf(file)))
    // A value a line: what is not there was cut off, and no more than one can have lost its end.
    expect(firstWrong(cuts(bytesOf(file)), content => diffContents(full, content).filter(({ after }) => after !== undefined).length > 1)).toBeUndefined()
  })

  it('a drive’s own list is refused until both of its tables have begun: one without moves is not one whose moves were cut off', () => {
    const bytes = new TextEncoder().encode(liftLines.join('\r\n'))
    const tables = bytes.length - new TextEncoder().encode(liftLines.slice(-3).join('\r\n')).length
    const read = (cut: Uint8Array) => readEntryFile(cut, liftPlate, { exportedAt: liftFile.exportedAt, serial: 'LT10-26-0001' })
    expect(firstWrong(cuts(bytes), (_content, length) => length < tables, read)).toBeUndefined()
    expect(whole(read(bytes)).moves).toHaveLength(2)
  })
})

describe('a file with one byte spoilt', () => {
  // Each byte in turn: 0, a control sign, a quote, a comma, a digit, a byte that no UTF-8 text has.
  const spoilers = [0x00, 0x07, 0x22, 0x2c, 0x39, 0xff]

  it.each(['json/press-one-line.json', 'csv/press.csv'])('%s is answered with a place, or read', (file) => {
    const bytes = bytesOf(file)
    expect(firstWrong(Array.from(bytes, (_, at) => bytes.with(at, spoilers[at % spoilers.length] ?? 0)), () => false)).toBeUndefined()
  })

  it.each(['json/press-one-line.json', 'csv/press.csv'])('%s with a byte taken out is answered, and never throws', (file) => {
    const bytes = bytesOf(file)
    expect(firstWrong(Array.from(bytes, (_, at) => Uint8Array.from([...bytes.subarray(0, at), ...bytes.subarray(at + 1)])), () => false)).toBeUndefined()
  })
})

describe('the length of a file', () => {
  const padded = (length: number) => {
    const text = bytesOf('json/press-one-line.json')
    return Uint8Array.from([...text, ...new Uint8Array(length - text.length).fill(0x20)])
  }

  it('2 MiB are read, one byte more is not, and says both', () => {
    expect(maxFileBytes).toBe(2_097_152)
    expect(readSettings(padded(maxFileBytes)).ok).toBe(true)
    expect(readSettings(padded(maxFileBytes + 1))).toEqual({ ok: false, errors: [{ at: '', code: 'limit', message: 'The file has 2097153 bytes; at most 2097152 are read.', value: '2097153' }], more: 0 })
  })

  it('nothing is no file', () => expect(readSettings(new Uint8Array()).ok).toBe(false))
})
