import type { H3Event } from 'h3'
import type { RouteDeclaration } from '#shared/api/routes'
import { Refusal } from '#shared/errors/refusal'
import type { PersonActor, TokenActor } from '#server/database/actor'
import { findToken } from '#server/services/people/tokens'
import { peerOf, sessionActor } from './session'

/** Who asks: by `Authorization: Bearer wm_…`, else by the cookie; null = nobody. A token that does not hold is 401, not nobody. */
export async function findActor(event: H3Event): Promise<PersonActor | TokenActor | null> {
  const { authorization } = event.node.req.headers
  if (authorization === undefined) return sessionActor(event)
  const token = /^Bearer (wm_[A-Za-z0-9_-]{43})$/.exec(authorization)?.[1]
  const actor = token === undefined ? null : findToken(event.context.server.vault, token, peerOf(event))
  if (actor === null) throw new Refusal('sign-in-needed', 'The token does not hold: it is unknown, has ended, or its owner has.')
  return actor
}

/** 401 without an actor, 403 where the actor's roles or the token's scopes do not reach the route. */
export function assertMay(declaration: RouteDeclaration, actor: PersonActor | TokenActor | null): asserts actor is PersonActor | TokenActor {
  if (actor === null) throw new Refusal('sign-in-needed', 'Sign in first.')
  if (actor.kind === 'token') {
    if (declaration.token === undefined || !actor.scopes.includes(declaration.token)) throw new Refusal('token-scope', 'This token may not do that.')
    return
  }
  const { may } = declaration
  if (typeof may === 'string') return
  if (!may.some(role => actor.roles.includes(role))) throw new Refusal('role', `This takes the role ${may.join(' or ')}.`)
}
