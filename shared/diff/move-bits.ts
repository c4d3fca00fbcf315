import { type MoveFieldName, moveFieldNames } from '../settings/move-fields'
import type { Move } from '../settings/types'

/*
 * Sets of move fields as bits: bit k stands for the k-th of moveFieldNames. Fields are read one by one and not in a loop over
 * their names, since a read by a computed name costs four times as much, and reading is what a difference costs.
 */

/** The fields in which two rows differ. */
export function differing(a: Move, b: Move): number {
  return Number(a.label !== b.label) | Number(a.comment !== b.comment) << 1 | Number(a.kind !== b.kind) << 2
    | Number(a.target !== b.target) << 3 | Number(a.turn !== b.turn) << 4 | Number(a.speed !== b.speed) << 5
    | Number(a.acceleration !== b.acceleration) << 6 | Number(a.deceleration !== b.deceleration) << 7
    | Number(a.forceLimit !== b.forceLimit) << 8 | Number(a.approach !== b.approach) << 9
    | Number(a.pressSpeed !== b.pressSpeed) << 10 | Number(a.window !== b.window) << 11
    | Number(a.next !== b.next) << 12 | Number(a.dwell !== b.dwell) << 13
}

const nothing: Partial<Move> = {}

/** The fields that are set in a row; none of no row. */
export function present(row: Move | undefined): number {
  return row ? differing(row, nothing as Move) : 0
}

/** The value of the field of this rank in moveFieldNames. */
export function valueAt(row: Move, rank: number): string | number | undefined {
  switch (rank) {
    case 0: return row.label
    case 1: return row.comment
    case 2: return row.kind
    case 3: return row.target
    case 4: return row.turn
    case 5: return row.speed
    case 6: return row.acceleration
    case 7: return row.deceleration
    case 8: return row.forceLimit
    case 9: return row.approach
    case 10: return row.pressSpeed
    case 11: return row.window
    case 12: return row.next
    default: return row.dwell
  }
}

/** The set of these fields. */
export function bitsOf(...names: readonly MoveFieldName[]): number {
  return names.reduce((bits, name) => bits | 1 << moveFieldNames.indexOf(name), 0)
}

/** How many fields are in the set: sums of bits in pairs, then fours, then eights, then all. */
export function bitCount(fields: number): number {
  const pairs = fields - (fields >> 1 & 0x5555)
  const fours = (pairs & 0x3333) + (pairs >> 2 & 0x3333)
  const eights = fours + (fours >> 4) & 0x0f0f
  return eights + (eights >> 8) & 0x1f
}
