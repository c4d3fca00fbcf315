import { Refusal } from '#shared/errors/refusal'
import { personOf, type Actor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { knownGoodQueries } from '#server/database/known-good/queries'
import { versionQueries } from '#server/database/version/queries'
import { refreshAxisState } from '../axes/axis-state'
import { explainVoided } from '../findings/voided'
import { versionRow } from './read-version'

/** Says that a version is a wrong upload; it stays readable. Not the one that the axis is restored to. Answers the id of the version. */
export function voidVersion(vault: Vault, actor: Actor, versionId: number, reason: string): { id: number } {
  return vault.write(actor, (write) => {
    const { db } = vault
    const version = versionRow(db, versionId)
    const byPerson = personOf(actor)
    if (byPerson === null) throw new Refusal('signature', 'A version is voided by a person.')
    if (versionQueries(db).voidOf.get({ versionId })) throw new Refusal('already-void', `Version ${version.number} is void already.`)
    if (knownGoodQueries(db).inForce.get({ axisId: version.axisId })?.mark.versionId === versionId) {
      throw new Refusal('marked', `Version ${version.number} is the known-good of its axis. Mark another one, or none, then void it.`)
    }
    const row = { versionId, at: write.now, byPerson, reason }
    versionQueries(db).insertVoid(row)
    write.log({ act: 'version-voided', id: versionId, state: row, note: reason })
    refreshAxisState(db, version.axisId)
    explainVoided(db, write, versionId, byPerson, reason)
    return { id: versionId }
  })
}
