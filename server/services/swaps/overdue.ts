import type { Vault } from '#server/database/client'
import { swapQueries, type SwapListRow } from '#server/database/swap/queries'
import type { VaultDb } from '#server/database/prepared'
import { tellWatchers } from '../letters/queue'
import { postActor } from '../letters/send'
import { personName } from '../versions/summary'
import { releaseDueAt } from './release-due'

/** Open swaps that go on for longer than their site allows: since the axis runs again, else since they were opened. Longest first. */
export function overdueSwaps(db: VaultDb, now: string): SwapListRow[] {
  return swapQueries(db).open.all().filter(({ swap, site }) => (releaseDueAt(swap, site.releaseHours) ?? now) < now)
    .sort((a, b) => ((a.swap.runningAt ?? a.swap.openedAt) < (b.swap.runningAt ?? b.swap.openedAt) ? -1 : 1))
}

/** A letter for each axis that runs with a swapped unit for longer than its site allows, once a swap. Answers how many were written. */
export function tellUnreleased(vault: Vault): number {
  const late = overdueSwaps(vault.db, vault.now()).filter(({ swap }) => swap.facts.running !== undefined)
  if (late.length === 0) return 0
  return vault.write(postActor, write => late.reduce((count, { swap, site }) => count + tellWatchers(vault.db, write, 'swap-unreleased', swap.axisId, {
    swapId: swap.id, runningSince: swap.runningAt ?? swap.openedAt, releaseHours: site.releaseHours, by: personName(vault.db, swap.facts.running?.by ?? swap.openedBy) ?? 'a person',
  }).length, 0))
}
