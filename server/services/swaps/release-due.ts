import { instantOf } from '#server/database/clock'
import type { SwapRow } from '#server/database/swap/table'

const hour = 60 * 60_000

/** When a swap is to be released at the latest: so many hours after the axis runs again, or after it was opened and stands still; null once it has ended. */
export function releaseDueAt({ step, runningAt, openedAt }: Pick<SwapRow, 'step' | 'runningAt' | 'openedAt'>, releaseHours: number): string | null {
  return step === 'released' || step === 'abandoned' ? null : instantOf(Date.parse(runningAt ?? openedAt) + releaseHours * hour)
}
