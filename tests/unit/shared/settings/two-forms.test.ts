import { describe, expect, it } from 'vitest'
import { csvHeader } from '../../../../shared/settings/write-csv'
import { readSettingsText } from '../../../../shared/settings/read'
import type { AxisKind, Content, FormatErrorCode } from '../../../../shared/settings/types'

/*
 * One fault, two forms, one answer: what is wrong with a value does not hang on how it was sent. Each value below goes
 * through the JSON form and through the CSV form, and both say the same code at the same pointer.
 */

type Values = Readonly<Record<string, unknown>>
interface Sent { readonly axisKind?: AxisKind, readonly setup?: Values, readonly zones?: readonly Values[], readonly moves?: readonly Values[], readonly extra?: Values }

const head = { schema: 'witnessmark.axis-settings/1', exportedAt: '2026-11-30T08:15:00Z' }
const unit = { serial: 'HL40-2231-0087', model: 'HL40-200V' }

function jsonOf({ axisKind = 'linear', ...rest }: Sent): string {
  return JSON.stringify({ ...head, unit, axisKind, ...rest })
}

function csvOf({ axisKind = 'linear', setup = {}, zones = [], moves = [], extra = {} }: Sent): string {
  const lines = (section: string, row: unknown, values: Values) =>
    Object.entries(values).filter(([key]) => key !== section).map(([key, value]) => `${section},${String(row)},${key},${String(value)},`)
  return [
    csvHeader.join(','), ...lines('file', '', { ...head, axisKind }), ...lines('unit', '', unit), ...lines('setup', '', setup),
    ...zones.flatMap(zone => lines('zone', zone.zone, zone)), ...moves.flatMap(move => lines('move', move.move, move)), ...lines('extra', '', extra), '',
  ].join('\r\n')
}

function answerTo(text: string): Content | readonly string[] {
  const outcome = readSettingsText(text)
  return outcome.ok ? outcome.value.content : outcome.errors.map(error => `${error.code} ${error.at}`)
}
const answers = (sent: Sent) => [answerTo(jsonOf(sent)), answerTo(csvOf(sent))]

const move = { move: 4, kind: 'absolute', target: 10, speed: 250, acceleration: 2000 }
const press = { ...move, kind: 'press', forceLimit: 38, approach: 5 }
const zone = { zone: 2, from: 1, to: 5 }

const faults: readonly (readonly [what: string, sent: Sent, code: FormatErrorCode, at: string])[] = [
  ['a field that nobody knows', { setup: { softlimitmax: 180 } }, 'key-unknown', '/setup/softlimitmax'],
  ['a word that is none of those', { setup: { homingMethod: 'hardstop' } }, 'enum', '/setup/homingMethod'],
  ['a direction of the other axis kind', { setup: { positiveDirection: 'clockwise' } }, 'enum', '/setup/positiveDirection'],
  ['a flag that is none', { setup: { brakeFitted: 'fitted' } }, 'enum', '/setup/brakeFitted'],
  ['a speed below 0', { setup: { jogSpeed: -0.000001 } }, 'number-range', '/setup/jogSpeed'],
  ['a number beyond 1e9', { setup: { softLimitMax: 1000000001 } }, 'number-range', '/setup/softLimitMax'],
  ['an angle past the vertical', { setup: { mountingAngle: 90.5 } }, 'number-range', '/setup/mountingAngle'],
  ['half an input', { setup: { selectInputs: 2.5 } }, 'number-range', '/setup/selectInputs'],
  ['a rotary field on a linear axis', { setup: { modulo: 360 } }, 'not-allowed-here', '/setup/modulo'],
  ['a linear field on a rotary axis', { axisKind: 'rotary', setup: { payloadMass: 4 } }, 'not-allowed-here', '/setup/payloadMass'],
  ['zone 0', { zones: [{ ...zone, zone: 0 }] }, 'row-number', '/zones/0/zone'],
  ['zone 33', { zones: [{ ...zone, zone: 33 }] }, 'row-number', '/zones/0/zone'],
  ['a zone that ends before it begins', { zones: [{ ...zone, from: 5, to: 1 }] }, 'order', '/zones/0/from'],
  ['a zone of no width', { zones: [{ ...zone, to: 1 }] }, 'order', '/zones/0/from'],
  ['move 1024', { moves: [{ ...move, move: 1024 }] }, 'row-number', '/moves/0/move'],
  ['a move of a kind that there is not', { moves: [{ ...move, kind: 'fast' }] }, 'enum', '/moves/0/kind'],
  ['a move that stands still but has an acceleration', { moves: [{ ...move, speed: 0 }] }, 'number-range', '/moves/0/speed'],
  ['a press speed without a press', { moves: [{ ...move, pressSpeed: 5 }] }, 'not-allowed-here', '/moves/0/pressSpeed'],
  ['an approach of a relative move', { moves: [{ ...move, kind: 'relative', approach: 5 }] }, 'not-allowed-here', '/moves/0/approach'],
  ['a turn on a linear axis', { moves: [{ ...move, turn: 'shortest' }] }, 'not-allowed-here', '/moves/0/turn'],
  ['a turn on a rotary axis without a modulo', { axisKind: 'rotary', moves: [{ ...move, turn: 'shortest' }] }, 'not-allowed-here', '/moves/0/turn'],
  ['a dwell with nothing behind it', { moves: [{ ...move, dwell: 100 }] }, 'not-allowed-here', '/moves/0/dwell'],
  ['a follower that no table can hold', { moves: [{ ...move, next: 1024 }] }, 'row-number', '/moves/0/next'],
  ['a press without a force limit', { moves: [{ ...press, forceLimit: '' }] }, 'missing', '/moves/0/forceLimit'],
  ['a press without an approach', { moves: [{ ...press, approach: '' }] }, 'missing', '/moves/0/approach'],
  ['a force limit of 0', { moves: [{ ...press, forceLimit: 0 }] }, 'number-range', '/moves/0/forceLimit'],
  ['a negative window', { moves: [{ ...move, window: -0.1 }] }, 'number-range', '/moves/0/window'],
  ['a label of 41 letters', { moves: [{ ...move, label: 'a'.repeat(41) }] }, 'text-length', '/moves/0/label'],
  ['a label that turns the reading direction', { moves: [{ ...move, label: 'up\u202edown' }] }, 'text-character', '/moves/0/label'],
  ['a number of the drive that no double holds', { setup: { velocityGain: '9007199254740993' } }, 'number-digits', '/setup/velocityGain'],
  ['a key with a blank before it', { extra: { ' K': 1 } }, 'text-character', '/extra/ K'],
  ['a key that cannot be kept', { extra: { ['__proto__']: 1 } }, 'not-allowed-here', '/extra/__proto__'],
]

