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

describe('a cell and its way back', () => {
  const choice: ValueKind = { type: 'choice', choices: ['extend', 'retract'] }
  const own: ValueKind = { type: 'own' }

  it.each([
    ['a number, by factor and unit', 12.7, entry({ unit: 'in', factor: 0.1 }), number, '5'],
    ['a number in the unit of the field', -0.5, entry(), number, '-0,5'],
    ['a word of the drive', 'retract', entry({ words: { extend: '0', retract: '1' } }), choice, '1'],
    ['a word that the table leaves as it is', 'extend', entry({ words: { retract: '1' } }), choice, 'extend'],
    ['a flag without words', true, entry(), flag, 'true'],
    ['a number that is kept as it is', 310.25, entry(), own, '310,25'],
    ['a text', 'Lid press', entry(), text, 'Lid press'],
    ['a text like a formula', '=1+2', entry(), text, '\'=1+2'],
  ] as const)('%s', (_, value, part, kind, cell) => {
    expect(writeDriveCell(value, part, kind, 'comma')).toBe(cell)
    const read = readDriveCell(cell, '', part, kind, 'comma')
    expect(read).toMatchObject({ text: typeof value === 'number' && kind !== number ? String(value) : expect.any(String) as string })
    if (kind === choice || kind === flag) expect(read).toEqual({ text: String(value), unit: '' })
  })

  it('names all words that a drive may write, its own beside ours', () => {
    expect(readDriveCell('2', '', entry({ words: { extend: '0' } }), choice, 'point')).toEqual({ code: 'enum', message: '"2" is none of 0 (extend), retract.' })
    expect(readDriveCell('extend', '', entry({ words: { extend: '0' } }), choice, 'point')).toMatchObject({ code: 'enum' })
  })

  it('takes the sign of the list and no other, in numbers and in the drive’s own', () => {
    expect(readDriveCell('1.5', '', entry(), own, 'point')).toEqual({ text: '1.5', unit: '' })
    expect(readDriveCell('1,5', '', entry(), own, 'point')).toMatchObject({ code: 'number-unclear', message: '"1,5" has another decimal sign than this list, which has the point.' })
    // What is no number with this sign is a text of the drive's own.
    expect(readDriveCell('1,5', '', entry(), extra, 'point')).toEqual({ text: '1,5', unit: 'text' })
    expect(readDriveCell('1.5', 'A', entry(), extra, 'comma')).toEqual({ text: '1.5', unit: 'text' })
  })

  it('says which unit the file has and which the table', () => {
    expect(readDriveCell('1', 'in', entry({ unit: 'm' }), number, 'point')).toEqual({ code: 'unit-unfit', message: 'The file has in here, the entry table m. Correct the one that is wrong.', meant: 'm' })
    expect(readDriveCell('1', ' mm ', entry(), number, 'point')).toEqual({ text: '1', unit: '' })
  })

  it('is empty, or the drive’s word, for what is not set: blanks around it do not matter', () => {
    expect(writeDriveCell(undefined, entry(), number, 'point')).toBe('')
    for (const sent of ['', ' ', ' - ', '-']) expect(readDriveCell(sent, 'kg', entry({ none: '-' }), number, 'point')).toBeUndefined()
    expect(readDriveCell('--', '', entry({ none: '-' }), text, 'point')).toEqual({ text: '--', unit: '' })
  })
})
