import type { Scope } from '#shared/api/routes'
import { Refusal } from '#shared/errors/refusal'
import type { Actor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { siteQueries } from '#server/database/site/scope'

/** What a route's `params.id` names: its number, and the site that it belongs to; null = to none in particular, all may see it. */
export interface Subject { readonly id: number, readonly siteId: number | null }

const notThere = () => new Refusal('not-found', 'There is nothing here under this id, or it belongs to another site.')

/** Finds the subject and answers 404 alike for what does not exist and for what lies outside the actor's sites. */
export function findSubject(vault: Vault, actor: Actor, scope: Scope, ref: number | string): Subject {
  const found = siteQueries(vault.db).find(scope, ref)
  if (found === undefined) throw notThere()
  if (actor.sites !== null && found.siteId !== null && !actor.sites.includes(found.siteId)) throw notThere()
  return found
}
