import { createHash, randomBytes } from 'node:crypto'
import type { z } from 'zod'
import type { Token, tokenBody } from '#shared/api/people'
import { Refusal } from '#shared/errors/refusal'
import type { PersonActor, SiteBounds, TokenActor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { endToken, insertToken, tokenQueries, tokenState } from '#server/database/token/queries'
import type { TokenRow } from '#server/database/token/table'
import { afterOf, limitOf, pageOf, type PageQuery } from '../page'
import { findPerson } from './people'

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

const longest = 366 * 24 * 60 * 60 * 1000

const tokenOut = ({ token: { secretHash: _hash, madeBy: _by, ...token }, ownerName }: { token: TokenRow, ownerName: string }): Token => ({ ...token, ownerName })

export function listTokens(vault: Vault, query: PageQuery) {
  const rows = tokenQueries(vault.db).page.all({ after: afterOf(query), limit: limitOf(query) + 1 })
  return pageOf(rows, query, ({ token }) => token.id, tokenOut)
}

/** Makes a token; its secret is in the answer and nowhere else. */
export function makeToken(vault: Vault, actor: PersonActor, { ownerId = actor.id, ...body }: z.output<typeof tokenBody>): { id: number, token: string } {
  const secret = `wm_${randomBytes(32).toString('base64url')}`
  return vault.write(actor, (write) => {
    const endsAt = new Date(body.endsAt).toISOString()
    const life = Date.parse(endsAt) - Date.parse(write.now)
    if (life <= 0 || life > longest) throw new Refusal('time-order', 'A token ends within a year from now.', { errors: [{ at: '/endsAt', code: 'time-order', message: 'within a year from now' }] })
    const owner = findPerson(vault, ownerId)
    if (owner.endedAt !== null) throw new Refusal('already-ended', `${owner.name} has left and cannot answer for a token.`)
    const row = insertToken(vault.db, { ...body, endsAt, ownerId, madeBy: actor.id, madeAt: write.now, secretHash: hashOf(secret) })
    write.log({ act: 'token-made', id: row.id, state: tokenState(row) })
    return { id: row.id, token: secret }
  })
}

export function stopToken(vault: Vault, actor: PersonActor, id: number): Token {
  return vault.write(actor, (write) => {
    const found = tokenQueries(vault.db).byId.get({ id })
    if (found === undefined) throw new Refusal('not-found', `There is no token ${id}.`)
    if (found.token.endedAt !== null) throw new Refusal('already-ended', 'This token has ended already.')
    return tokenOut({ ...found, token: endToken(vault.db, write, found.token) })
  })
}
