import type { Instant } from './columns'

/** Milliseconds since 1970 to the text that is stored. */
export const instantOf = (milliseconds: number): Instant => new Date(milliseconds).toISOString()

/** Answers the time, but never one before `newest` or before one it gave already: a clock set back stands still until it has caught up. */
export function steadyClock(milliseconds: () => number, newest: Instant | null): () => Instant {
  let last = newest ?? ''
  return () => {
    const now = instantOf(milliseconds())
    if (now > last) last = now
    return last
  }
}
