import { describe, expect, it } from 'vitest'
import { readDriveCell, writeDriveCell } from '../../../../../shared/settings/entry-table/cell'
import type { ValueKind } from '../../../../../shared/settings/entry-table/address'

const number: ValueKind = { type: 'number', unit: 'mm' }
const flag: ValueKind = { type: 'flag' }
const extra: ValueKind = { type: 'extra' }
const text: ValueKind = { type: 'text' }
const entry = (part: object = {}) => ({ field: 'any', ...part })

describe('a cell of the drive’s list', () => {
  it.each([
    ['nothing is not set', '  ', '', entry(), number, undefined],
    ['the drive’s word for not set', '----', '', entry({ none: '----' }), number, undefined],
    ['a number with its unit', '1,5', 'mm', entry(), number, { text: '1.5', unit: '' }],
    ['a unit in another spelling', '1', 'um', entry({ unit: 'µm' }), number, { text: '1', unit: 'µm' }],
    ['a flag by the drive’s number', '1', '', entry({ words: { true: '1', false: '0' } }), flag, { text: 'true', unit: '' }],
    ['a number of the drive’s own', '1,5', 'A', entry(), extra, { text: '1.5', unit: 'A' }],
    ['the table’s unit before the one beside', '3', 'A', entry({ unit: 'counts' }), extra, { text: '3', unit: 'counts' }],
    ['an own text that looks like none of these', '007', '', entry(), extra, { text: '007', unit: 'text' }],
    ['an own flag', 'TRUE', '', entry(), extra, { text: 'TRUE', unit: '' }],
    ['a text with its guard taken off', '\'=a', '', entry(), text, { text: '=a', unit: '' }],
  ])('%s', (_, sent, beside, value, kind, expected) => {
    expect(readDriveCell(sent, beside, value, kind, 'comma')).toEqual(expected)
  })

  it.each([
    ['yes', '', flag, 'enum'], ['1.5', '', number, 'number-unclear'], ['1', 'kg', number, 'unit-unfit'],
  ])('%s %s is refused', (sent, beside, kind, code) => {
    expect(readDriveCell(sent, beside, entry(), kind, 'comma')).toMatchObject({ code })
  })

  it('is written with the sign of the list', () => {
    expect(writeDriveCell(1.5, entry(), number, 'comma')).toBe('1,5')
    expect(writeDriveCell(undefined, entry({ none: '-' }), number, 'comma')).toBe('-')
    expect(writeDriveCell({ value: -0.5, unit: 'A' }, entry(), extra, 'comma')).toBe('-0,5')
    expect(writeDriveCell(false, entry({ words: { false: '0' } }), flag, 'comma')).toBe('0')
    expect(writeDriveCell('=a', entry(), text, 'point')).toBe('\'=a')
  })
})
