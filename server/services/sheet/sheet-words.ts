import type { RailInput } from '#shared/pictures/rail-input'
import type { SheetMoves, SheetTaught, SheetValue } from '#shared/sheet/types'

/** One line of the first-motion list. */
export interface MotionLine { readonly call: string, readonly words: string, readonly ends: string, readonly takes: string }

/** Everything that stands on a restore sheet; the drawing decides only where. */
export interface SheetWords {
  readonly plant: string
  readonly tag: string
  /** Role, machine, line and what can fall or press, in one line. */
  readonly place: string
  /** What the read-back must show. */
  readonly code: string
  /** Where the QR code leads. */
  readonly address: string
  /** The same in words. */
  readonly leadsTo: string
  /** Words and value, in reading order. */
  readonly facts: readonly (readonly [string, string])[]
  /** Why these values are not released; null where they are. */
  readonly notReleased: string | null
  /** What has to be said before anything is written. */
  readonly warnings: readonly string[]
  readonly cautions: readonly string[]
  readonly cautionSources: string
  /** How many rows the unit's move table has; null = not known. */
  readonly tableRows: number | null
  readonly order: string
  readonly values: readonly SheetValue[]
  readonly taught: readonly SheetTaught[]
  readonly moves: SheetMoves
  /** Where the moves end, between what bounds them; null where there is nothing to draw. */
  readonly rail: RailInput | null
  readonly creep: string
  readonly prove: readonly string[]
  readonly motion: { readonly title: string, readonly lines: readonly MotionLine[] }
  /** For the foot of each page. */
  readonly subject: string
  readonly log: string
  readonly printed: string
  /** The signed note over the log, line by line; null where there is none. */
  readonly checkpoint: readonly string[] | null
}
