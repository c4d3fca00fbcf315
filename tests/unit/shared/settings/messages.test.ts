import { describe, expect, it } from 'vitest'
import { readSettings, readSettingsText } from '../../../../shared/settings/read'
import { formatErrorCodes, type FormatError } from '../../../../shared/settings/types'

/*
 * What a person reads who sent a file with a fault: where it stands, the value as it was sent, and what would be right. The
 * sentences are held word for word, since the screen shows them as they are.
 */

const head = { schema: 'witnessmark.axis-settings/1', unit: { serial: 'A1', model: 'HL40-200V' }, exportedAt: '2026-11-30T08:15:00Z', axisKind: 'linear' }
const move = { move: 4, kind: 'absolute', target: 10, speed: 250, acceleration: 2000 }
const json = (more: object) => JSON.stringify({ ...head, ...more }, null, 1)
const csvHead = ['section,row,field,value,unit', 'file,,schema,witnessmark.axis-settings/1,', 'file,,exportedAt,2026-11-30T08:15:00Z,', 'file,,axisKind,linear,', 'unit,,serial,A1,', 'unit,,model,HL40-200V,']
const csv = (...lines: string[]) => [...csvHead, ...lines, ''].join('\n')
const semicolons = (...lines: string[]) => [...csvHead.map(line => line.replaceAll(',', ';')), ...lines, ''].join('\n')

const errorsOf = (sent: string | Uint8Array): readonly FormatError[] => {
  const outcome = typeof sent === 'string' ? readSettingsText(sent) : readSettings(sent)
  return outcome.ok ? [] : outcome.errors
}
const told = (sent: string | Uint8Array) => errorsOf(sent).map(({ line, column, message }) => `${line}:${column} ${message}`)

