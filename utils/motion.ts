import { moveTime, profile, type Profile } from '#shared/motion/profile'
import { startOf } from '#shared/motion/start-of'
import { isUnused } from '#shared/settings/move-fields'
import type { Nameplate } from '#shared/settings/nameplate'
import type { Content, Move } from '#shared/settings/types'

export interface ShownMotion {
  readonly move: Move
  readonly profile: Profile
  /** The move whose end it sets off from. */
  readonly start: Move
  readonly seconds: number
  /** A jerk limit makes it longer than can be told. */
  readonly atLeast: boolean
}

/** The movement of a row from where it sets off; undefined for an unused row and where the start is not known. */
export function motionOf(content: Content, number: number, nameplate?: Nameplate): ShownMotion | undefined {
  const move = content.moves.find(other => other.move === number)
  const start = move && startOf(move, content.moves)
  if (!move || !start || isUnused(move)) return undefined
  const motion = profile(move, start.target, { setup: content.setup, ...(nameplate?.stopsAtApproach !== undefined && { stopsAtApproach: nameplate.stopsAtApproach }) })
  return { move, profile: motion, start, ...moveTime(motion, content.setup) }
}

/** Seconds at the speed asked for; 0 where it is not reached. */
export function cruiseSeconds(segments: Profile['segments'], speed: number): number {
  return segments.filter(({ a, v0 }) => a === 0 && Math.abs(v0) >= speed * (1 - 1e-9)).reduce((sum, { t0, t1 }) => sum + t1 - t0, 0)
}
