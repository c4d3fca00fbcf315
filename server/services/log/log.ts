import { createHash } from 'node:crypto'
import { Refusal } from '#shared/errors/refusal'
import type { Actor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { logQueries } from '#server/database/log/queries'
import { afterOf, limitOf, pageOf, type PageQuery } from '../page'

/** SHA-256 of 0x00 and the leaf (RFC 9162, 2.1.1): the byte keeps a leaf from passing for an inner node of the tree. */
const leafHash = (leaf: string) => createHash('sha256').update(new Uint8Array([0])).update(leaf, 'utf8').digest('hex')

/** The log from the cursor on, oldest first. Whole or not at all: only without site bounds. */
export function listLog(vault: Vault, actor: Actor, query: PageQuery) {
  if (actor.sites !== null) throw new Refusal('site-bounds', 'The log is read whole, by someone who sees all sites.')
  const rows = logQueries(vault.db).from.all({ seq: afterOf(query, -1) + 1, limit: limitOf(query) + 1 })
  return pageOf(rows, query, ({ seq }) => seq, ({ seq, leaf }) => ({ seq, leaf, hash: leafHash(leaf) }))
}
