import type { Attention } from '#shared/api/board'
import { readJudgement } from '#server/database/check/queries'
import { boundsText } from '#server/database/bounds'
import { readContent } from '#server/database/content/queries'
import { findingQueries } from '#server/database/finding/queries'
import type { SiteBounds } from '#server/database/actor'
import type { AxisListRow } from '#server/database/axis-state/list'
import type { VaultDb } from '#server/database/prepared'
import { countWaiting, waitingGroups } from '#server/database/tray/queries'
import { againstKnownGood } from '../axes/axis-state'
import { overdueSince } from '../axes/overdue'
import { spokenPlace, valueWords } from '../change-words'
import { overdueSwaps } from '../swaps/overdue'
import { standingCounts, waived } from '../waivers/accepted'

type Item = Attention['items'][number]

/** How many of a group are named; the count says how many there are. */
const named = 5

interface Needing { readonly row: AxisListRow, readonly since: string | null }

/** What needs someone now, worst kind first and the longest waiting first within a kind; kinds without a case are left out. */
export function attention(db: VaultDb, sites: SiteBounds, rows: readonly AxisListRow[], now: string): Attention[] {
  const overdue = (row: AxisListRow) => overdueSince(row.state?.lastUploadAt ?? null, row.axis.uploadEveryHours, now)
  const group = (kind: Attention['kind'], applies: (row: AxisListRow) => boolean, since: (row: AxisListRow) => string | null, text: (needing: Needing) => string, rank: (row: AxisListRow) => number = () => 0): Attention => {
    const needing = rows.filter(applies).map(row => ({ row, since: since(row) })).sort((a, b) => rank(a.row) - rank(b.row) || ((a.since ?? '') < (b.since ?? '') ? -1 : 1))
    return { kind, count: needing.length, since: needing.map(each => each.since ?? '').sort()[0] || null, items: needing.slice(0, named).map(each => itemOf(each, text(each))) }
  }
  return [
    swapGroup(db, sites, now),
    findingGroup(db, sites),
    group('stop-check', ({ state }) => standingCounts(state, now).stop > 0, ({ current }) => current?.receivedAt ?? null, ({ row }) => firstStop(db, row, now)),
    group('off-known-good', ({ state }) => state?.status === 'off', ({ state }) => state?.offSince ?? null, ({ row }) => offText(db, row), weightOff),
    group('unmarked', ({ state }) => state?.status === 'unmarked', ({ mark, current }) => mark?.at ?? current?.receivedAt ?? null, () => 'read, and no version is known-good'),
    group('overdue', row => overdue(row) !== null, overdue, ({ row }) => `due every ${row.axis.uploadEveryHours} h`),
    group('never-read', ({ state }) => (state?.status ?? 'never-read') === 'never-read', ({ axis }) => axis.madeAt, ({ row }) => (row.unit?.serial ? `unit ${row.unit.serial} fitted, never read` : 'no unit fitted')),
    trayGroup(db, sites),
  ].filter(({ count }) => count > 0)
}

function itemOf({ row, since }: Needing, text: string): Item {
  return { axisId: row.axis.id, tag: row.axis.tag, versionId: row.current?.id ?? null, knownGoodId: row.marked?.id ?? null, findingId: null, text, since }
}

function firstStop(db: VaultDb, { axis, current }: AxisListRow, now: string): string {
  if (!current) return ''
  const { judgement } = waived(db, axis.id, readJudgement(db, current.id), () => readContent(db, current.contentId), now)
  const stops = judgement.results.filter(({ level }) => level === 'stop')
  return `${stops[0]?.message ?? ''}${stops.length > 1 ? ` And ${stops.length - 1} more.` : ''}`
}

/** Off in what can hurt goes before off in motion, and that before off in words. */
function weightOff({ state }: AxisListRow): number {
  return state?.offHarm ? 0 : state?.offMotion ? 1 : 2
}

/** The weightiest difference in words, and how many more there are. */
function offText(db: VaultDb, { axis, current, marked }: AxisListRow): string {
  const differences = (current && againstKnownGood(db, axis.id, current)?.told) ?? []
  const [first] = differences
  const more = differences.length > 1 ? `, and ${differences.length - 1} more` : ''
  return `${first ? `${spokenPlace(first)} ${valueWords(first)}${more}` : 'moves renumbered'}, against known-good v${marked?.number ?? '?'}`
}

function swapGroup(db: VaultDb, sites: SiteBounds, now: string): Attention {
  const late = overdueSwaps(db, now).filter(({ site }) => sites === null || sites.includes(site.id))
  const items = late.slice(0, named).map(({ swap, tag, serialIn }): Item => ({
    axisId: swap.axisId, tag, versionId: null, knownGoodId: null, findingId: null, since: swap.runningAt ?? swap.openedAt,
    text: swap.runningAt === null ? 'swap begun and not ended' : `runs with ${serialIn ?? 'another unit'}, not released`,
  }))
  return { kind: 'swap-unreleased', count: late.length, since: items[0]?.since ?? null, items }
}

function findingGroup(db: VaultDb, sites: SiteBounds): Attention {
  const queries = findingQueries(db)
  const bounds = boundsText(sites)
  const { count = 0, since = null } = queries.countWaiting.get({ sites: bounds }) ?? {}
  const items = queries.waiting.all({ sites: bounds, limit: named }).map(({ finding, state }): Item => {
    const [shown] = queries.versions.all({ findingId: finding.id, limit: 1 })
    const tag = shown?.tag ?? 'the vault'
    const what = finding.title.replace(new RegExp(`^${tag.replaceAll('.', '\\.')}:? `), '').replace(/\.$/, '')
    return { axisId: shown?.row.axisId ?? null, tag, versionId: shown?.row.versionId ?? null, knownGoodId: null, findingId: finding.id, text: `${what}; ${state === 'open' ? 'nobody has said why' : 'explained, to be closed'}`, since: finding.openedAt }
  })
  return { kind: 'finding', count, since, items }
}

function trayGroup(db: VaultDb, sites: SiteBounds): Attention {
  const { count, since } = countWaiting(db, sites)
  const items = count === 0
    ? []
    : waitingGroups(db, sites, 0, named).map(({ tray, upload, guessTag }): Item =>
        ({ axisId: tray.guessAxisId, tag: guessTag ?? tray.serial ?? upload.name ?? `file ${tray.id}`, versionId: null, knownGoodId: null, findingId: null, text: tray.detail, since: upload.receivedAt }))
  return { kind: 'tray', count, since, items }
}
