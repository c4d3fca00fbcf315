import { moveFieldNames } from '../settings/move-fields'
import type { Move } from '../settings/types'
import { sameMotionInMove } from './defaults'
import { bitCount, bitsOf, differing, present, valueAt } from './move-bits'
import { movePointers } from './move-pointers'
import { rowChange } from './row-change'
import type { FieldRule } from './rules'
import type { Sides } from './sides'
import type { FieldChange } from './types'
import { walkByNumber } from './walk'

/** Whether the follower that a move had is the one that its partner has. */
export type NextAgrees = (was: number | undefined, is: number | undefined) => boolean

/** A row with its partner and what is to be told of them: the fields as bits, and those among them that are a default written out. */
interface Pair {
  readonly before: Move | undefined
  readonly beforeIndex: number
  readonly after: Move | undefined
  readonly afterIndex: number
  readonly fields: number
  readonly defaults: number
}

/** One pass over two move tables, row with partner. First all is compared, so that the list of changes has its length and order at once. */
export class MovePass {
  /** What a person is told: each edit, and each row that comes or goes as one. */
  statements = 0
  private readonly pairs: Pair[] = []
  private readonly counts = { harm: 0, motion: 0, text: 0 }

  constructor(private readonly sides: Sides, private readonly nextAgrees?: NextAgrees) {}

  /** Takes in a row with its partner: all fields that differ, or all that are set where the move stands on one side only. */
  compare(before: Move | undefined, beforeIndex: number, after: Move | undefined, afterIndex: number): void {
    let fields = before && after ? differing(before, after) : present(before ?? after)
    if (this.nextAgrees) fields = this.nextAgrees(before?.next, after?.next) ? fields & ~follower : fields | follower
    if (fields === 0) return
    this.statements += before && after ? bitCount(fields) : 1
    const defaults = before && after ? this.defaultsWrittenOut(fields, before, after) : 0
    const { harm, motion } = this.sides.is.moveWeights
    const heavy = bitCount(fields & harm & ~defaults)
    const middle = bitCount(fields & motion & ~defaults)
    this.counts.harm += heavy
    this.counts.motion += middle
    this.counts.text += bitCount(fields) - heavy - middle
    this.pairs.push({ before, beforeIndex, after, afterIndex, fields, defaults })
  }

  /** Harm first, then motion, then text; within a weight row by row as they were taken in, in the order of the field table. */
  changes(): FieldChange[] {
    const { harm, motion, text } = this.counts
    const changes = new Array<FieldChange>(harm + motion + text)
    let nextHarm = 0
    let nextMotion = harm
    let nextText = harm + motion
    for (const { before, beforeIndex, after, afterIndex, fields, defaults } of this.pairs) {
      const there = { rules: this.sides.is.moveByRank, pointers: after ? movePointers(afterIndex) : [] }
      const gone = { rules: this.sides.was.moveByRank, pointers: before ? movePointers(beforeIndex) : [] }
      const row = (after ?? before as Move).move
      for (let rest = fields; rest !== 0; rest &= rest - 1) {
        const rank = 31 - Math.clz32(rest & -rest)
        const was = before && valueAt(before, rank)
        const is = after && valueAt(after, rank)
        const { rules, pointers } = is === undefined ? gone : there
        const change = rowChange(rules[rank] as FieldRule, pointers[rank] as string, 'move', row, was, is, (defaults >> rank & 1) === 1)
        if (change.weight === 'harm') changes[nextHarm++] = change
        else if (change.weight === 'motion') changes[nextMotion++] = change
        else changes[nextText++] = change
      }
    }
    return changes
  }

  private defaultsWrittenOut(fields: number, before: Move, after: Move): number {
    let written = 0
    for (let rest = fields & withDefault; rest !== 0; rest &= rest - 1) {
      const rank = 31 - Math.clz32(rest & -rest)
      const sides = [{ move: before, setup: this.sides.before.setup }, { move: after, setup: this.sides.after.setup }] as const
      if (valueAt(before, rank) !== undefined && valueAt(after, rank) !== undefined) continue
      if (sameMotionInMove(moveFieldNames[rank] as string, ...sides)) written |= 1 << rank
    }
    return written
  }
}

const follower = bitsOf('next')

/** Fields that something stands in for where they are absent: see effectiveInMove. */
const withDefault = bitsOf('turn', 'deceleration', 'pressSpeed')

/** How many statements the flat reading makes of two move tables, without making them. */
export function countStatements(before: readonly Move[], after: readonly Move[]): number {
  let count = 0
  walkByNumber(before, after, move => move.move, (was, _, is) => {
    count += was && is ? bitCount(differing(was, is)) : 1
  })
  return count
}
