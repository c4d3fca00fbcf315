import { readAllAxes, type AxisListRow } from '#server/database/axis-state/list'
import { readJudgement } from '#server/database/check/queries'
import { instantOf } from '#server/database/clock'
import type { Vault, Write } from '#server/database/client'
import { readContent } from '#server/database/content/queries'
import { findingQueries } from '#server/database/finding/queries'
import { judgingQueries } from '#server/database/judging/queries'
import type { AxisStateRow } from '#server/database/schema'
import { versionRow } from '../versions/read-version'
import { tellWatchers } from '../letters/queue'
import { postActor } from '../letters/send'
import { raiseFinding } from './raise'
import { raiseStops, standingStops, stopKey } from './stops'

/*
 * What becomes a finding by the passing of time: an axis off its known-good for longer than the site allows, a waiver that
 * ran out; and a finding that passes its day. Each is raised once, however often the vault looks.
 */

const hour = 3_600_000

/** axis + mark. */
export const offKey = (axisId: number, knownGoodId: number): string => `axis:${axisId}:mark:${knownGoodId}`

/** Raises a finding for every axis that is off its known-good longer than anything may run unreleased at its site. Answers how many. */
export function raiseOff(vault: Vault): number {
  const now = vault.now()
  const off = readAllAxes(vault.db, null).flatMap((row) => {
    const { state } = row
    return state?.status === 'off' && state.offSince !== null && state.knownGoodId !== null && isNew(vault, offKey(row.axis.id, state.knownGoodId), state.offSince) ? [{ row, state, offSince: state.offSince }] : []
  })
  const late = off.filter(({ row, offSince }) => instantOf(Date.parse(offSince) + releaseHours(vault, row) * hour) <= now)
  if (late.length > 0) vault.write(postActor, write => late.forEach(({ row, state }) => raiseOffAxis(vault, write, row, state)))
  return late.length
}

const releaseHours = ({ db }: Vault, { axis }: AxisListRow) => judgingQueries(db).axis.get({ id: axis.id })?.site.releaseHours ?? 0

/** Whether no finding of the cause was opened since an instant. */
function isNew({ db }: Vault, causeKey: string, since: string): boolean {
  const newest = findingQueries(db).newestByCause.get({ causeKey })
  return newest === undefined || newest.openedAt < since
}

function raiseOffAxis({ db }: Vault, write: Write, { axis, site, current, marked }: AxisListRow, { offHarm, offMotion, offText, knownGoodId }: AxisStateRow): void {
  const counts = [[offHarm, 'harm'], [offMotion, 'motion'], [offText, 'text']] as const
  const weight = counts.find(([count]) => count > 0)?.[1] ?? 'motion'
  const says = `${axis.tag} v${current?.number ?? '?'} is off known-good v${marked?.number ?? '?'} by ${counts.filter(([count]) => count > 0).map(([count, word]) => `${count} ${word}`).join(', ') || 'moves renumbered'}`
  raiseFinding(db, write, {
    cause: 'off-known-good', causeKey: offKey(axis.id, knownGoodId ?? 0), siteId: site.id, weight, title: `${says}, longer than the site allows`,
    showings: [{ axisId: axis.id, versionId: current?.id ?? null, baseId: marked?.id ?? null, says }],
  })
}

/** Raises the stops that stand again because the waiver that covered them ran out or was taken back. Answers how many axes. */
export function raiseUnwaived(vault: Vault): number {
  const now = vault.now()
  const { db } = vault
  const ran = readAllAxes(db, null).flatMap((row) => {
    const until = row.state?.accepted.filter(one => one.level === 'stop' && one.until <= now).map(one => one.until).sort().at(-1)
    if (until === undefined || !row.current) return []
    const { id, contentId } = row.current
    const stops = standingStops(db, row.axis.id, readJudgement(db, id), () => readContent(db, contentId), now).filter(stop => isNew(vault, stopKey(row.axis.id, stop), until))
    return stops.length === 0 ? [] : [{ row, versionId: id, stops }]
  })
  if (ran.length > 0) {
    vault.write(postActor, write => ran.forEach(({ row, versionId, stops }) => raiseStops(db, write, row, versionRow(db, versionId), stops)))
  }
  return ran.length
}

const lookedUntil = new WeakMap<Vault, string>()

/** Tells those who watch of every finding that passed its day since the last look. Answers how many letters were written. */
export function tellOverdue(vault: Vault): number {
  const { db } = vault
  const now = vault.now()
  const overdue = findingQueries(db).overdue.all({ since: lookedUntil.get(vault) ?? '', now })
  lookedUntil.set(vault, now)
  if (overdue.length === 0) return 0
  return vault.write(postActor, write => overdue.reduce((letters, { finding, dueAt }) => {
    const told: number[] = []
    for (const { axisId } of findingQueries(db).axesOf.all({ findingId: finding.id })) {
      told.push(...tellWatchers(db, write, 'finding-overdue', axisId, { findingId: finding.id, title: finding.title, dueAt }, told))
    }
    return letters + told.length
  }, 0))
}
