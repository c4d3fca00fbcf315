import { createHash } from 'node:crypto'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { contentOf } from '../../../../shared/settings/content'
import { readCsv } from '../../../../shared/settings/csv-reader'
import { hashesOf } from '../../../../shared/settings/hash'
import { readJson } from '../../../../shared/settings/json-reader'
import { readSettings, readSettingsText } from '../../../../shared/settings/read'
import { type ReadOutcome, type SettingsFile, schemaName } from '../../../../shared/settings/types'
import { writeCsv } from '../../../../shared/settings/write-csv'
import { writeJson } from '../../../../shared/settings/write-json'
import { arbitraryContent, arbitraryExtra, plainText } from '../../../support/arbitrary-content'

/*
 * The laws of the two forms: reading what was written gives the file back, identity and note included, and nothing but the
 * values counts for the hash.
 */

const optional = <Value>(value: fc.Arbitrary<Value>) => fc.option(value, { nil: undefined })
const serial = fc.string({ unit: fc.constantFrom(...'AZaz09._/-'), minLength: 1, maxLength: 64 })
const noteText = fc.string({ unit: fc.constantFrom(...'ab=-+@\'"\n\t,;# é😀'), minLength: 1, maxLength: 30 })
const time = fc.date({ min: new Date('1990-01-01T00:00:00Z'), max: new Date('2050-01-01T00:00:00Z'), noInvalidDate: true }).map(date => date.toISOString())

/** Leaves undefined out, and gives the bare objects that fast-check makes their prototype, as a reader would. */
const withoutUndefined = <Value extends object>(value: Value) => JSON.parse(JSON.stringify(value)) as Value

const arbitraryFile: fc.Arbitrary<SettingsFile> = fc.record({
  unit: fc.record({
    serial, channel: optional(fc.integer({ min: 0, max: 255 })), model: plainText(64), firmware: optional(plainText(32)),
    actuatorSerial: optional(serial), actuatorModel: optional(plainText(64)),
  }).map(withoutUndefined),
  exportedAt: time, exportedBy: optional(plainText(80)), note: optional(noteText), content: arbitraryContent(), readings: arbitraryExtra,
}).map(({ content, ...rest }) => withoutUndefined({ schema: schemaName, ...rest, ...content }))

const sha256 = (bytes: Uint8Array) => new Uint8Array(createHash('sha256').update(bytes).digest())

function fileOf(outcome: ReadOutcome): SettingsFile {
  if (!outcome.ok) throw new Error(JSON.stringify(outcome.errors.slice(0, 3)))
  return outcome.value.file
}

describe('the laws of the format', () => {
  it('readJson(writeJson(c)) = c', () => {
    fc.assert(fc.property(arbitraryFile, (file) => {
      expect(fileOf(readJson(writeJson(file)))).toEqual(file)
    }), { numRuns: 100 })
  })

  it('readCsv(writeCsv(c)) = c', () => {
    fc.assert(fc.property(arbitraryFile, (file) => {
      expect(fileOf(readCsv(writeCsv(file)))).toEqual(file)
    }), { numRuns: 100 })
  })

  it('one form and the other lose nothing, there and back', () => {
    fc.assert(fc.property(arbitraryFile, (file) => {
      const there = fileOf(readSettingsText(writeCsv(fileOf(readSettingsText(writeJson(file))))))
      expect(there).toEqual(file)
      return writeJson(there) === writeJson(file)
    }), { numRuns: 30 })
  })

  it('reading what was written rounds and converts nothing', () => {
    fc.assert(fc.property(arbitraryFile, (file) => {
      for (const text of [writeJson(file), writeCsv(file)]) {
        const outcome = readSettingsText(text)
        if (!outcome.ok) return false
        expect(outcome.value.normalised).toMatchObject({ rounded: 0, converted: 0, encoding: 'utf-8' })
      }
      return true
    }), { numRuns: 30 })
  })

  it('content is that of the file, in order', () => {
    fc.assert(fc.property(arbitraryFile, (file) => {
      const outcome = readJson(writeJson(file))
      expect(outcome.ok && outcome.value.content).toEqual(contentOf(file))
    }), { numRuns: 30 })
  })
})

