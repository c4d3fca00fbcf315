import type { z } from 'zod'
import type { SwapLine, swapQuery } from '#shared/api/swaps'
import { Refusal } from '#shared/errors/refusal'
import { seesSite, type Actor } from '#server/database/actor'
import { boundsText } from '#server/database/bounds'
import type { Vault } from '#server/database/client'
import { swapQueries, type SwapListRow } from '#server/database/swap/queries'
import { afterOf, limitOf, pageOf } from '../page'
import { axisNamed } from '../uploads/axis-named'
import { readSwap } from './read-swap'
import { releaseDueAt } from './release-due'

/** Swaps of the actor's sites, newest first; of one axis, or only those that are open or have ended. */
export function listSwaps(vault: Vault, actor: Actor, query: z.output<typeof swapQuery>): { items: SwapLine[], next: string | null } {
  const { db } = vault
  const now = vault.now()
  const place = query.axis === undefined ? undefined : axisNamed(db, query.axis)
  if (query.axis !== undefined && !(place && seesSite(actor, place.site.id))) throw new Refusal('not-found', 'There is no such axis.')
  const rows = swapQueries(db).page.all({
    below: afterOf(query, Number.MAX_SAFE_INTEGER), limit: limitOf(query) + 1, sites: boundsText(actor.sites), axisId: place?.axis.id ?? null,
    open: query.open === undefined ? null : query.open === 'true' ? 1 : 0,
  })
  return pageOf(rows, query, ({ swap }) => swap.id, row => lineOnWire(row, now))
}

export function lineOnWire({ swap, tag, machine, site, serialOut, serialIn, openedByName }: SwapListRow, now: string): SwapLine {
  const dueAt = releaseDueAt(swap, site.releaseHours)
  return {
    id: swap.id, axisId: swap.axisId, tag, machine, timeZone: site.timeZone, step: swap.step, replaced: swap.replaced, failure: swap.failure, openedAt: swap.openedAt, openedBy: openedByName,
    changedAt: swap.changedAt, serialOut, serialIn, runningSince: swap.runningAt, releaseDueAt: dueAt, overdue: dueAt !== null && dueAt < now,
  }
}

export function swapOf(vault: Vault, id: number) {
  return readSwap(vault.db, id, vault.now())
}
