import { bytesToHex } from '@noble/hashes/utils.js'
import { leafHash } from '#shared/trail/tree'
import type { Actor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { logQueries } from '#server/database/log/queries'
import { afterOf, limitOf, pageOf, type PageQuery } from '../page'
import { assertReadsWhole } from '../trail/trail'
import { sha256 } from '#server/database/sha256'

/** The log from the cursor on, oldest first. Whole or not at all: only without site bounds. */
export function listLog(vault: Vault, actor: Actor, query: PageQuery) {
  assertReadsWhole(actor)
  const rows = logQueries(vault.db).from.all({ seq: afterOf(query, -1) + 1, limit: limitOf(query) + 1 })
  return pageOf(rows, query, ({ seq }) => seq, ({ seq, leaf }) => ({ seq, leaf, hash: bytesToHex(leafHash(leaf, sha256)) }))
}
