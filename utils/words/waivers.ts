import { blocksKnownGood } from '#shared/checks/blocks'
import type { CheckResult } from '#shared/checks/types'
import type { AxisFlag } from '#shared/settings/types'
import { toInstant } from '../forms/zoned'

/** Those of some results that hold a mark up, so that a planner may accept them. */
export function acceptable(results: readonly CheckResult[], flags: readonly AxisFlag[]): CheckResult[] {
  return blocksKnownGood({ ruleSet: '', results, judged: [], notApplicable: [] }, flags)
}

const day = 24 * 3_600_000

/** The instant at which a day (2026-12-01) is over in a zone; a text that is no day stays as it is, for the vault to name. */
export function endOfDay(text: string, timeZone: string): string {
  const begins = Date.parse(`${text}T00:00Z`)
  return Number.isNaN(begins) ? text : toInstant(`${new Date(begins + day).toISOString().slice(0, 10)}T00:00`, timeZone)
}

/** The day, `days` from now, as an input of a day takes it. */
export function dayFrom(now: Date, days: number): string {
  return new Date(now.getTime() + days * day).toISOString().slice(0, 10)
}
