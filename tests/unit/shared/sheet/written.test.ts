import { describe, expect, it } from 'vitest'
import type { EntryParameter, EntryTable } from '../../../../shared/settings/entry-table/schema'
import { setupFieldNames } from '../../../../shared/settings/fields'
import type { Content, Setup } from '../../../../shared/settings/types'
import { writtenCell } from '../../../../shared/sheet/beside'
import { labelOf, unitOf } from '../../../../shared/sheet/labels'
import { sheetMoves } from '../../../../shared/sheet/moves'
import { sheetTaught, sheetValues, type SheetSource } from '../../../../shared/sheet/values'
import { absolute, linear, plate, press, rotary, unused } from '../../../support/check-input'

/*
 * What a person types into the drive from the paper: the drive's own numbers where its list is known, and enough beside them
 * to see that they mean the same.
 */

const table = (parameters: readonly EntryParameter[], more: Partial<EntryTable> = {}): EntryTable =>
  ({ delimiter: ';', decimal: 'point', header: [], columns: { number: 1, value: 2, name: 0, unit: 0 }, parameters: [...parameters], zones: [], moves: [], ...more })
const shown = (content: Content, entryTable?: EntryTable, more: Partial<SheetSource> = {}) =>
  sheetValues({ content, nameplate: plate({ axisKind: content.axisKind, ratedThrust: 400, ...entryTable ? { entryTable } : {} }), left: [], prove: [], ...more })
const one = (setup: Setup, entry: Omit<EntryParameter, 'number'>, sign: EntryTable['decimal'] = 'point') => {
  const [value] = shown(linear(setup), table([{ number: '7', ...entry }], { decimal: sign }))
  return `${value?.value} ${value?.unit} | ${value?.beside}`
}

describe('a value by the drive’s list', () => {
  it.each([
    // 250 mm/s are 0.25 m/s, and half-even with one digit 0.2 m/s.
    ['in another unit', { speedLimit: 250 }, { field: 'speedLimit', unit: 'm/s' }, '0.25 m/s | = 250 mm/s'],
    ['with fewer digits than it has, the value it stands for beside it', { speedLimit: 250 }, { field: 'speedLimit', unit: 'm/s', digits: 1 }, '0.2 m/s | = 250 mm/s'],
    ['in counts', { softLimitMax: 180 }, { field: 'softLimitMax', factor: 0.01 }, '18000  | = 180 mm'],
    ['in counts of one', { softLimitMax: 180 }, { field: 'softLimitMax', factor: 1 }, '180 mm | '],
    ['with digits that say no more', { softLimitMax: 180 }, { field: 'softLimitMax', digits: 2 }, '180.00 mm | '],
    ['below nought, with a real minus sign', { softLimitMin: -2.5 }, { field: 'softLimitMin', digits: 2 }, '−2.50 mm | '],
    // 38 % of 400 N are 152 N.
    ['a percentage in newtons', { thrustLimit: 38 }, { field: 'thrustLimit' }, '38 % | 152 N'],
    ['a percentage in tenths, as CiA 402 object 6072h has it, in newtons', { thrustLimit: 38 }, { field: 'thrustLimit', factor: 0.1 }, '380  | = 38 %, 152 N'],
    ['a word as its code', { positiveDirection: 'retract' }, { field: 'positiveDirection', words: { extend: '0', retract: '1' } }, '1  | retract'],
    ['a flag as its code', { brakeFitted: false }, { field: 'brakeFitted', words: { true: '1', false: '0' } }, '0  | off'],
  ] as const)('%s', (_words, setup, entry, expected) => expect(one(setup, entry)).toBe(expected))

  it('has the decimal sign of the list, and the other one beside it', () => {
    expect(one({ speedLimit: 250 }, { field: 'speedLimit', unit: 'm/s' }, 'comma')).toBe('0,25 m/s | = 250 mm/s')
    expect(one({ softLimitMin: -2.5 }, { field: 'softLimitMin' }, 'comma')).toBe('−2,5 mm | ')
  })

  it('says what is to be proved, behind all else', () => {
    const [value] = shown(linear({ thrustLimit: 38 }), undefined, { prove: ['thrustLimit'] })
    expect(value?.beside).toBe('152 N, prove')
  })

  it('in newton metres on a table: 50 % of 400 N·m are 200 N·m', () => expect(shown(rotary({ thrustLimit: 50 }))[0]?.beside).toBe('200 N·m'))
})