const inJson: readonly (readonly [what: string, sent: string, ...messages: string[]])[] = [
  ['a value below its range', json({ setup: { jogSpeed: -1 } }), '10:15 -1 will not do for jog speed: it must be 0 or more mm/s.'],
  ['a value outside two bounds', json({ setup: { mountingAngle: 91 } }), '10:20 91 will not do for mounting angle: it must be -90 to 90 deg.'],
  ['a value that must be above one', json({ axisKind: 'rotary', setup: { modulo: 0 } }), '10:13 0 will not do for modulo: it must be more than 0 deg.'],
  ['a whole number out of range', json({ setup: { selectInputs: 11 } }), '10:19 11 will not do: a whole number from 0 to 10 belongs here.'],
  ['a number beyond all ranges', json({ setup: { softLimitMax: 1e10 } }), '10:19 10000000000 is out of reach: at most 1,000,000,000 either way in mm.'],
  ['a number in quotes', json({ setup: { jogSpeed: '5' } }), '10:15 "5" is no number; write it like -12.5, without a unit or blanks.'],
  ['a word that there is not', json({ setup: { homingMethod: 'hardstop' } }), '10:19 "hardstop" is not one of hard-stop, limit-switch, home-switch, index-pulse, current-position, absolute-encoder.'],
  ['a flag that is none', json({ setup: { brakeFitted: 'yes' } }), '10:18 "yes" is not one of true, false.'],
  ['a misspelt key', json({ setup: { softlimitmax: 1 } }), '10:3 "softlimitmax" is no key of this place: softLimitMax is probably meant.'],
  ['a key like no other', json({ colour: 1 }), '9:2 "colour" is no key of this place: take it out, or put it under extra.'],
  ['a key given twice', json({}).replace('"axisKind"', '"axisKind": "linear",\n "axisKind"'), '9:2 "axisKind" is given twice; leave one.'],
  ['a field of the other axis kind', json({ setup: { modulo: 5 } }), '10:13 modulo is not for a linear axis; take it out.'],
  ['nothing at all', '{"unit":{}}',
    '1:1 schema is missing: "witnessmark.axis-settings/1" belongs here.', '1:1 exportedAt is missing: the time of the export belongs here, like 2026-11-30T08:15:00+01:00.',
    '1:1 axisKind is missing: linear or rotary belongs here.', '1:9 serial is missing: the serial of the unit belongs here.', '1:9 model is missing: the model of the unit belongs here.'],
  ['a press without what a press needs', json({ moves: [{ ...move, kind: 'press' }] }),
    '10:3 This press has no forceLimit: Most thrust or torque during this move, of the rated one. A press needs it.', '10:3 This press has no approach: Where the slow, force-limited part of a press begins.'],
  ['half an unused row', json({ moves: [{ ...move, speed: 0 }] }), '14:13 0 will not do for speed: it must be more than 0; 0 in both speed and acceleration marks an unused row.'],
  ['a deceleration of 0', json({ moves: [{ ...move, deceleration: 0 }] }), '16:20 0 will not do for decel.: it must be more than 0.'],
  ['a negative window', json({ moves: [{ ...move, window: -1 }] }), '16:14 -1 will not do for window: it must be 0 or more.'],
  ['a turn where nothing wraps', json({ moves: [{ ...move, turn: 'signed' }] }), '16:12 turn belongs to a rotary axis with a modulo in its setup. Take it out.'],
  ['a wait for nothing', json({ moves: [{ ...move, dwell: 1 }] }), '16:13 dwell waits before the move that follows; this one has no next. Take it out, or give next.'],
  ['a press speed of another move', json({ moves: [{ ...move, pressSpeed: 1 }] }), '16:18 pressSpeed belongs to a press; this move is absolute. Take it out.'],
  ['a number used twice', json({ moves: [move, move] }), '18:12 Row 4 is there already; each number is used once.'],
  ['a row without a number', json({ moves: [{ ...move, move: undefined }] }), '10:3 The row has no number; 0 to 1023 belongs here.'],
  ['a zone the wrong way round', json({ zones: [{ zone: 1, from: 5, to: 1 }] }), '12:12 The zone begins at 5 and ends at 1: from must lie below to.'],
  ['no list and no row', json({ zones: 5, moves: [1] }), '9:11 A list of rows [ … ] belongs here.', '11:3 A row is an object { … }.'],
  ['a label too long', json({ moves: [{ ...move, label: 'a'.repeat(41) }] }), '16:13 41 characters; 1 to 40 are allowed.'],
  ['a character that hides others', json({ moves: [{ ...move, label: 'a\u202eb' }] }), '16:13 Character U+202E is not allowed here; take it out.'],
  ['a serial with a blank', json({ unit: { ...head.unit, serial: 'A 1' } }), '4:13 Only A-Z a-z 0-9 . _ / - are allowed here.'],
  ['a time of another spelling', json({ exportedAt: '30.11.2026' }), '7:16 30.11.2026 is no time with offset (RFC 3339) of a real day; write it like 2026-11-30T08:15:00+01:00.'],
  ['a later schema', json({ schema: 'witnessmark.axis-settings/2' }), '2:12 "witnessmark.axis-settings/2" is not read here; this is the reader of witnessmark.axis-settings/1.'],
  ['more digits than a double has', json({ setup: { velocityGain: 1 } }).replace('"velocityGain": 1', '"velocityGain": 9007199254740993'), '10:19 9007199254740993 has more digits than can be kept; write it shorter, or as text under extra.'],
  ['an exponent beyond reach', json({ extra: { K: 1 } }).replace('"K": 1', '"K": 1e99'), '10:8 1e99 has an exponent beyond ±40.'],
  ['extra that cannot be kept', json({ extra: { ' K': 1, 'L': [1], 'M': { value: 1 } } }),
    '10:3 The key " K" has a blank at its beginning or end; take it out.', '11:8 A list cannot be kept here; write a number, true or false, a text, or { value, unit }.', '14:8 unit is missing: { value, unit } needs both.'],
  ['a list for a file', '[1]', '1:1 A settings file is one object { … }.'],
  ['a comma too many', '{"a":1,}', '1:8 Nothing follows the comma before "}": take the comma out.'],
  ['a colon for a value', '{"a"::1}', '1:6 A value cannot begin with ":".'],
  ['a file cut after a colon', '{\n "unit": {\n  "serial":', '3:12 The value of "serial" is missing: the file ends here. Was it cut short? Export it again.'],
  ['a file cut after a colon and a line end', '{"moves": [{"target": \n', '2:1 The value of "target" is missing: the file ends here. Was it cut short? Export it again.'],
  ['a file cut within a list', '{"moves": [1,', '1:14 A value is missing: the file ends here. Was it cut short? Export it again.'],
  ['no value behind a colon', '{"speed": , "target": 1}', '1:11 The value of "speed" is missing before ",".'],
  ['no value at the end of an object', '{"speed":}', '1:10 The value of "speed" is missing before "}".'],
  ['no value at the beginning of a list', '[,1]', '1:2 A value is missing before ",".'],
  ['a sign too many', '{}}', '1:3 Nothing may follow the closing sign; "}" does.'],
  ['too deep a tree', '['.repeat(9), '1:9 Objects and lists lie 9 deep here; at most 8 are read.'],
]

