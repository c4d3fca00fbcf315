import type { Nameplate } from '#shared/settings/nameplate'
import type { ExtraValue } from '#shared/settings/types'
import { nameplateGroups, nameplateUnit } from './fields'

/** One value that differs between two revisions. */
export interface RevisionChange { readonly key: string, readonly label: string, readonly before: ExtraValue | undefined, readonly after: ExtraValue | undefined, readonly unit: string }

const plain = (value: unknown): ExtraValue | undefined => Array.isArray(value) ? value.join(', ') : value === undefined ? undefined : value as ExtraValue
const same = (a: unknown, b: unknown) => JSON.stringify(a) === JSON.stringify(b)

/** What a revision changed, in the order of the form, then the dictionary key by key. */
export function revisionChanges(before: Nameplate, after: Nameplate): RevisionChange[] {
  const labels = nameplateGroups.flatMap(group => Object.entries(group.fields) as [Exclude<keyof Nameplate, 'dictionary'>, string][])
  const plainChanges = labels.filter(([name]) => !same(before[name], after[name]))
    .map(([name, label]) => ({ key: name, label, before: plain(before[name]), after: plain(after[name]), unit: nameplateUnit(name, after.axisKind) }))
  const [was, is] = [before.dictionary ?? {}, after.dictionary ?? {}]
  const entryNames = (key: string) => [...new Set([...Object.keys(was[key] ?? {}), ...Object.keys(is[key] ?? {})])] as (keyof (typeof was)[string])[]
  const entries = [...new Set([...Object.keys(was), ...Object.keys(is)])].sort().flatMap(key => entryNames(key)
    .filter(name => !same(was[key]?.[name], is[key]?.[name]))
    .map(name => ({ key: `${key}/${name}`, label: `${key}, ${name}`, before: plain(was[key]?.[name]), after: plain(is[key]?.[name]), unit: '' })))
  const added = [...Object.keys(is)].filter(key => !(key in was) && entryNames(key).length === 0).map(key => ({ key, label: key, before: undefined, after: 'known' as ExtraValue, unit: '' }))
  return [...plainChanges, ...entries, ...added]
}
