import { moveFieldNames, zoneFieldNames } from '../settings/move-fields'
import type { Move, Zone } from '../settings/types'
import { changeOf } from './change'
import { sameMotionInMove } from './defaults'
import type { Sides } from './sides'
import type { FieldChange } from './types'
import { walkByNumber } from './walk'

/** Whether the follower that a move had is the one that its partner has. */
export type NextAgrees = (was: number | undefined, is: number | undefined) => boolean

/** Adds one change for each field of a move that differs, all of them where the move stands on one side only. */
export function pushMoveChanges(
  out: FieldChange[], sides: Sides, before: Move | undefined, beforeIndex: number, after: Move | undefined, afterIndex: number,
  nextAgrees: NextAgrees,
): void {
  const row = (after ?? before)?.move
  for (let rank = 0; rank < moveFieldNames.length; rank += 1) {
    const field = moveFieldNames[rank]!
    const was = before?.[field]
    const is = after?.[field]
    if (field === 'next' ? nextAgrees(before?.next, after?.next) : was === is) continue
    const gone = is === undefined
    const at = gone ? `/moves/${beforeIndex}/${field}` : `/moves/${afterIndex}/${field}`
    const sameMotion = before !== undefined && after !== undefined && (was === undefined || gone)
      && sameMotionInMove(field, { move: before, setup: sides.before.setup }, { move: after, setup: sides.after.setup })
    out.push(changeOf((gone ? sides.was : sides.is).move[rank]!, { at, section: 'move', row }, was, is, sameMotion))
  }
}

/** Adds the changes of all zones, paired by number. */
export function pushZoneChanges(out: FieldChange[], sides: Sides): void {
  walkByNumber<Zone>(sides.before.zones, sides.after.zones, (zone) => zone.zone, (before, i, after, j) => {
    for (const [rank, field] of zoneFieldNames.entries()) {
      const was = before?.[field]
      const is = after?.[field]
      if (was === is) continue
      const at = is === undefined ? `/zones/${i}/${field}` : `/zones/${j}/${field}`
      const rule = (is === undefined ? sides.was : sides.is).zone[rank]!
      out.push(changeOf(rule, { at, section: 'zone', row: (after ?? before)?.zone }, was, is, false))
    }
  })
}

/** Equality of two moves in every field, their numbers aside; the quick way out for the many that did not change. */
export function sameMove(a: Move, b: Move): boolean {
  return a === b || (a.kind === b.kind && a.target === b.target && a.speed === b.speed && a.acceleration === b.acceleration
    && a.deceleration === b.deceleration && a.forceLimit === b.forceLimit && a.approach === b.approach && a.pressSpeed === b.pressSpeed
    && a.window === b.window && a.next === b.next && a.dwell === b.dwell && a.turn === b.turn && a.label === b.label && a.comment === b.comment)
}
