import type { OpenSwap } from '#shared/api/open-swap'
import type { AxisListRow } from '#server/database/axis-state/list'
import { releaseDueAt } from './release-due'

/** The swap that is open at an axis, as its row has it. */
export function openSwapOf({ swap, site }: Pick<AxisListRow, 'swap' | 'site'>, now: string): OpenSwap | null {
  const dueAt = swap?.id && swap.step && swap.openedAt ? releaseDueAt({ step: swap.step, runningAt: swap.runningAt, openedAt: swap.openedAt }, site.releaseHours) : null
  if (!swap?.id || !swap.step || !swap.openedAt || dueAt === null) return null
  return { id: swap.id, step: swap.step, openedAt: swap.openedAt, openedBy: swap.openedBy ?? '', runningSince: swap.runningAt, releaseDueAt: dueAt, overdue: dueAt < now }
}
