import type { Dictionary, DictionaryEntry } from '#shared/settings/nameplate'
import { carries, weights, type Carry, type Weight } from '#shared/settings/types'
import { numberOrText } from '../forms/fields'

/** One key of the drive's own as its form holds it: all texts. */
export interface DictionaryDraft { key: string, name: string, unit: string, min: string, max: string, allowed: string, weight: string, carry: string, reading: boolean }

export const emptyEntry = (): DictionaryDraft => ({ key: '', name: '', unit: '', min: '', max: '', allowed: '', weight: '', carry: '', reading: false })

export function draftsOf(dictionary: Dictionary = {}): DictionaryDraft[] {
  return Object.entries(dictionary).map(([key, entry]) => ({
    key, name: entry.name ?? '', unit: entry.unit ?? '', min: String(entry.min ?? ''), max: String(entry.max ?? ''),
    allowed: (entry.allowed ?? []).join(', '), weight: entry.weight ?? '', carry: entry.carry ?? '', reading: entry.reading ?? false,
  }))
}

const allowedOf = (text: string) => text.split(',').map(part => part.trim()).filter(part => part !== '').map(part => part === 'true' ? true : part === 'false' ? false : numberOrText(part))
const oneOf = <Word extends string>(words: readonly Word[], text: string) => words.find(word => word === text)

function entryOf(draft: DictionaryDraft): DictionaryEntry {
  const allowed = allowedOf(draft.allowed)
  const entry = {
    name: draft.name.trim() || undefined, unit: draft.unit.trim() || undefined,
    min: draft.min.trim() === '' ? undefined : numberOrText(draft.min), max: draft.max.trim() === '' ? undefined : numberOrText(draft.max),
    allowed: allowed.length ? allowed : undefined, weight: oneOf<Weight>(weights, draft.weight), carry: oneOf<Carry>(carries, draft.carry), reading: draft.reading || undefined,
  }
  return Object.fromEntries(Object.entries(entry).filter(([, value]) => value !== undefined)) as DictionaryEntry
}

/** Rows without a key are left away; of two rows with one key the later holds. */
export function dictionaryOf(drafts: readonly DictionaryDraft[]): Record<string, DictionaryEntry> {
  return Object.fromEntries(drafts.filter(draft => draft.key.trim() !== '').map(draft => [draft.key.trim(), entryOf(draft)]))
}

/** What changes the one dictionary into the other by RFC 7396: null takes out a key or a word; undefined = nothing changes. */
export function dictionaryPatch(before: Dictionary = {}, after: Dictionary = {}): Record<string, Record<string, unknown> | null> | undefined {
  const patch: Record<string, Record<string, unknown> | null> = {}
  for (const key of Object.keys(before)) if (!(key in after)) patch[key] = null
  for (const [key, entry] of Object.entries(after)) {
    const was: Readonly<Record<string, unknown>> = before[key] ?? {}
    const is: Readonly<Record<string, unknown>> = entry
    const names = [...new Set([...Object.keys(was), ...Object.keys(is)])].filter(name => JSON.stringify(was[name]) !== JSON.stringify(is[name]))
    if (names.length > 0 || !(key in before)) patch[key] = Object.fromEntries(names.map(name => [name, is[name] ?? null]))
  }
  return Object.keys(patch).length > 0 ? patch : undefined
}
