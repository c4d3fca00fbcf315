import { createHash, randomBytes } from 'node:crypto'
import type { PersonActor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { sessionQueries } from '#server/database/session/queries'

const minute = 60_000
/** Idle and whole life of a session, ms. A panel stands where anybody passes. */
export const sessionLife = { idle: 12 * 60 * minute, idleOnPanel: 5 * minute, whole: 7 * 24 * 60 * minute } as const
/** How often `seenAt` is written at most: a write a request would cost more than the request. */
const touchEvery = minute / 2

const hashOf = (sid: string) => createHash('sha256').update(sid).digest('hex')

/** A new session; answers the id for the cookie, which stands nowhere else. */
export function beginSession(vault: Vault, personId: number, panel: boolean, peer: string): string {
  const sid = randomBytes(32).toString('base64url')
  sessionQueries(vault.db).begin.run({ idHash: hashOf(sid), personId, panel: Number(panel), peer, now: vault.now() })
  return sid
}

/** Who the session id stands for now; null when it ended, idled out, outlived its week, or its person left. */
export function findSession(vault: Vault, sid: string, peer: string): PersonActor | null {
  const queries = sessionQueries(vault.db)
  const found = queries.find.get({ idHash: hashOf(sid) })
  if (found === undefined) return null
  const now = vault.now()
  const idle = Date.parse(now) - Date.parse(found.seenAt)
  const age = Date.parse(now) - Date.parse(found.madeAt)
  if (age >= sessionLife.whole || idle >= (found.panel ? sessionLife.idleOnPanel : sessionLife.idle)) return null
  if (idle >= touchEvery) queries.touch.run({ idHash: found.idHash, now })
  return {
    kind: 'person', id: found.personId, name: found.name, roles: found.roles, sites: found.siteIds.length === 0 ? null : found.siteIds,
    shared: found.shared, session: found.idHash, peer,
  }
}

/** Ends one session by the hash that the actor carries; at once, for every later request. */
export function endSession(vault: Vault, idHash: string): void {
  sessionQueries(vault.db).end.run({ idHash, now: vault.now() })
}

/** Ends all sessions of a person but the one named, if any. */
export function endSessionsOf(vault: Vault, personId: number, but: string | null = null): void {
  sessionQueries(vault.db).endOthers.run({ personId, idHash: but ?? '', now: vault.now() })
}
