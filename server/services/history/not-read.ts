import type { z } from 'zod'
import type { NotReadAxis, notReadQuery } from '#shared/api/history'
import type { Actor } from '#server/database/actor'
import { boundsText } from '#server/database/bounds'
import type { Vault } from '#server/database/client'
import { historyQueries } from '#server/database/history/queries'
import { siteQueries } from '#server/database/site/scope'
import { afterOf, limitOf, pageOf } from '../page'
import { stretchOf, utc } from './filter'

/** Axes of the actor's sites that no file came from in a stretch of time, neither a version nor a sighting; `to` is now where it is left out. */
export function listNotRead(vault: Vault, actor: Actor, query: z.output<typeof notReadQuery>): { items: NotReadAxis[], next: string | null } {
  const { from = new Date(0).toISOString(), to = '9999-12-31T00:00:00.000Z', axis, machine = null, line = null, site = null } = query
  const axisId = axis === undefined ? null : siteQueries(vault.db).find('axis', axis)?.id ?? 0
  const rows = historyQueries(vault.db).notRead.all({
    after: afterOf(query), limit: limitOf(query) + 1, sites: boundsText(actor.sites), axisId, machineId: machine, lineId: line, siteId: site,
    ...stretchOf(vault.db, query), from: utc(from), to: utc(to),
  })
  return pageOf(rows, query, row => row.axis.id, ({ axis: { id, tag, uploadEveryHours }, status, ...place }) => ({ axisId: id, tag, uploadEveryHours, status: status ?? 'never-read', ...place }))
}