describe('the content hash', () => {
  const hashOf = (outcome: ReadOutcome) => {
    if (!outcome.ok) throw new Error(JSON.stringify(outcome.errors.slice(0, 3)))
    return hashesOf(outcome.value.content, sha256).contentHash
  }
  const shuffled = (value: unknown, seed: number): unknown => {
    if (Array.isArray(value)) return value.map(each => shuffled(each, seed))
    if (typeof value !== 'object' || value === null) return value
    const entries = Object.entries(value).map(([key, each]) => [key, shuffled(each, seed)] as const)
    return Object.fromEntries(entries.map((entry, index) => ({ entry, rank: (index * 7919 + seed) % 101 })).sort((a, b) => a.rank - b.rank).map(({ entry }) => entry))
  }

  it('does not change with white space, escapes and the order of keys', () => {
    fc.assert(fc.property(arbitraryFile, fc.nat(), fc.constantFrom('', '  ', '\t'), (file, seed, indent) => {
      const text = JSON.stringify(shuffled(JSON.parse(writeJson(file)), seed), null, indent).replace(/[\u0080-\uffff]/g, sign => `\\u${sign.charCodeAt(0).toString(16).padStart(4, '0')}`)
      return hashOf(readJson(text)) === hashOf(readJson(writeJson(file)))
    }), { numRuns: 40 })
  })

  it('does not change with the order of rows, in either form', () => {
    const permuted = arbitraryFile.chain(file => fc.tuple(
      fc.constant(file), fc.shuffledSubarray([...file.moves], { minLength: file.moves.length }), fc.shuffledSubarray([...file.zones], { minLength: file.zones.length }),
    ))
    fc.assert(fc.property(permuted, ([file, moves, zones]) => {
      const other = { ...file, moves, zones }
      expect(hashOf(readJson(writeJson(other)))).toBe(hashOf(readJson(writeJson(file))))
      return hashOf(readCsv(writeCsv(other))) === hashOf(readJson(writeJson(file)))
    }), { numRuns: 40 })
  })

  it('does not change with the order of CSV lines', () => {
    const oneLine = arbitraryFile.map(({ note, ...file }) => note === undefined ? file : { ...file, note: note.replaceAll('\n', ' ') })
    fc.assert(fc.property(oneLine, fc.nat(), (file, seed) => {
      const [header = '', ...lines] = writeCsv(file).trimEnd().split('\r\n')
      const other = lines.map((line, index) => ({ line, rank: (index * 7919 + seed) % 1009 })).sort((a, b) => a.rank - b.rank).map(({ line }) => line)
      return hashOf(readCsv([header, ...other].join('\n'))) === hashOf(readCsv(writeCsv(file)))
    }), { numRuns: 40 })
  })

  it('does not change with the encoding', () => {
    fc.assert(fc.property(arbitraryFile, (file) => {
      const text = writeCsv(file)
      const expected = hashOf(readCsv(text))
      expect(hashOf(readSettings(Uint8Array.from([0xff, 0xfe, ...Buffer.from(text, 'utf16le')])))).toBe(expected)
      expect(hashOf(readSettings(Uint8Array.from([0xef, 0xbb, 0xbf, ...Buffer.from(text, 'utf8')])))).toBe(expected)
      expect(hashOf(readSettings(new Uint8Array(Buffer.from(text, 'utf16le').swap16())))).toBe(expected)
    }), { numRuns: 25 })
  })

  it('changes with any number of the content', () => {
    fc.assert(fc.property(arbitraryFile.filter(file => file.moves.length > 0), fc.nat(), fc.constantFrom(1e-6, -1e-6, 1), (file, at, by) => {
      const index = at % file.moves.length
      const moves = file.moves.map((move, each) => each === index ? { ...move, target: Math.floor((move.target + by) * 1e6 + 0.5) / 1e6 } : move)
      const changed = { ...file, moves }
      if (moves[index]?.target === file.moves[index]?.target || Math.abs(moves[index]?.target ?? 0) > 1e9) return true
      return hashOf(readJson(writeJson(changed))) !== hashOf(readJson(writeJson(file)))
    }), { numRuns: 40 })
  })

  it('does not change with who, when, why and the readings', () => {
    fc.assert(fc.property(arbitraryFile, arbitraryFile, (file, other) => {
      const { unit, exportedAt, readings } = other
      return hashOf(readJson(writeJson({ ...file, unit, exportedAt, readings, note: 'another' }))) === hashOf(readJson(writeJson(file)))
    }), { numRuns: 30 })
  })
})

describe('whatever comes', () => {
  it('is an answer, never an exception: any bytes', () => {
    fc.assert(fc.property(fc.uint8Array({ maxLength: 200 }), (bytes) => {
      const outcome = readSettings(bytes)
      return !outcome.ok && outcome.errors.length > 0
    }), { numRuns: 1000 })
  })

  it('is an answer, never an exception: a good file with one place spoilt', () => {
    const spoilt = fc.tuple(arbitraryFile, fc.boolean(), fc.nat(), fc.nat({ max: 3 }), fc.string({ unit: 'binary', maxLength: 2 })).map(([file, json, at, cut, put]) => {
      const text = json ? writeJson(file) : writeCsv(file)
      const index = at % (text.length + 1)
      return text.slice(0, index) + put + text.slice(index + cut)
    })
    fc.assert(fc.property(spoilt, (text) => {
      const outcome = readSettingsText(text)
      if (outcome.ok) return true
      const lines = text.split(/\r\n|\r|\n/).length
      return outcome.errors.every(error => error.message !== '' && (error.line ?? 1) >= 1 && (error.line ?? 1) <= lines + 1 && (error.column ?? 1) >= 1)
    }), { numRuns: 300 })
  })

  it('is an answer, never an exception: any JSON in place of any part', () => {
    const parts = ['schema', 'unit', 'exportedAt', 'exportedBy', 'note', 'axisKind', 'setup', 'zones', 'moves', 'extra', 'readings'] as const
    fc.assert(fc.property(arbitraryFile, fc.constantFrom(...parts), fc.jsonValue({ maxDepth: 4 }), (file, part, value) => {
      const outcome = readJson(JSON.stringify({ ...file, [part]: value }))
      return outcome.ok || outcome.errors.every(error => error.at === '' || error.at.startsWith('/'))
    }), { numRuns: 150 })
  })
})
