import type { AxisKind } from '../types'
import { findUnit, unitsFor } from '../../units/units'
import { type ValueKind, addressOf, rowKind, wordsOf } from './address'
import type { EntryColumn, EntryTable, EntryValue } from './schema'

/** One thing that keeps a table from being used; `path` as zod has it, from the table. */
export interface EntryFault { readonly path: readonly (string | number)[], readonly message: string }

/** What is wrong with a table on an axis of this kind: fields that are none, numbers given twice, units that do not fit. Empty where it can be used. */
export function entryTableFaults(table: EntryTable, axisKind: AxisKind): EntryFault[] {
  return [...columnFaults(table), ...twiceFaults(table), ...parameterFaults(table, axisKind), ...tableFaults(table, 'zone', axisKind), ...tableFaults(table, 'move', axisKind)]
}

function columnFaults({ columns, parameters, zones, moves }: EntryTable): EntryFault[] {
  const used = Object.values(columns).filter(place => place > 0)
  const faults: EntryFault[] = new Set(used).size === used.length ? [] : [{ path: ['columns'], message: 'Two of number, value, name and unit stand in one column; give each its own.' }]
  const [zone, move] = [zones[0]?.name, moves[0]?.name]
  if (zone !== undefined && zone === move) faults.push({ path: ['moves', 0, 'name'], message: `Zones and moves both begin with ${zone}: they could not be told apart.` })
  for (const [section, name] of [['zones', zone], ['moves', move]] as const) {
    if (name !== undefined && parameters.some(({ number }) => number === name)) faults.push({ path: [section, 0, 'name'], message: `${name} is a parameter already: the table could not be told from it.` })
  }
  return faults
}

/** Zones and moves stand in a table or as parameters, not both. */
function twiceFaults(table: EntryTable): EntryFault[] {
  return (['zone', 'move'] as const).flatMap((section) => {
    const index = table.parameters.findIndex(({ field }) => field.startsWith(`${section}:`))
    const columns = section === 'zone' ? table.zones : table.moves
    return index === -1 || columns.length === 0 ? [] : [{ path: ['parameters', index, 'field'], message: `The ${section}s stand in a table of their own already.` }]
  })
}

function parameterFaults({ parameters }: EntryTable, axisKind: AxisKind): EntryFault[] {
  const numbers = new Set<string>()
  const fields = new Set<string>()
  return parameters.flatMap((entry, index) => {
    const path = ['parameters', index]
    const address = addressOf(entry.field, axisKind)
    const faults = address === undefined
      ? [{ path: [...path, 'field'], message: `${entry.field} is no field of a ${axisKind} axis.` }]
      : valueFaults(entry, address.kind, path, entry.field)
    if (numbers.has(entry.number)) faults.push({ path: [...path, 'number'], message: `${entry.number} is there twice; a number means one value.` })
    if (entry.number.trim() !== entry.number) faults.push({ path: [...path, 'number'], message: `"${entry.number}" has a blank at its beginning or end; take it out.` })
    if (fields.has(entry.field)) faults.push({ path: [...path, 'field'], message: `${entry.field} is there twice; a value has one number.` })
    numbers.add(entry.number)
    fields.add(entry.field)
    return faults
  })
}

const needed = { zone: ['zone', 'from', 'to'], move: ['move', 'kind', 'target', 'speed', 'acceleration'] } as const

function tableFaults(table: EntryTable, section: 'zone' | 'move', axisKind: AxisKind): EntryFault[] {
  const [key, columns]: ['zones' | 'moves', readonly EntryColumn[]] = section === 'zone' ? ['zones', table.zones] : ['moves', table.moves]
  if (columns.length === 0) return []
  const faults: EntryFault[] = needed[section].filter(field => !columns.some(each => each.field === field))
    .map(field => ({ path: [key], message: `A column for ${field} is missing: each ${section} needs one.` }))
  columns.forEach((each, index) => {
    const path = [key, index]
    const kind = rowKind(section, each.field, axisKind)
    if (kind === undefined) faults.push({ path: [...path, 'field'], message: `${each.field} is no field of a ${section}.` })
    else faults.push(...valueFaults(each, kind, path, each.field))
    const before = columns.slice(0, index)
    if (before.some(({ name }) => name === each.name)) faults.push({ path: [...path, 'name'], message: `Two columns are named ${each.name}.` })
    if (before.some(({ field }) => field === each.field)) faults.push({ path: [...path, 'field'], message: `${each.field} has two columns; leave one.` })
    if (each.name.trim() !== each.name) faults.push({ path: [...path, 'name'], message: `"${each.name}" has a blank at its beginning or end; take it out.` })
  })
  return faults
}

function valueFaults(entry: EntryValue, kind: ValueKind, path: readonly (string | number)[], field: string): EntryFault[] {
  const faults: EntryFault[] = []
  if (kind.type === 'number') {
    if (entry.unit !== undefined && typeof findUnit(entry.unit, kind.unit) === 'string') {
      faults.push({ path: [...path, 'unit'], message: `${entry.unit} does not fit ${field}: here fit ${unitsFor(kind.unit).map(({ name }) => name).join(', ')}.` })
    }
  }
  else {
    const refused = (['factor', 'step', 'rounding', 'digits', 'unit'] as const).filter(key => entry[key] !== undefined && !(key === 'unit' && kind.type === 'extra'))
    if (refused.length > 0) faults.push({ path: [...path, refused[0] ?? 'field'], message: `${field} is kept as the drive has it: it takes no ${refused.join(', ')}.` })
  }
  const wordList = wordsOf(kind)
  const given = Object.keys(entry.words ?? {})
  const strange = given.find(word => !wordList.includes(word))
  if (strange !== undefined) faults.push({ path: [...path, 'words'], message: wordList.length === 0 ? `${field} has no words.` : `${strange} is no word of ${field}: ${wordList.join(', ')}.` })
  // A cell is read without the blanks around it, so that a word with one is never met.
  for (const [key, words] of [['words', Object.values(entry.words ?? {})], ['none', entry.none === undefined ? [] : [entry.none]]] as const) {
    const blank = words.find(word => word.trim() !== word)
    if (blank !== undefined) faults.push({ path: [...path, key], message: `"${blank}" has a blank at its beginning or end; take it out.` })
  }
  const shown = wordList.map(word => entry.words?.[word] ?? word)
  if (new Set(shown).size < shown.length || (entry.none !== undefined && shown.includes(entry.none))) {
    faults.push({ path: [...path, 'words'], message: `Two words of ${field} are the same in the drive’s list: they could not be told apart.` })
  }
  return faults
}
