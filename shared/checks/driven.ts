import { knownStarts, usedRows, type Row } from '../motion/chains'
import type { Surroundings } from '../motion/profile'
import { waysOf, type Way } from '../motion/ways'
import type { JudgeInput } from './types'

/** A used row and the ways in which it may be driven. */
export interface Driven { readonly row: Row, readonly ways: readonly Way[] }

/** What profiles go by besides their rows. */
export function surroundings({ content, nameplate }: JudgeInput): Surroundings {
  return { setup: content.setup, stopsAtApproach: nameplate?.stopsAtApproach }
}

// Five rules look at the same ways; an input is judged once, so that its ways are kept no longer than it.
const seen = new WeakMap<JudgeInput, readonly Driven[]>()

/** All used rows with their ways, in the order of the table; reckoned once for an input, which nobody may change. */
export function drivenRows(input: JudgeInput): readonly Driven[] {
  const known = seen.get(input)
  if (known) return known
  const driven = drive(input)
  seen.set(input, driven)
  return driven
}

function drive(input: JudgeInput): Driven[] {
  const rows = usedRows(input.content.moves)
  const starts = knownStarts(rows)
  const around = surroundings(input)
  return rows.map(row => ({ row, ways: waysOf(row, starts.get(row.move.move), around) }))
}
