import { describe, expect, it } from 'vitest'
import { entryTableFaults } from '../../../../../shared/settings/entry-table/faults'
import type { EntryParameter, EntryTable } from '../../../../../shared/settings/entry-table/schema'
import { nameplateSchema } from '../../../../../shared/settings/nameplate'
import { liftPlate, liftTable } from '../../../../support/entry-table'

const faultsOf = (part: Partial<EntryTable>, kind: 'linear' | 'rotary' = 'linear') => entryTableFaults({ ...liftTable, ...part }, kind).map(({ path, message }) => [path.join('/'), message])
const parameter = (entry: Partial<EntryParameter>) => faultsOf({ parameters: [{ number: 'K-001', field: 'softLimitMin', ...entry }] })

describe('what keeps an entry table from being used', () => {
  it('is nothing in a sound one', () => {
    expect(faultsOf({})).toEqual([])
    expect(nameplateSchema.safeParse(liftPlate).success).toBe(true)
  })

  it.each<[string, Partial<EntryParameter>, string, string]>([
    ['a field that is none', { field: 'softLimit' }, 'parameters/0/field', 'softLimit is no field of a linear axis.'],
    ['a field of the other kind', { field: 'modulo' }, 'parameters/0/field', 'modulo is no field of a linear axis.'],
    ['a unit that does not fit', { unit: 'kg' }, 'parameters/0/unit', 'kg does not fit softLimitMin: here fit mm, µm, cm, m, in.'],
    ['a factor of a word', { field: 'brakeFitted', factor: 10 }, 'parameters/0/factor', 'brakeFitted is kept as the drive has it: it takes no factor.'],
    ['a step of the drive’s own number', { field: 'velocityGain', step: 1 }, 'parameters/0/step', 'velocityGain is kept as the drive has it: it takes no step.'],
    ['words of a number', { words: { on: '1' } }, 'parameters/0/words', 'softLimitMin has no words.'],
    ['a word that is none', { field: 'positiveDirection', words: { out: '1' } }, 'parameters/0/words', 'out is no word of positiveDirection: extend, retract.'],
    ['two words alike', { field: 'positiveDirection', words: { extend: '1', retract: '1' } }, 'parameters/0/words', 'Two words of positiveDirection are the same in the drive’s list: they could not be told apart.'],
    ['a word that means not set', { field: 'brakeFitted', words: { true: '1', false: '0' }, none: '0' }, 'parameters/0/words', 'Two words of brakeFitted are the same in the drive’s list: they could not be told apart.'],
    ['a blank at the number', { number: ' K-001' }, 'parameters/0/number', '" K-001" has a blank at its beginning or end; take it out.'],
  ])('%s', (_, entry, path, message) => {
    expect(parameter(entry)).toEqual([[path, message]])
  })

  it('is a blank at the end of a word, which a reader could never meet: cells are read without theirs', () => {
    expect(parameter({ field: 'brakeFitted', words: { true: '1 ', false: '0' } })).toEqual([['parameters/0/words', '"1 " has a blank at its beginning or end; take it out.']])
    expect(parameter({ none: ' -' })).toEqual([['parameters/0/none', '" -" has a blank at its beginning or end; take it out.']])
    expect(parameter({ field: 'brakeFitted', words: { true: 'on now', false: 'off' }, none: '- -' })).toEqual([])
  })

  it('is a number or a field given twice', () => {
    const twice = [{ number: 'K-001', field: 'softLimitMin' }, { number: 'K-001', field: 'softLimitMin' }]
    expect(faultsOf({ parameters: twice }).map(([path]) => path)).toEqual(['parameters/1/number', 'parameters/1/field'])
  })

  it('is a move that would come in two ways', () => {
    expect(faultsOf({ parameters: [{ number: '300', field: 'move:3:target' }] })).toEqual([['parameters/0/field', 'The moves stand in a table of their own already.']])
    expect(faultsOf({ parameters: [{ number: '300', field: 'move:3:target' }], moves: [] })).toEqual([])
  })

  it('is a table that lacks what each row needs', () => {
    expect(faultsOf({ zones: liftTable.zones.slice(0, 2) })).toEqual([['zones', 'A column for to is missing: each zone needs one.']])
  })

  it('is a column twice, or of no field', () => {
    const zones = [...liftTable.zones, { name: 'On to', field: 'to' }, { name: 'Colour', field: 'colour' }]
    expect(faultsOf({ zones })).toEqual([['zones/3/name', 'Two columns are named On to.'], ['zones/3/field', 'to has two columns; leave one.'], ['zones/4/field', 'colour is no field of a zone.']])
  })

  it('is a layout in which things cannot be told apart', () => {
    expect(faultsOf({ columns: { number: 1, value: 1, name: 0, unit: 0 } }).map(([path]) => path)).toEqual(['columns'])
    expect(faultsOf({ zones: [{ name: 'Step', field: 'zone' }, ...liftTable.zones.slice(1)] }).map(([path]) => path)).toEqual(['moves/0/name'])
    expect(faultsOf({ moves: [{ name: 'K-003', field: 'move' }, ...liftTable.moves.slice(1)] }).map(([path]) => path)).toEqual(['moves/0/name'])
  })

  it('is said by the nameplate’s schema, at its place', () => {
    const wrong = { ...liftPlate, entryTable: { ...liftTable, parameters: [{ number: '1', field: 'modulo' }] } }
    const parsed = nameplateSchema.safeParse(wrong)
    expect(parsed.error?.issues.map(({ path }) => path.join('/'))).toEqual(['entryTable/parameters/0/field'])
  })
})