const inCsv: readonly (readonly [what: string, sent: string, ...messages: string[]])[] = [
  ['another header', 'a,b,c\n', '1:1 The file begins with neither { nor the header section,row,field,value,unit. Put one of them first.'],
  ['a unit of another quantity', csv('setup,,jogSpeed,5,kg'), '7:19 Unit "kg" does not fit this value: here fit mm/s, m/s, in/s.'],
  ['a unit that there is not', csv('setup,,jogSpeed,5,mmm/s'), '7:19 Unit "mmm/s" is not a unit that is read: here fit mm/s, m/s, in/s.'],
  ['a unit beside a word', csv('setup,,homingMethod,hard-stop,mm'), '7:31 This value takes no unit; leave the cell with "mm" empty.'],
  ['a decimal comma in a comma file', csv('setup,,jogSpeed,"1,5",mm/s'), '7:17 "1,5" could be 1.5 or 15: the decimal point is the sign of this file.'],
  ['two decimal signs in one file', semicolons('setup;;softLimitMax;1,5;', 'setup;;softLimitMin;0.5;'), '7:21 The file has both "0.5" and "1,5": write all numbers with one decimal sign.'],
  ['a sign that may be either', semicolons('setup;;softLimitMax;1.500;'), '7:21 "1.500" could be 1.500 or 1500: say which sign is the decimal one.'],
  ['a line too short', csv('setup,,jogSpeed'), '7:1 3 cells; a line has 5: section, row, field, value, unit. A cell with a "," in it stands in quotes.'],
  ['a line too long, by tabs', csv('setup,,jogSpeed,1,mm/s,2').replaceAll(',', '\t'), '7:1 6 cells; a line has 5: section, row, field, value, unit. A cell with a "tab" in it stands in quotes.'],
  ['text behind a quote', csv('setup,,jogSpeed,"5" ,mm/s'), '7:20 Text after a closing quote: a delimiter or a new line belongs here. A quote in a text is doubled.'],
  ['a quote within', csv('setup,,jogSpeed,5",mm/s'), '7:18 A quote inside a cell that does not begin with one: put the cell in quotes and double this quote.'],
  ['a quote that is never closed', csv('extra,,K,"5,'), '7:10 The cell is not closed: its second quote is missing.'],
  ['a section that there is not', csv('zones,1,from,1,mm'), '7:1 "zones" is no section; one of file, unit, setup, zone, move, extra, reading belongs here.'],
  ['a field of the file that there is not', csv('file,,colour,red,'), '7:7 "colour" is no field of file: one of schema, exportedAt, exportedBy, note, axisKind belongs here.'],
  ['a number of a row without rows', csv('setup,1,jogSpeed,1,'), '7:7 Only zones and moves have row numbers; leave the cell with "1" empty.'],
  ['a value given twice', csv('setup,,jogSpeed,1,', 'setup,,jogSpeed,2,'), '8:17 jogSpeed is given twice; leave one.'],
  ['a value of one row given twice', csv('zone,3,from,1,', 'zone,3,to,2,', 'zone,3,from,1,'), '9:13 from is given twice for zone 3; leave one.'],
]

describe('what is said of a fault in the JSON form', () => {
  it.each(inJson)('%s', (_, sent, ...messages) => expect(told(sent)).toEqual(messages))
})

describe('what is said of a fault in the CSV form', () => {
  it.each(inCsv)('%s', (_, sent, ...messages) => expect(told(sent)).toEqual(messages))
})

describe('what is said of bytes that are no text', () => {
  it('names the byte, its place and the way out', () => {
    expect(readSettings(Uint8Array.from([0x7b, 0x0a, 0x22, 0xff, 0x22, 0x7d]))).toEqual({
      ok: false, more: 0, errors: [{ at: '', line: 2, column: 2, code: 'encoding', message: 'The JSON form is UTF-8; byte FF is not. Save the file as UTF-8.' }],
    })
  })
})

describe('all of these sentences', () => {
  const all = [...inJson, ...inCsv].flatMap(([, sent]) => errorsOf(sent))

  it('cover nearly every code', () => {
    const seen = new Set(all.map(error => error.code))
    expect(formatErrorCodes.filter(code => !seen.has(code))).toEqual(['encoding', 'limit'])
  })

  it('begin with a capital, a value or the name of a field, and end with a full stop', () => {
    for (const { message } of all) expect(message).toMatch(/^["A-Z0-9-]|^[a-zA-Z]+ (is|belongs|waits)\b/)
    for (const { message } of all) expect(message).toMatch(/\.$/)
  })

  it('never blame, and never name a program’s own words', () => {
    for (const { message } of all) expect(message).not.toMatch(/\b(invalid|illegal|error|must not|you|undefined|null|NaN|object Object|regex|token)\b/i)
  })

  it('say what was meant where that can be told', () => {
    const meant = Object.fromEntries(all.flatMap(error => error.meant === undefined ? [] : [[error.value, error.meant]]))
    expect(meant).toEqual({ '"hardstop"': 'hard-stop', 'softlimitmax': 'softLimitMax', 'mmm/s': 'mm/s', 'zones': 'zone' })
  })
})
