import { diffContents } from '#shared/diff/diff'
import type { DiffContext, FieldChange } from '#shared/diff/types'
import { emptyContent } from '#shared/settings/content'
import type { Content, ExtraValue } from '#shared/settings/types'

/** One version of the axis as this rule sees it. */
export interface RunVersion {
  readonly number: number
  readonly content: Content
  /** Who answers for it: changed by, else storer, else the token's owner. */
  readonly broughtBy: { readonly id: number, readonly name: string }
}

export interface BroughtIn {
  readonly change: FieldChange
  /** The oldest version of the unbroken run that holds the value. */
  readonly version: RunVersion
}

/**
 * Who brought in each harm value that `version` carries and the known-good does not. `older` = the versions before it that are
 * not void, newest first, read only as far as needed. Without a known-good every harm value counts, save those that stood there
 * from the beginning of the axis' life: somebody has to be able to begin.
 */
export function harmBroughtIn(version: RunVersion, older: Iterable<RunVersion>, knownGood: Content | null, context: DiffContext): BroughtIn[] {
  const reference = knownGood ?? emptyContent(version.content.axisKind)
  const found: BroughtIn[] = []
  let open: BroughtIn[] = diffContents(reference, version.content, context)
    .filter(change => change.weight === 'harm' && change.after !== undefined)
    .map(change => ({ change, version }))
  if (open.length === 0) return []
  for (const earlier of older) {
    const still: BroughtIn[] = []
    for (const entry of open) {
      if (holds(earlier.content, entry.change)) still.push({ change: entry.change, version: earlier })
      else found.push(entry)
    }
    open = still
    if (open.length === 0) break
  }
  return knownGood ? [...found, ...open] : found
}

function holds(content: Content, change: FieldChange): boolean {
  return sameValue(valueAt(content, change), change.after)
}

function valueAt(content: Content, { section, row, field }: FieldChange): ExtraValue | undefined {
  if (section === 'file') return content.axisKind
  if (section === 'setup') return own(content.setup, field)
  if (section === 'extra') return own(content.extra, field)
  const line = section === 'move' ? content.moves.find(move => move.move === row) : content.zones.find(zone => zone.zone === row)
  return line && own(line, field)
}

function own(holder: object, key: string): ExtraValue | undefined {
  return Object.hasOwn(holder, key) ? (holder as Readonly<Record<string, ExtraValue>>)[key] : undefined
}

function sameValue(one: ExtraValue | undefined, other: ExtraValue | undefined): boolean {
  if (typeof one === 'object' && typeof other === 'object') return one.value === other.value && one.unit === other.unit
  return Object.is(one, other)
}
