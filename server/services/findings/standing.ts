import type { Write } from '#server/database/client'
import { readContent } from '#server/database/content/queries'
import { readJudgement } from '#server/database/check/queries'
import { judgingQueries } from '#server/database/judging/queries'
import type { VaultDb } from '#server/database/prepared'
import { versionQueries } from '#server/database/version/queries'
import { raiseStops, standingStops } from './stops'

/** Raises what stops the current version of an axis now: after a waiver was taken back. */
export function raiseStanding(db: VaultDb, write: Write, axisId: number): void {
  const place = judgingQueries(db).axis.get({ id: axisId })
  const current = versionQueries(db).current.get({ axisId })
  if (!place || !current) return
  raiseStops(db, write, place, current, standingStops(db, axisId, readJudgement(db, current.id), () => readContent(db, current.contentId), write.now))
}
