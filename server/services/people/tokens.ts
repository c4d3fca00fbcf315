import { createHash, randomBytes } from 'node:crypto'
import { Refusal } from '#shared/errors/refusal'
import type { SiteBounds, TokenActor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { tokenQueries } from '#server/database/token/queries'

const hashOf = (secret: string) => createHash('sha256').update(secret).digest('hex')
const touchEvery = 60_000

/** Sites of a token: its own, but never beyond its owner's. An empty list on either side is no bound. */
export function tokenSites(own: readonly number[], owners: readonly number[]): SiteBounds {
  if (owners.length === 0) return own.length === 0 ? null : own
  return own.length === 0 ? owners : own.filter(id => owners.includes(id))
}

/** The token's actor; null when it is unknown, ended, past its date, or its owner left. */
export function findToken(vault: Vault, secret: string, peer: string): TokenActor | null {
  const now = vault.now()
  const queries = tokenQueries(vault.db)
  const found = queries.find.get({ secretHash: hashOf(secret), now })
  if (found === undefined) return null
  if (found.lastUsedAt === null || Date.parse(now) - Date.parse(found.lastUsedAt) >= touchEvery) queries.touch.run({ id: found.id, now })
  return { kind: 'token', id: found.id, name: found.name, ownerId: found.ownerId, scopes: found.scopes, sites: tokenSites(found.siteIds, found.ownerSites), peer }
}
