import type { Write } from '#server/database/client'
import { readContent } from '#server/database/content/queries'
import { readJudgement } from '#server/database/check/queries'
import { findingQueries } from '#server/database/finding/queries'
import { judgingQueries } from '#server/database/judging/queries'
import type { VaultDb } from '#server/database/prepared'
import type { WaiverRow } from '#server/database/schema'
import { versionQueries } from '#server/database/version/queries'
import { actOn } from './raise'
import { raiseStops, standingStops, stopKey } from './stops'

type Signed = Pick<WaiverRow, 'axisId' | 'givenBy' | 'givenAt' | 'untilAt' | 'reason'>

/** What a waiver says of the findings that it explains. */
const waiverWords = ({ untilAt, reason }: Signed): string => `Accepted until ${untilAt.slice(0, 10)} by a waiver: ${reason}`

/** Who signs a waiver has said why the stop may stand: findings of that axis whose stops are all covered now are explained by it. */
export function explainWaived(db: VaultDb, write: Write, waiver: Signed): void {
  const { versionId, standing } = stopsNow(db, write, waiver.axisId)
  for (const { id, causeKey } of findingQueries(db).ofVersionIn.all({ versionId, state: 'open' })) {
    if (causeKey.startsWith(`axis:${waiver.axisId}:stop:`) && !standing.has(causeKey)) actOn(db, write, id, { kind: 'explained', byPerson: waiver.givenBy, text: waiverWords(waiver) })
  }
}

/** A waiver that is taken back explains nothing any more: findings that nobody else explained are open again, with its words. */
export function reopenUnwaived(db: VaultDb, write: Write, waiver: Signed, byPerson: number, reason: string): void {
  const { versionId, standing } = stopsNow(db, write, waiver.axisId)
  for (const { id, causeKey } of findingQueries(db).ofVersionIn.all({ versionId, state: 'explained' })) {
    const acts = findingQueries(db).acts.all({ findingId: id }).map(({ act }) => act)
    const said = acts.slice(acts.findLastIndex(({ kind }) => kind === 'reopened') + 1)
    const byIt = said.every(({ byPerson: who, at, text }) => who === waiver.givenBy && at === waiver.givenAt && text === waiverWords(waiver))
    if (standing.has(causeKey) && byIt) actOn(db, write, id, { kind: 'reopened', byPerson, text: `The waiver that explained it was taken back: ${reason}` })
  }
}

/** The current version of an axis, and what stops it now by cause. */
function stopsNow(db: VaultDb, write: Write, axisId: number): { versionId: number, standing: ReadonlySet<string> } {
  const current = versionQueries(db).current.get({ axisId })
  if (!current) return { versionId: 0, standing: new Set() }
  const stops = standingStops(db, axisId, readJudgement(db, current.id), () => readContent(db, current.contentId), write.now)
  return { versionId: current.id, standing: new Set(stops.map(stop => stopKey(axisId, stop))) }
}

/** Raises what stops the current version of an axis now: after a waiver was taken back. */
export function raiseStanding(db: VaultDb, write: Write, axisId: number): void {
  const place = judgingQueries(db).axis.get({ id: axisId })
  const current = versionQueries(db).current.get({ axisId })
  if (!place || !current) return
  raiseStops(db, write, place, current, standingStops(db, axisId, readJudgement(db, current.id), () => readContent(db, current.contentId), write.now))
}
