import type { Write } from '#server/database/client'
import { readContent } from '#server/database/content/queries'
import { readJudgement } from '#server/database/check/queries'
import { findingQueries } from '#server/database/finding/queries'
import { judgingQueries } from '#server/database/judging/queries'
import type { VaultDb } from '#server/database/prepared'
import { versionQueries } from '#server/database/version/queries'
import { actOn } from './raise'
import { raiseStops, standingStops, stopKey } from './stops'

/** Who signs a waiver has said why the stop may stand: findings of that axis whose stops are all covered now are explained by it. */
export function explainWaived(db: VaultDb, write: Write, axisId: number, byPerson: number, text: string): void {
  const current = versionQueries(db).current.get({ axisId })
  if (!current) return
  const standing = new Set(standingStops(db, axisId, readJudgement(db, current.id), () => readContent(db, current.contentId), write.now).map(stop => stopKey(axisId, stop)))
  for (const { id, causeKey } of findingQueries(db).openOfVersion.all({ versionId: current.id })) {
    if (causeKey.startsWith(`axis:${axisId}:stop:`) && !standing.has(causeKey)) actOn(db, write, id, { kind: 'explained', byPerson, text })
  }
}

/** Raises what stops the current version of an axis now: after a waiver was taken back. */
export function raiseStanding(db: VaultDb, write: Write, axisId: number): void {
  const place = judgingQueries(db).axis.get({ id: axisId })
  const current = versionQueries(db).current.get({ axisId })
  if (!place || !current) return
  raiseStops(db, write, place, current, standingStops(db, axisId, readJudgement(db, current.id), () => readContent(db, current.contentId), write.now))
}