describe('one fault in two forms', () => {
  it.each(faults)('%s', (_, sent, code, at) => {
    const bare = code === 'number-digits' ? jsonOf(sent).replace('"9007199254740993"', '9007199254740993') : jsonOf(sent)
    expect(answerTo(bare)).toEqual([`${code} ${at}`])
    expect(answerTo(csvOf(sent))).toEqual([`${code} ${at}`])
  })

  it('is found in every row of a table, by its index', () => {
    const moves = [3, 4, 5].map(number => ({ ...move, move: number, window: -1 }))
    for (const answer of answers({ moves })) expect(answer).toEqual(['number-range /moves/0/window', 'number-range /moves/1/window', 'number-range /moves/2/window'])
  })
})

/* What lies just inside the same borders is kept, as the same content, whichever form it came in. */
const kept: readonly (readonly [what: string, sent: Sent])[] = [
  ['nothing but identity', {}],
  ['a smallest and a largest number', { setup: { softLimitMin: -1e9, softLimitMax: 1e9, jogSpeed: 0 } }],
  ['an angle straight down', { setup: { mountingAngle: -90, selectInputs: 10, nodeAddress: 65535 } }],
  ['a flag either way', { setup: { brakeFitted: false, softLimitsActive: true } }],
  ['the first and the last zone', { zones: [{ ...zone, zone: 1 }, { ...zone, zone: 32 }] }],
  ['the first and the last move', { moves: [{ ...move, move: 0, next: 1023 }, { ...move, move: 1023, next: 0, dwell: 0 }] }],
  ['an unused row', { moves: [{ ...move, speed: 0, acceleration: 0 }] }],
  ['a press as slow and weak as can be written', { moves: [{ ...press, forceLimit: 0.000001, pressSpeed: 0.000001 }] }],
  ['a label of forty letters beyond ASCII', { moves: [{ ...move, label: 'Ä'.repeat(40) }] }],
  ['a turn where the axis wraps', { axisKind: 'rotary', setup: { modulo: 360 }, moves: [{ ...move, turn: 'shortest' }] }],
  ['a zone over the wrap', { axisKind: 'rotary', setup: { modulo: 360 }, zones: [{ zone: 1, from: 350, to: 10 }] }],
  ['values of the drive', { extra: { 'K-017': 15, 'K-018': true, 'K-019': 'slow', 'toString': 1 } }],
]

describe('one content in two forms', () => {
  it.each(kept)('%s', (_, sent) => {
    const [json, csv] = answers(sent)
    const { axisKind = 'linear', setup = {}, zones = [], moves = [], extra = {} } = sent
    expect(json).toEqual({ axisKind, setup, zones, moves, extra })
    expect(csv).toEqual(json)
  })
})
