import type { ExtraValue, Move } from './types'

/*
 * Rows as readers make them: every key is there, and what is not set is undefined. An engine that has met rows of more than
 * four shapes looks up each of their fields in a table, whichever row it has before it; a difference of rows of one shape
 * takes a quarter of the time. undefined is absent: whoever goes by the keys of a row asks setEntries.
 */

/** A move that is being read: any key may still be unset. */
export type MoveDraft = { -readonly [Key in keyof Required<Move>]: Move[Key] | undefined }

/** A row with every key and no value yet, keys in the order of the canonical text. */
export function unsetMove(): MoveDraft {
  return {
    acceleration: undefined, approach: undefined, comment: undefined, deceleration: undefined, dwell: undefined, forceLimit: undefined, kind: undefined, label: undefined,
    move: undefined, next: undefined, pressSpeed: undefined, speed: undefined, target: undefined, turn: undefined, window: undefined,
  }
}

/** The same row in the one shape, out of a row that has only the keys that are set. */
export function moveRow(move: Move): Move {
  const { acceleration, approach, comment, deceleration, dwell, forceLimit, kind, label, next, pressSpeed, speed, target, turn, window } = move
  return { acceleration, approach, comment, deceleration, dwell, forceLimit, kind, label, move: move.move, next, pressSpeed, speed, target, turn, window }
}

/** Key and value of all that is set in a row or a setup: the entries without those of undefined. */
export function setEntries(record: object): [key: string, value: ExtraValue][] {
  return Object.entries(record).filter(([, value]) => value !== undefined)
}
