import type { Nameplate } from '#shared/settings/nameplate'
import type { ExtraValue } from '#shared/settings/types'
import { nameplateGroups, nameplateUnit } from './fields'

/** One value that differs between two revisions. */
export interface RevisionChange { readonly key: string, readonly label: string, readonly before: ExtraValue | undefined, readonly after: ExtraValue | undefined, readonly unit: string }

const plain = (value: unknown): ExtraValue | undefined => Array.isArray(value) ? value.join(', ') : value === undefined ? undefined : value as ExtraValue
const same = (a: unknown, b: unknown) => JSON.stringify(a) === JSON.stringify(b)

/** The entry table as flat values: `K-001, unit` of a parameter, `move column Pos, field` of a table. */
function entryValues({ entryTable: table }: Nameplate): Map<string, ExtraValue> {
  if (table === undefined) return new Map()
  const values = new Map<string, ExtraValue>([['entry table, delimiter', table.delimiter], ['entry table, decimal sign', table.decimal], ['entry table, header', table.header.join(' / ')]])
  for (const [key, place] of Object.entries(table.columns)) values.set(`entry table, column of the ${key}`, place)
  const rows = [...table.parameters.map(({ number, ...entry }) => ({ key: number, entry })), ...table.zones.map(entry => ({ key: `zone column ${entry.name}`, entry })), ...table.moves.map(entry => ({ key: `move column ${entry.name}`, entry }))]
  for (const { key, entry } of rows) {
    for (const [name, value] of Object.entries(entry)) values.set(`${key}, ${name}`, typeof value === 'object' ? Object.entries(value).map(([word, own]) => `${word}=${own}`).join(', ') : value)
  }
  return values
}

function entryChanges(before: Nameplate, after: Nameplate): RevisionChange[] {
  const [was, is] = [entryValues(before), entryValues(after)]
  return [...new Set([...was.keys(), ...is.keys()])].filter(key => was.get(key) !== is.get(key))
    .map(key => ({ key: `entry/${key}`, label: key, before: was.get(key), after: is.get(key), unit: '' }))
}

/** What a revision changed, in the order of the form, then the dictionary key by key, then the entry table row by row. */
export function revisionChanges(before: Nameplate, after: Nameplate): RevisionChange[] {
  const labels = nameplateGroups.flatMap(group => Object.entries(group.fields) as [Exclude<keyof Nameplate, 'dictionary' | 'entryTable'>, string][])
  const plainChanges = labels.filter(([name]) => !same(before[name], after[name]))
    .map(([name, label]) => ({ key: name, label, before: plain(before[name]), after: plain(after[name]), unit: nameplateUnit(name, after.axisKind) }))
  const [was, is] = [before.dictionary ?? {}, after.dictionary ?? {}]
  const entryNames = (key: string) => [...new Set([...Object.keys(was[key] ?? {}), ...Object.keys(is[key] ?? {})])] as (keyof (typeof was)[string])[]
  const entries = [...new Set([...Object.keys(was), ...Object.keys(is)])].sort().flatMap(key => entryNames(key)
    .filter(name => !same(was[key]?.[name], is[key]?.[name]))
    .map(name => ({ key: `${key}/${name}`, label: `${key}, ${name}`, before: plain(was[key]?.[name]), after: plain(is[key]?.[name]), unit: '' })))
  const added = [...Object.keys(is)].filter(key => !(key in was) && entryNames(key).length === 0).map(key => ({ key, label: key, before: undefined, after: 'known' as ExtraValue, unit: '' }))
  return [...plainChanges, ...entries, ...added, ...entryChanges(before, after)]
}
