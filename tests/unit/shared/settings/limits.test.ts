import { describe, expect, it } from 'vitest'
import { readSettingsText } from '../../../../shared/settings/read'
import type { FormatErrorCode } from '../../../../shared/settings/types'
import { csvHeader } from '../../../../shared/settings/write-csv'

/*
 * Every bound of the format from both sides and through both forms: the last that is read, and the first that is not, with
 * the code, the place, and words that state the bound and what was sent.
 */

interface Sent {
  readonly unit?: Readonly<Record<string, unknown>>
  readonly file?: Readonly<Record<string, unknown>>
  readonly setup?: Readonly<Record<string, unknown>>
  readonly zones?: readonly Readonly<Record<string, unknown>>[]
  readonly moves?: readonly Readonly<Record<string, unknown>>[]
  readonly extra?: Readonly<Record<string, unknown>>
  readonly readings?: Readonly<Record<string, unknown>>
}

const head = { schema: 'witnessmark.axis-settings/1', exportedAt: '2026-11-30T08:15:00Z', axisKind: 'linear' }
const identity = { serial: 'HL40-2231-0087', model: 'HL40-200V' }
const quoted = (value: unknown) => `"${String(value).replaceAll('"', '""')}"`

function jsonOf({ unit, file, ...rest }: Sent): string {
  return JSON.stringify({ ...head, ...file, unit: { ...identity, ...unit }, ...rest })
}

function csvOf({ unit, file, setup = {}, zones = [], moves = [], extra = {}, readings = {} }: Sent): string {
  const lines = (section: string, row: unknown, values: object) => Object.entries(values).filter(([key]) => key !== section)
    .map(([key, value]) => `${section},${String(row)},${quoted(key)},${quoted(value)},${section === 'extra' && typeof value === 'string' ? 'text' : ''}`)
  return [
    csvHeader.join(','), ...lines('file', '', { ...head, ...file }), ...lines('unit', '', { ...identity, ...unit }), ...lines('setup', '', setup),
    ...zones.flatMap(zone => lines('zone', zone.zone, zone)), ...moves.flatMap(move => lines('move', move.move, move)),
    ...lines('extra', '', extra), ...lines('reading', '', readings), '',
  ].join('\r\n')
}

const long = (length: number, sign = 'ü') => sign.repeat(length)
const many = (count: number, value: unknown = 1) => Object.fromEntries(Array.from({ length: count }, (_, index) => [`K${index}`, value]))
const zones = (count: number) => Array.from({ length: count }, (_, index) => ({ zone: index + 1, from: index, to: index + 1 }))
const move = { move: 4, kind: 'absolute', target: 10, speed: 250, acceleration: 2000 }
const moves = (count: number) => Array.from({ length: count }, (_, number) => ({ ...move, move: number }))

const bounds: readonly (readonly [what: string, last: Sent, first: Sent, code: FormatErrorCode, at: string, words: RegExp])[] = [
  ['a serial of 64 signs', { unit: { serial: long(64, 'A') } }, { unit: { serial: long(65, 'A') } }, 'text-length', '/unit/serial', /^65 characters; 1 to 64/],
  ['a serial of the signs of a label', { unit: { serial: 'aZ09._/-' } }, { unit: { serial: 'HL40 2231' } }, 'text-character', '/unit/serial', /^Only A-Z a-z 0-9 \. _ \/ - are allowed/],
  ['a model of 64 letters', { unit: { model: long(64) } }, { unit: { model: long(65) } }, 'text-length', '/unit/model', /^65 characters; 1 to 64/],
  ['a firmware of 32 letters', { unit: { firmware: long(32) } }, { unit: { firmware: long(33) } }, 'text-length', '/unit/firmware', /^33 characters; 1 to 32/],
  ['a name of 80 letters', { file: { exportedBy: long(80) } }, { file: { exportedBy: long(81) } }, 'text-length', '/exportedBy', /^81 characters; 1 to 80/],
  ['a note of 2,000 letters', { file: { note: long(2000) } }, { file: { note: long(2001) } }, 'text-length', '/note', /^2001 characters; 1 to 2000/],
  ['a note in lines', { file: { note: 'a\tb\nc' } }, { file: { note: 'a\u000bb' } }, 'text-character', '/note', /^Character U\+000B/],
  ['a label of 40 signs outside the first plane', { moves: [{ ...move, label: long(40, '😀') }] }, { moves: [{ ...move, label: long(41, '😀') }] }, 'text-length', '/moves/0/label', /^41 characters; 1 to 40/],
  ['a comment of 200 letters', { moves: [{ ...move, comment: long(200) }] }, { moves: [{ ...move, comment: long(201) }] }, 'text-length', '/moves/0/comment', /^201 characters; 1 to 200/],
  ['a key of 64 letters', { extra: { [long(64)]: 1 } }, { extra: { [long(65)]: 1 } }, 'text-length', `/extra/${long(65)}`, /^Key: 65 characters; 1 to 64/],
  ['a text of 256 letters', { extra: { K: long(256) } }, { extra: { K: long(257) } }, 'text-length', '/extra/K', /^257 characters; 0 to 256/],
  ['a text before the first control of direction', { extra: { K: 'a\u2029b' } }, { extra: { K: 'a\u202ab' } }, 'text-character', '/extra/K', /^Character U\+202A/],
  ['a text behind the last control of direction', { extra: { K: 'a\u206ab' } }, { extra: { K: 'a\u2069b' } }, 'text-character', '/extra/K', /^Character U\+2069/],
  ['32 zones', { zones: zones(32) }, { zones: zones(33) }, 'limit', '/zones', /^33 rows; at most 32/],
  ['1,024 moves', { moves: moves(1024) }, { moves: moves(1025) }, 'limit', '/moves', /^1025 rows; at most 1024/],
  ['5,000 values of the drive', { extra: many(5000) }, { extra: many(5001) }, 'limit', '/extra', /^5001 values; at most 5000/],
  ['500 readings', { readings: many(500) }, { readings: many(501) }, 'limit', '/readings', /^501 values; at most 500/],
  ['a place of 1e9', { setup: { softLimitMax: 1e9 } }, { setup: { softLimitMax: 1e9 + 1 } }, 'number-range', '/setup/softLimitMax', /at most 1,000,000,000/],
  ['a place of −1e9', { setup: { softLimitMin: -1e9 } }, { setup: { softLimitMin: -1e9 - 1 } }, 'number-range', '/setup/softLimitMin', /at most 1,000,000,000/],
  ['a speed of 0', { setup: { jogSpeed: 0 } }, { setup: { jogSpeed: -0.000001 } }, 'number-range', '/setup/jogSpeed', /^-0\.000001 will not do for jog speed/],
  ['an angle of 90 deg', { setup: { mountingAngle: 90 } }, { setup: { mountingAngle: 90.000001 } }, 'number-range', '/setup/mountingAngle', /-90 to 90 deg/],
  ['ten select inputs', { setup: { selectInputs: 10 } }, { setup: { selectInputs: 11 } }, 'number-range', '/setup/selectInputs', /0 to 10/],
  ['a node address of 65535', { setup: { nodeAddress: 65535 } }, { setup: { nodeAddress: 65536 } }, 'number-range', '/setup/nodeAddress', /0 to 65535/],
  ['move 1023', { moves: [{ ...move, move: 1023 }] }, { moves: [{ ...move, move: 1024 }] }, 'row-number', '/moves/0/move', /0 to 1023/],
  ['zone 32', { zones: [{ zone: 32, from: 0, to: 1 }] }, { zones: [{ zone: 33, from: 0, to: 1 }] }, 'row-number', '/zones/0/zone', /1 to 32/],
  ['a zone of a millionth', { zones: [{ zone: 1, from: 5, to: 5.000001 }] }, { zones: [{ zone: 1, from: 5, to: 5 }] }, 'order', '/zones/0/from', /from must lie below to/],
]

