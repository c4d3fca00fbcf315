import { knownStarts, usedRows, type Row } from '../motion/chains'
import { onceFor } from '../motion/once'
import type { Surroundings } from '../motion/profile'
import { waysOf, type Way } from '../motion/ways'
import type { JudgeInput } from './types'

/** A used row and the ways in which it may be driven. */
export interface Driven { readonly row: Row, readonly ways: readonly Way[] }

/** What profiles go by besides their rows. */
export function surroundings({ content, nameplate }: JudgeInput): Surroundings {
  return { setup: content.setup, stopsAtApproach: nameplate?.stopsAtApproach }
}

/** All used rows with their ways, in the order of the table: five rules look at the same. */
export const drivenRows = onceFor(drive)

function drive(input: JudgeInput): readonly Driven[] {
  const rows = usedRows(input.content.moves)
  const starts = knownStarts(rows)
  const around = surroundings(input)
  return rows.map(row => ({ row, ways: waysOf(row, starts.get(row.move.move), around) }))
}
