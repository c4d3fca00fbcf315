import { personOf, type Actor } from '#server/database/actor'
import type { Vault, Write } from '#server/database/client'
import type { VaultDb } from '#server/database/prepared'
import { trayQueries, waitingLike } from '#server/database/tray/queries'
import { Refusal } from '#shared/errors/refusal'
import { waitingItem } from './list'

export interface Settled { readonly outcome: 'assigned' | 'discarded', readonly reason: string | null, readonly versionId?: number, readonly sightingId?: number }

/** Sets a file and its equals aside with a reason; the bytes stay. */
export function discardFromTray(vault: Vault, actor: Actor, id: number, reason: string): void {
  vault.write(actor, (write) => {
    waitingItem(vault.db, id)
    for (const { id: trayId } of waitingLike(vault.db, actor.sites, id)) settle(vault.db, write, trayId, { outcome: 'discarded', reason })
  })
}

/** Says what became of a file in the tray. */
export function settle(db: VaultDb, write: Write, trayId: number, { outcome, reason, versionId = 0, sightingId = 0 }: Settled): void {
  const byPerson = personOf(write.actor)
  if (byPerson === null) throw new Refusal('role', 'A file in the tray is settled by a person.')
  const row = { trayId, outcome, at: write.now, byPerson, reason, versionId: versionId || null, sightingId: sightingId || null }
  trayQueries(db).settle(row)
  write.log({ act: outcome === 'assigned' ? 'tray-assigned' : 'tray-discarded', id: trayId, state: row, note: reason })
}
