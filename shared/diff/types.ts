import type { AxisFlag, ExtraValue, Weight } from '../settings/types'
import type { Dictionary } from '../settings/nameplate'

export const sections = ['file', 'setup', 'zone', 'move', 'extra'] as const
export type Section = (typeof sections)[number]

/**
 * One field that differs between two contents, before against after. A row added or removed is one change for each field
 * it has, its number aside. Keyed by section, row and field.
 */
export interface FieldChange {
  /** JSON Pointer by index, in canonical order: into the second content, or into the first where the row or value is gone. */
  readonly at: string
  readonly section: Section
  /** Zone or move *number*; absent in the other sections. In the renumbered reading the number in the second content (the first, where the row is gone). */
  readonly row?: number
  /** Name in the format; for extra the key. */
  readonly field: string
  /** Absent = was not set, or the row is new. */
  readonly before?: ExtraValue
  /** Absent = is not set, or the row is gone. */
  readonly after?: ExtraValue
  /** Canonical unit, absent for words and bare numbers. */
  readonly unit?: string
  /** after − before, numbers only, exact to 6 decimals. */
  readonly delta?: number
  /** 100·(after − before)/|before|; absent at before = 0 and for values that are percentages themselves. */
  readonly percent?: number
  /** Difference in percentage points, for values that are percentages. */
  readonly points?: number
  readonly weight: Weight
  readonly watched: boolean
  /** A changed setup default: the moves whose effective value it changes. */
  readonly affects?: readonly number[]
}

/** Moves first to last of the first content, all of them that stay, stand `by` further down in the second. */
export interface Renumbering {
  readonly first: number
  readonly last: number
  readonly by: number
  /** One of the run's signatures stands once in each table; else the screen says "may have". */
  readonly sure: boolean
}

/** A row of one table with its partner in the other, by move number; one side absent = added or removed. */
export interface RowPair { readonly before?: number, readonly after?: number }

/** Rows paired by what they do; how a difference is told, never how it is stored. */
export interface RenumberedReading {
  readonly renumbered: readonly Renumbering[]
  /** All moves of both contents, in the order of the second, removed ones where they stood. */
  readonly pairs: readonly RowPair[]
  readonly changes: readonly FieldChange[]
}

/** What the axis and its model say about weights. */
export interface DiffContext {
  readonly flags?: readonly AxisFlag[]
  readonly dictionary?: Dictionary
  /** Field names (extra as `extra:KEY`) that planners of the site added to the watched ones. */
  readonly watched?: readonly string[]
}

export const verdicts = ['identical', 'same', 'differs'] as const
export type Verdict = (typeof verdicts)[number]

export interface Comparison {
  readonly verdict: Verdict
  /** Beyond tolerance: what makes it differ. */
  readonly differences: readonly (FieldChange & { readonly tolerance?: number })[]
  /** Differ within the tolerance. */
  readonly within: readonly (FieldChange & { readonly tolerance: number })[]
  /** Set aside: to be taught on this swap, or homeOffset of another unit. */
  readonly aside: readonly FieldChange[]
}
