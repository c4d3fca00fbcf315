import { Refusal } from '#shared/errors/refusal'
import { seesSite, type Actor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { siteQueries } from '#server/database/site/scope'

/** The site of a place that a body names. What lies outside the actor's sites is refused as if it were not there. */
export function assertPlace(vault: Vault, actor: Actor, kind: 'site' | 'line' | 'machine' | 'axis' | 'unit', id: number, at: string): number | null {
  const found = siteQueries(vault.db).find(kind, id)
  if (found === undefined || (found.siteId !== null && !seesSite(actor, found.siteId))) {
    throw new Refusal('not-found', `There is no ${kind} ${id}.`, { errors: [{ at, code: 'not-found', message: `there is no ${kind} ${id}` }] })
  }
  return found.siteId
}
