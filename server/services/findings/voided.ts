import type { Write } from '#server/database/client'
import { findingQueries } from '#server/database/finding/queries'
import type { VaultDb } from '#server/database/prepared'
import { versionQueries } from '#server/database/version/queries'
import { actOn } from './raise'

/** Beyond that a finding is about more than a wrong upload. */
const most = 200

/** Who sets a wrong upload aside has said why it shows what it shows: findings that nothing but void versions show are explained by that. */
export function explainVoided(db: VaultDb, write: Write, versionId: number, byPerson: number, reason: string): void {
  const queries = findingQueries(db)
  for (const { id } of queries.ofVersionIn.all({ versionId, state: 'open' })) {
    const rows = queries.versions.all({ findingId: id, limit: most })
    const allVoid = rows.length < most && rows.every(({ row }) => row.versionId !== null && versionQueries(db).voidOf.get({ versionId: row.versionId }))
    if (allVoid) actOn(db, write, id, { kind: 'explained', byPerson, text: `Set aside as a wrong upload: ${reason}` })
  }
}
