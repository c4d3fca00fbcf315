import type { ExtraValue, Move, Setup } from '../settings/types'

/*
 * What an absent value amounts to. A default written out, or one no longer written out, is the same motion.
 */

/** What the drive goes by in a move, written out or not; undefined for a field that nothing stands in for. */
export function effectiveInMove(field: string, move: Move, setup: Setup): ExtraValue | undefined {
  if (field === 'deceleration') return move.deceleration ?? move.acceleration
  if (field === 'pressSpeed') return move.kind === 'press' ? move.pressSpeed ?? setup.pressSpeed : undefined
  if (field === 'turn') return move.turn ?? 'signed'
  return undefined
}

/** As effectiveInMove, of a setup field: soft limits are active where any is given and the flag is absent. */
export function effectiveInSetup(field: string, setup: Setup): ExtraValue | undefined {
  if (field !== 'softLimitsActive') return undefined
  const given = setup.softLimitMin !== undefined || setup.softLimitMax !== undefined
  return setup.softLimitsActive ?? (given ? true : undefined)
}

/** A side of a comparison: a move and the setup that holds its defaults. */
export interface MoveInSetup { readonly move: Move, readonly setup: Setup }

/** True where one side leaves the field of a move out and both come to the same value. */
export function sameMotionInMove(field: string, before: MoveInSetup, after: MoveInSetup): boolean {
  const was = effectiveInMove(field, before.move, before.setup)
  return was !== undefined && was === effectiveInMove(field, after.move, after.setup)
}

/** As sameMotionInMove, of a setup field. */
export function sameMotionInSetup(field: string, before: Setup, after: Setup): boolean {
  const was = effectiveInSetup(field, before)
  return was !== undefined && was === effectiveInSetup(field, after)
}

/** Press moves that go by the setup's press speed on both sides: a change of it changes them. */
export function goByPressSpeed(before: Move, after: Move): boolean {
  return before.kind === 'press' && after.kind === 'press' && before.pressSpeed === undefined && after.pressSpeed === undefined
}
