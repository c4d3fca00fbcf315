import type { Move } from '../settings/types'
import { wholeNumbers } from './table'

/*
 * What a row does: its fields without number, label, comment and the value of `next`; that it has a follower counts.
 * Rows of one signature get one small number, so that the alignment compares numbers.
 */

/** A total order of what rows do, without meaning of its own: it makes the alignment see both directions alike. */
export function compareSignatures(a: Move, b: Move): number {
  return compareText(a.kind, b.kind) || compare(a.target, b.target) || compare(a.speed, b.speed) || compare(a.acceleration, b.acceleration)
    || compare(a.deceleration, b.deceleration) || compare(a.forceLimit, b.forceLimit) || compare(a.approach, b.approach)
    || compare(a.pressSpeed, b.pressSpeed) || compare(a.window, b.window) || compare(a.dwell, b.dwell)
    || compareText(a.turn ?? '', b.turn ?? '') || Number(a.next === undefined) - Number(b.next === undefined)
}

/** Gives each row of both tables the number of its signature, counted from 0 in the order they are first met. */
export function classify(before: readonly Move[], after: readonly Move[]): { before: Int32Array, after: Int32Array, count: number } {
  const known = new Map<number, { readonly move: Move, readonly id: number }[]>()
  let count = 0
  const idOf = (move: Move): number => {
    const hash = hashOf(move)
    const alike = known.get(hash)
    const found = alike?.find(entry => compareSignatures(entry.move, move) === 0)
    if (found) return found.id
    const entry = { move, id: count }
    if (alike) alike.push(entry)
    else known.set(hash, [entry])
    count += 1
    return entry.id
  }
  return { before: wholeNumbers(before, idOf), after: wholeNumbers(after, idOf), count }
}

/** 32 bits of a row; rows that do the same share them, others seldom. */
function hashOf(move: Move): number {
  let hash = move.kind.length + (move.next === undefined ? 0 : 16) + (move.turn === undefined ? 0 : 32 * move.turn.length)
  hash = mixed(hash, move.target)
  hash = mixed(hash, move.speed)
  hash = mixed(hash, move.acceleration)
  hash = mixed(hash, move.deceleration)
  hash = mixed(hash, move.forceLimit)
  hash = mixed(hash, move.approach)
  hash = mixed(hash, move.pressSpeed)
  hash = mixed(hash, move.window)
  return mixed(hash, move.dwell)
}

function mixed(hash: number, value: number | undefined): number {
  return Math.imul(hash, 31) + (value === undefined ? 7 : value * 1000 | 0) | 0
}

function compare(a: number | undefined, b: number | undefined): number {
  return a === b ? 0 : a === undefined ? -1 : b === undefined ? 1 : a - b
}

function compareText(a: string, b: string): number {
  return a === b ? 0 : a < b ? -1 : 1
}
