import type { Role } from '#shared/api/common'
import type { EntryActor } from '#shared/trail/entry'
import type { TokenScope } from './token/table'

/** Sites that someone may see: null = all of them. */
export type SiteBounds = readonly number[] | null

export interface PersonActor {
  readonly kind: 'person'
  readonly id: number
  readonly name: string
  readonly roles: readonly Role[]
  readonly sites: SiteBounds
  /** May upload, never sign. */
  readonly shared: boolean
  /** The session that the request came with; null where code acts for a person. */
  readonly session: string | null
  readonly peer: string
}

export interface TokenActor {
  readonly kind: 'token'
  readonly id: number
  readonly name: string
  readonly ownerId: number
  readonly scopes: readonly TokenScope[]
  readonly sites: SiteBounds
  readonly peer: string
}

/** The vault itself: set-up, and work that nobody asked for. */
export interface VaultActor { readonly kind: 'vault', readonly name: string, readonly sites: null, readonly peer: string }

export type Actor = PersonActor | TokenActor | VaultActor

export const seesSite = (actor: Actor, siteId: number): boolean => actor.sites === null || actor.sites.includes(siteId)

/** Who answers for the act: the person, or the owner of the token; null for the vault itself. */
export const personOf = (actor: Actor): number | null => actor.kind === 'person' ? actor.id : actor.kind === 'token' ? actor.ownerId : null

export const tokenOf = (actor: Actor): number | null => actor.kind === 'token' ? actor.id : null

/** The actor as a log entry names it. */
export function entryActor(actor: Actor): EntryActor {
  if (actor.kind === 'person') return { kind: 'person', id: actor.id, name: actor.name }
  if (actor.kind === 'token') return { kind: 'token', id: actor.id, name: actor.name, ownerId: actor.ownerId }
  return { kind: 'vault', name: actor.name }
}