describe.each(bounds)('%s', (_what, last, first, code, at, words) => {
  it.each([['JSON', jsonOf], ['CSV', csvOf]] as const)('is read in %s, and the next one is not', (_form, write) => {
    const read = readSettingsText(write(last))
    expect(read.ok ? [] : read.errors).toEqual([])
    const refused = readSettingsText(write(first))
    expect(refused.ok ? [] : refused.errors).toMatchObject([{ code, at, message: expect.stringMatching(words) as string }])
  })
})

/* A number is at most 40 signs and an exponent of ±40, as it is written; JSON alone has exponents of its own grammar. */
describe('the text of a number', () => {
  const numbered = (text: string) => [
    readSettingsText(jsonOf({ setup: { softLimitMax: 7777 } }).replace('7777', text)),
    readSettingsText(csvOf({}) + `setup,,softLimitMax,${text},mm\r\n`),
  ].map(outcome => outcome.ok ? outcome.value.content.setup.softLimitMax : outcome.errors.map(error => `${error.code} ${error.at}`).join())

  it.each([
    ['40 signs', `1.${'0'.repeat(38)}`, 1], ['an exponent of 40 either way', '1e-40', 0], ['the same with a sign', '0E+40', 0], ['half a millionth and a bit', '0.0000005000000000001', 0.000001],
    ['half of the last digit: to the even one', '1.0000005', 1], ['the next half: to the even one too', '1.0000015', 1.000002], ['just below a whole billion', '999999999.9999994', 999999999.999999],
    ['a minus before nothing', '-0', 0], ['what rounds to nothing', '-0.0000004', 0],
  ])('%s is read: %s', (_what, text, value) => {
    expect(numbered(text)).toEqual([value, value])
    for (const read of numbered(text)) expect(Object.is(read, -0)).toBe(false)
  })

  it.each([
    ['41 signs', `1.${'0'.repeat(39)}`, 'number-digits'], ['an exponent of 41', '0e41', 'number-range'], ['an exponent of −41', '1e-41', 'number-range'],
    ['what rounds to more than a billion', '1000000000.0000006', 'number-range'],
  ] as const)('%s is not: %s', (_what, text, code) => {
    expect(numbered(text)).toEqual([`${code} /setup/softLimitMax`, `${code} /setup/softLimitMax`])
  })

  it('rounds to a billion what lies within half a millionth of it', () => {
    expect(numbered('1000000000.0000005')).toEqual([1e9, 1e9])
  })
})

/* Objects and lists lie at most 8 deep; the file itself is the first. */
describe('how deep a file may lie', () => {
  const deep = (levels: number) => `{"a":${'['.repeat(levels - 1)}1${']'.repeat(levels - 1)}}`
  const codes = (text: string) => {
    const outcome = readSettingsText(text)
    return outcome.ok ? [] : outcome.errors.map(error => error.code)
  }

  it('is 8: whatever else is wrong at the eighth, the ninth is one fault of its own', () => {
    expect(codes(deep(8))).not.toContain('nesting')
    expect(codes(deep(9))).toEqual(['nesting'])
  })
})
