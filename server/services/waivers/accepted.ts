import type { Judgement, Level } from '#shared/checks/types'
import { applyWaivers, type WaivedJudgement, type Waiver } from '#shared/checks/waivers'
import type { Content } from '#shared/settings/types'
import type { AcceptedUntil } from '#server/database/axis-state/table'
import { readJudgement } from '#server/database/check/queries'
import { readContent } from '#server/database/content/queries'
import type { VaultDb } from '#server/database/prepared'
import type { AxisStateRow, VersionRow } from '#server/database/schema'
import { waiverQueries, type NamedWaiver } from '#server/database/waiver/queries'
import type { WireCheck, WireWaivableCheck } from '../wire'

const asWaiver = ({ id, axisId, rule, covers, untilAt }: NamedWaiver): Waiver => ({ id, axisId, rule, covers, until: Date.parse(untilAt) })

/** Parts a judgement of an axis into what stands at `now` and what its waivers cover; the content is read only where there are any. */
export function waived(db: VaultDb, axisId: number, judgement: Judgement, content: () => Content, now: string): WaivedJudgement {
  const rows = waiverQueries(db).notEnded.all({ axisId })
  return rows.length === 0 ? { judgement, accepted: [] } : applyWaivers(judgement, content(), axisId, rows.map(asWaiver), Date.parse(now))
}

/** Results in their order, each with the waiver that covers it now. */
export function waivedOnWire(db: VaultDb, axisId: number, judgement: Judgement, content: () => Content, now: string): WireWaivableCheck[] {
  const { accepted } = waived(db, axisId, judgement, content, now)
  const covering = new Map(accepted.map(({ result, waiver }) => [result, waiverQueries(db).named.get({ id: waiver.id })]))
  return judgement.results.map((result) => {
    const row = covering.get(result)
    return { ...result as WireCheck, waived: row ? { id: row.id, by: row.giver, givenAt: row.givenAt, until: row.untilAt, reason: row.reason } : null }
  })
}

/** What waivers that nobody took back cover in the newest judgement of a version, each with the end of that which holds longest. */
export function acceptedUntil(db: VaultDb, version: Pick<VersionRow, 'id' | 'axisId' | 'contentId'>): AcceptedUntil[] {
  const rows = waiverQueries(db).notEnded.all({ axisId: version.axisId })
  if (rows.length === 0) return []
  const { accepted } = applyWaivers(readJudgement(db, version.id), readContent(db, version.contentId), version.axisId, rows.map(asWaiver), -Infinity)
  return accepted.map(({ result, waiver }) => ({ level: result.level === 'stop' ? 'stop' : 'unknown', until: new Date(waiver.until ?? 0).toISOString() }))
}

/** How many results of each level stand at `now`: what is accepted counts again from the end of its waiver on. */
export function standingCounts(state: Pick<AxisStateRow, Level | 'accepted'> | null, now: string): Record<Level, number> {
  if (!state) return { stop: 0, warn: 0, note: 0, unknown: 0 }
  const { stop, warn, note, unknown, accepted } = state
  const covered = (level: Level) => accepted.filter(one => one.level === level && one.until > now).length
  return { stop: stop - covered('stop'), warn, note, unknown: unknown - covered('unknown') }
}
