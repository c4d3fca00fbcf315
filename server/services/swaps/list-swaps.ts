import type { z } from 'zod'
import type { SwapLine, SwapSpares, swapQuery } from '#shared/api/swaps'
import { Refusal } from '#shared/errors/refusal'
import { rankSpares, type RankedSpare } from '#shared/swap/spares'
import { seesSite, type Actor } from '#server/database/actor'
import { boundsText } from '#server/database/bounds'
import type { Vault } from '#server/database/client'
import type { VaultDb } from '#server/database/prepared'
import type { UnitRow, VersionRow } from '#server/database/schema'
import { swapQueries, type SwapListRow } from '#server/database/swap/queries'
import { afterOf, limitOf, pageOf } from '../page'
import { axisNamed } from '../uploads/axis-named'
import { versionRow } from '../versions/read-version'
import { readSwap, unitOnWire } from './read-swap'
import { releaseDueAt } from './release-due'
import { fitCase, judgeKit, kitCase, placeOf, type Goes } from './sides'

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

export interface Spare extends RankedSpare { readonly unit: UnitRow, readonly hard: boolean }

/** Spares in stock for what an axis would be restored to, best first: the finder of the swap, and of readiness. */
export function sparesFor(db: VaultDb, axisId: number, version: VersionRow, goes: Goes, now: string): Spare[] {
  const place = placeOf(db, axisId)
  return rankSpares(swapQueries(db).spares.all({ siteId: place.site.id }).map(({ unit }): Spare => {
    const one = kitCase(db, place, version, unit, goes)
    const { fit, reasons } = fitCase(db, one, judgeKit(db, one), now)
    const { out, into } = one.carry
    return {
      unit, fit, reasons, adjusted: one.kit.adjustments.length, sameModel: out.model === into.model, sameFirmware: out.firmware !== undefined && out.firmware === into.firmware,
      near: unit.siteId === place.site.id && unit.location !== '', serial: unit.serial, hard: reasons.some(reason => reason.hard),
    }
  }))
}

/** Spares for an open swap; none where only the actuator is changed, since actuators are not kept on their own. */
export function listSpares(vault: Vault, id: number): SwapSpares {
  const { db } = vault
  const row = swapQueries(db).byId.get({ id })
  if (!row || row.sourceVersionId === null || row.replaced === 'actuator') return { items: [] }
  const found = sparesFor(db, row.axisId, versionRow(db, row.sourceVersionId), { ...row, putBack: false }, vault.now())
  return {
    items: found.flatMap(({ unit, reasons, fit, hard, adjusted, sameModel, sameFirmware }) => {
      const shown = unitOnWire(db, unit.id)
      return shown ? [{ unit: shown, fit, hard, reasons: reasons.map(reason => ({ ...reason, at: [...reason.at] })), adjusted, sameModel, sameFirmware }] : []
    }),
  }
}
