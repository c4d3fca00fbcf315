import { moveFieldNames } from '../settings/move-fields'
import type { Move } from '../settings/types'
import { changeOf } from './change'
import { sameMotionInMove } from './defaults'
import type { FieldRule } from './rules'
import type { Sides } from './sides'
import type { FieldChange } from './types'
import { walkByNumber } from './walk'

/** Whether the follower that a move had is the one that its partner has. */
export type NextAgrees = (was: number | undefined, is: number | undefined) => boolean

/** One pass over two move tables, row with partner; changes go to `out` in the order of the field table. */
export class MovePass {
  /** What a person is told: each edit, and each row that comes or goes as one. */
  statements = 0

  constructor(private readonly out: FieldChange[], private readonly sides: Sides, private readonly nextAgrees?: NextAgrees) {}

  /** Adds one change for each field that differs, all of them where the move stands on one side only. */
  compare(before: Move | undefined, beforeIndex: number, after: Move | undefined, afterIndex: number): void {
    let rest = before && after ? differing(before, after) : present(before ?? after)
    if (this.nextAgrees) rest = this.nextAgrees(before?.next, after?.next) ? rest & ~nextBit : rest | nextBit
    this.statements += before && after ? bitCount(rest) : 1
    if (rest === 0) return
    const row = (after ?? before)?.move
    const there = `/moves/${afterIndex}/`
    for (; rest !== 0; rest &= rest - 1) {
      const rank = 31 - Math.clz32(rest & -rest)
      const was = before && valueAt(before, rank)
      const is = after && valueAt(after, rank)
      const rule = (is === undefined ? this.sides.was : this.sides.is).moveByRank[rank] as FieldRule
      const at = is === undefined ? `/moves/${beforeIndex}/${rule.field}` : there + rule.field
      const sameMotion = (was === undefined || is === undefined) && this.sameMotion(rule.field, before, after)
      this.out.push(changeOf(rule, { at, section: 'move', row }, was, is, sameMotion))
    }
  }

  private sameMotion(field: string, before: Move | undefined, after: Move | undefined): boolean {
    return before !== undefined && after !== undefined
      && sameMotionInMove(field, { move: before, setup: this.sides.before.setup }, { move: after, setup: this.sides.after.setup })
  }
}

/** How many statements the flat reading makes of two move tables, without making them. */
export function countStatements(before: readonly Move[], after: readonly Move[]): number {
  let count = 0
  walkByNumber(before, after, move => move.move, (was, _, is) => {
    count += was && is ? bitCount(differing(was, is)) : 1
  })
  return count
}

/**
 * The fields in which two rows differ, as bits: bit k stands for the k-th of moveFieldNames. Written out, because most rows
 * did not change and reading them is what a difference costs.
 */
function differing(a: Move, b: Move): number {
  return Number(a.label !== b.label) | Number(a.comment !== b.comment) << 1 | Number(a.kind !== b.kind) << 2
    | Number(a.target !== b.target) << 3 | Number(a.turn !== b.turn) << 4 | Number(a.speed !== b.speed) << 5
    | Number(a.acceleration !== b.acceleration) << 6 | Number(a.deceleration !== b.deceleration) << 7
    | Number(a.forceLimit !== b.forceLimit) << 8 | Number(a.approach !== b.approach) << 9
    | Number(a.pressSpeed !== b.pressSpeed) << 10 | Number(a.window !== b.window) << 11
    | Number(a.next !== b.next) << 12 | Number(a.dwell !== b.dwell) << 13
}

/** The value of the field of this rank in moveFieldNames. Written out, since a read by a computed name costs four times as much. */
function valueAt(row: Move, rank: number): string | number | undefined {
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

const nextBit = 1 << moveFieldNames.indexOf('next')

function bitCount(bits: number): number {
  let count = 0
  for (let rest = bits; rest !== 0; rest &= rest - 1) count += 1
  return count
}

/** The fields that a row has, as bits. */
function present(row: Move | undefined): number {
  return moveFieldNames.reduce((bits, field, rank) => row?.[field] === undefined ? bits : bits | 1 << rank, 0)
}
