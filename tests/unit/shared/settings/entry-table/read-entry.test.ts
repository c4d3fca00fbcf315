import { describe, expect, it } from 'vitest'
import { readEntryFile } from '../../../../../shared/settings/entry-table/read-entry'
import type { FormatError, ReadOutcome } from '../../../../../shared/settings/types'
import { liftFile, liftLines, liftPlate } from '../../../../support/entry-table'

const known = { exportedAt: '2026-11-30T08:15:00+01:00' }
const read = (lines: readonly string[], plate: Parameters<typeof readEntryFile>[1] = liftPlate, beside: Parameters<typeof readEntryFile>[2] = known) =>
  readEntryFile(new TextEncoder().encode(lines.join('\r\n')), plate, beside)
const errorsOf = (outcome: ReadOutcome): readonly FormatError[] => outcome.ok ? [] : outcome.errors
/** The file with the line that begins so replaced. */
const withLine = (start: string, line: string) => liftLines.map(each => each.startsWith(start) ? line : each)

describe('a file in the layout of a drive', () => {
  it('reads as the neutral file', () => {
    const outcome = read(liftLines)
    expect(errorsOf(outcome)).toEqual([])
    expect(outcome.ok && outcome.value.file).toEqual(liftFile)
    expect(outcome.ok && outcome.value.normalised).toEqual({ form: 'csv', rounded: 0, converted: 3, encoding: 'utf-8', decodedTexts: [], delimiter: ';', decimal: 'comma' })
  })

  it('takes zeros and plus signs that drives pad with', () => {
    const outcome = read(withLine('K-004', 'K-004;Soft limit max; +0184,50 ;mm'))
    expect(outcome.ok && outcome.value.content.setup.softLimitMax).toBe(184.5)
  })

  it('keeps a parameter that the table does not know under its own number', () => {
    const outcome = read([...liftLines.slice(0, 12), 'K-099;Unheard of;7,5;A', 'K-100;;on;', 'K-101;;;', ...liftLines.slice(12)])
    expect(outcome.ok && outcome.value.content.extra).toEqual({ ...liftFile.extra, 'K-099': { value: 7.5, unit: 'A' }, 'K-100': 'on' })
  })

  it('takes columns in any order, and lets others pass', () => {
    const outcome = read([...liftLines.slice(0, 13), 'Output;Colour;On to;On from', '1;red;25;10', ...liftLines.slice(15)])
    expect(outcome.ok && outcome.value.content.zones).toEqual(liftFile.zones)
  })

  it('asks for a serial and a time that do not stand in it', () => {
    const without = liftLines.filter(line => !line.startsWith('P-01'))
    expect(errorsOf(read(without, liftPlate, {})).map(({ code, at }) => [code, at])).toEqual([['missing', '/exportedAt'], ['missing', '/unit/serial']])
    const said = read(without, liftPlate, { ...known, serial: 'LT10-26-0009', firmware: '9.9' })
    expect(said.ok && said.value.file.unit).toEqual({ serial: 'LT10-26-0009', model: 'LT10-100', firmware: '1.4' })
  })

  it('lets a serial in the file go before one that is said', () => {
    const outcome = read(liftLines, liftPlate, { ...known, serial: 'ANOTHER' })
    expect(outcome.ok && outcome.value.file.unit.serial).toBe('LT10-26-0001')
  })
})

describe('what is wrong with it', () => {
  it.each([
    ['another header', 'No.;', 'No.;Value;Parameter', { code: 'header', line: 2, column: 1 }],
    ['a number that is none', 'K-003', 'K-003;Soft limit min;two;mm', { code: 'number-syntax', at: '/setup/softLimitMin', line: 6, column: 22, value: 'two' }],
    ['another decimal sign', 'K-004', 'K-004;Soft limit max;184.5;mm', { code: 'number-unclear', at: '/setup/softLimitMax', line: 7, value: '184.5' }],
    ['a word of none', 'K-001', 'K-001;Positive direction;2;', { code: 'enum', at: '/setup/positiveDirection', line: 5, value: '2', message: '"2" is none of 0 (extend), 1 (retract).' }],
    ['another unit', 'K-012', 'K-012;Speed limit;250;mm/s', { code: 'unit-unfit', at: '/setup/speedLimit', line: 8, meant: 'm/s' }],
    ['a value out of range', 'K-020', 'K-020;Window;-50;mm', { code: 'number-range', at: '/setup/inPositionWindow', line: 9, value: '-50' }],
    ['a parameter twice', 'K-017', 'K-003;Soft limit min;3;mm', { code: 'value-duplicate', at: '/setup/softLimitMin', line: 13 }],
    ['a line without a number', 'K-017', ';;15;', { code: 'csv-syntax', line: 13 }],
    ['a quote out of place', 'K-017', 'K-017;;1"5;', { code: 'csv-syntax', line: 13 }],
    ['a column that is missing', 'Step', 'Step;Name;Mode;Position;Vel;Acc;Force;Slow at;Then', { code: 'header', at: '/moves', line: 16 }],
    ['a move twice', '0;;A', '3;;A;500;250;2;-;-;-', { code: 'row-duplicate', at: '/moves', line: 18, value: '3' }],
    ['a zone the wrong way round', '1;10', '1;25;10', { code: 'order', at: '/zones/0/from', line: 15, column: 3, value: '25' }],
    ['a press without its force', '3;Press', '3;Press;P;15025;100;2,5;-;120;0', { code: 'missing', at: '/moves/1/forceLimit', line: 18 }],
  ])('%s', (_, start, line, expected) => {
    const errors = errorsOf(read(withLine(start, line)))
    expect(errors[0]).toMatchObject(expected)
  })

  it('is said all at once', () => {
    const lines = withLine('K-003', 'K-003;;x;mm').map(line => line.startsWith('K-001') ? 'K-001;;7;' : line)
    expect(errorsOf(read(lines)).map(({ code }) => code)).toEqual(['enum', 'number-syntax'])
  })

  it('does not read a file that was cut off as one without moves', () => {
    expect(errorsOf(read(liftLines.slice(0, 13))).map(({ code, at }) => [code, at])).toEqual([['header', '/zones'], ['header', '/moves']])
  })

  it('says that a model has no entry table', () => {
    expect(errorsOf(read(liftLines, { model: 'LT20', axisKind: 'linear' }))[0]).toMatchObject({ code: 'header', message: expect.stringContaining('LT20 has no entry table') })
  })

  it('tells bytes of no encoding and files beyond the limit', () => {
    expect(errorsOf(readEntryFile(Uint8Array.of(0x81, 0x8d), liftPlate, known))[0]?.code).toBe('encoding')
    expect(errorsOf(readEntryFile(new Uint8Array(2 * 1024 * 1024 + 1), liftPlate, known))[0]?.code).toBe('limit')
  })
})