describe('the order on the paper', () => {
  const content = linear({ softLimitMax: 180, thrustLimit: 38, jogSpeed: 20 }, [], { zones: [{ zone: 2, from: 1, to: 2 }], extra: { 'K-1': 1, 'K-2': 2, 'K-3': 3 } })
  const numbers = (parameters: readonly EntryParameter[]) => shown(content, table(parameters)).map(({ number, label, group }) => `${number}${number ? ' ' : ''}${label}: ${group}`)

  it('is that of the list, a value of the drive’s own within the group in which it stands, then the rest by group', () => {
    expect(numbers([{ number: '3', field: 'extra:K-2' }, { number: '1', field: 'thrustLimit' }, { number: '2', field: 'extra:K-1' }, { number: '9', field: 'zone:2:from' }])).toEqual([
      '3 K-2: extra values', '1 Thrust limit: force', '2 K-1: force', '9 Zone 2, from: zones', 'Soft limit, max: travel', 'Jog speed: motion', 'Zone 2, to: zones', 'K-3: extra values',
    ])
  })

  it('leaves out what is taught, what the drive does not have, and who the unit is', () => {
    const parameters = [{ number: '1', field: 'unit:serial' }, { number: '2', field: 'softLimitMin' }, { number: '3', field: 'softLimitMax' }]
    expect(shown(linear({ softLimitMax: 180 }), table(parameters), { left: ['softLimitMax'] })).toEqual([])
    expect(sheetTaught({ content: linear(), nameplate: plate({ entryTable: table(parameters) }), left: ['softLimitMax', 'extra:K-1', 'positionGain'], prove: [] }))
      .toEqual([{ number: '3', label: 'Soft limit, max', unit: 'mm' }, { number: '', label: 'K-1', unit: '' }, { number: '', label: 'Position gain', unit: '1/s' }])
  })
})

describe('words on the paper', () => {
  it('every field of the setup has a label with a capital and no code, and a unit where it is a quantity', () => {
    for (const name of setupFieldNames) {
      expect(labelOf(name), name).toMatch(/^[A-Z][a-z]/)
      expect(labelOf(name)).not.toMatch(/[a-z][A-Z]/)
    }
    expect([unitOf('inPositionWindow', 'linear', undefined), unitOf('modulo', 'linear', undefined), unitOf('modulo', 'rotary', undefined), unitOf('positionGain', 'rotary', undefined)]).toEqual(['± mm', '', 'deg', '1/s'])
  })

  it('a text is typed in as it stands, without the apostrophe that a spreadsheet needs', () => {
    expect(writtenCell('=1+1', { field: 'extra:K' }, { type: 'extra' }, 'point')).toBe('=1+1')
    expect(writtenCell('-x', { field: 'extra:K' }, { type: 'extra' }, 'point')).toBe('-x')
    expect(writtenCell(-5, { field: 'extra:K' }, { type: 'extra' }, 'comma')).toBe('−5')
    expect(writtenCell({ value: -0.5, unit: 'A' }, { field: 'extra:K' }, { type: 'extra' }, 'comma')).toBe('−0,5')
  })
})

describe('moves on the paper', () => {
  it('have a column for each field that any of them fills, units in the heads, empty cells where nothing is set', () => {
    const { columns, rows } = sheetMoves({ content: linear({}, [absolute(1, -5), press(2, 120, 150), unused(9)]) })
    expect(columns.map(({ field, numeric }) => `${field}${numeric ? ' #' : ''}`)).toEqual(['kind', 'target #', 'speed #', 'acceleration #', 'forceLimit #', 'approach #', 'pressSpeed #'])
    expect(rows.map(({ move, unused: empty, cells }) => `${move}${empty ? ' empty' : ''}: ${cells.join('|')}`)).toEqual(['1: absolute|−5|250|2000|||', '2: press|150|250|2000|30|120|10', '9 empty: absolute|0|0|0|||'])
  })

  it('a table without a row still has the four columns that every move fills', () => {
    expect(sheetMoves({ content: linear() })).toMatchObject({ rows: [], columns: [{ field: 'kind' }, { field: 'target' }, { field: 'speed' }, { field: 'acceleration' }] })
  })
})
