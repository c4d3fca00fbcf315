import type { Profile } from './profile'
import { directionOf, type EffortOf } from './thrust'

/** v²/(2b), mm or deg: constant deceleration (OpenStax University Physics 1, section 3.4). 0 from rest, Infinity where nothing brakes. */
export function stoppingDistance(speed: number, deceleration: number): number {
  if (speed === 0) return 0
  return deceleration > 0 ? speed ** 2 / (2 * deceleration) : Infinity
}

/**
 * The hardest deceleration (mm/s² or deg/s²) that a thrust can do while moving in a direction, `limit` being that of the
 * thrust against the motion: (limit + weight against the motion + friction)/mass. 0 where the load runs on, Infinity
 * without any mass.
 */
export function thrustDeceleration(effortOf: EffortOf, limit: number, direction: 1 | -1): number {
  const cruise = effortOf(0, direction)
  const helping = direction === 1 ? cruise.least : -cruise.most
  // Effort is a straight line over acceleration, so that one more mm/s² costs the same everywhere.
  const perUnit = effortOf(1, 0).most - effortOf(0, 0).most
  const left = limit + helping
  if (left <= 0) return 0
  return perUnit > 0 ? left / perUnit : Infinity
}

/**
 * How far towards plus (1) or minus (-1) a quick stop can carry the axis on its way, mm or deg: the furthest place x ±
 * v²/(2b) over the whole profile. Within a segment that place only grows or only falls, so that its ends tell. -Infinity
 * towards plus (Infinity towards minus) where the axis never moves that way.
 */
export function furthestStop({ segments }: Profile, deceleration: number, direction: 1 | -1): number {
  let furthest = -Infinity
  for (const segment of segments) {
    if (directionOf(segment) !== direction) continue
    const { t0, t1, x0, v0, a } = segment
    const time = t1 - t0
    const end = x0 + v0 * time + a * time ** 2 / 2
    furthest = Math.max(furthest,
      direction * x0 + stoppingDistance(Math.abs(v0), deceleration),
      direction * end + stoppingDistance(Math.abs(v0 + a * time), deceleration))
  }
  return direction * furthest
}
