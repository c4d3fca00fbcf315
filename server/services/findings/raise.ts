import type { FindingCause, FindingState } from '#shared/api/findings'
import type { FieldChange } from '#shared/diff/types'
import type { Weight } from '#shared/settings/types'
import { instantOf } from '#server/database/clock'
import type { Write } from '#server/database/client'
import { findingQueries, putFindingState } from '#server/database/finding/queries'
import type { FindingActRow } from '#server/database/finding/table'
import type { VaultDb } from '#server/database/prepared'
import { tellWatchers } from '../letters/queue'

/*
 * Findings are raised within the write that causes them. While one of a cause is not closed, no second is opened: what
 * happened is added to it.
 */

/** What showed it: a version, or a state of the axis. */
export interface Showing { readonly axisId: number, readonly versionId: number | null, readonly baseId?: number | null, readonly says: string, readonly changes?: readonly FieldChange[] }
export interface Raised { readonly id: number, readonly state: FindingState }
export type Explaining = Pick<FindingActRow, 'byPerson' | 'text'> & Partial<Pick<FindingActRow, 'madeBy' | 'madeAt' | 'workOrder' | 'plannedChangeId'>>

export interface Raise {
  readonly cause: FindingCause
  /** What makes it another finding than one of the same cause. */
  readonly causeKey: string
  /** null: about the vault itself. */
  readonly siteId: number | null
  readonly title: string
  readonly weight: Weight
  readonly showings: readonly Showing[]
  /** What explains it from the start. */
  readonly explained?: readonly Explaining[]
  /** Who was told of it in a letter of another kind. */
  readonly told?: (finding: Raised) => readonly number[]
}

/** How long a finding may stand before it is overdue. */
const daysToClose = 7
const day = 86_400_000

/** Opens a finding, or adds to the one of its cause that is not closed. Answers it as it stands then. */
export function raiseFinding(db: VaultDb, write: Write, { cause, causeKey, siteId, title, weight, showings, explained = [], told = () => [] }: Raise): Raised {
  const queries = findingQueries(db)
  const open = queries.openByCause.get({ causeKey })
  if (open) {
    for (const showing of showings) addShowing(db, write, open.id, showing)
    return open
  }
  const row = { siteId, cause, causeKey, title, weight, openedAt: write.now }
  const id = queries.insert(row)
  write.log({ act: 'finding-opened', id, state: { id, ...row } })
  for (const showing of showings) addShowing(db, write, id, showing)
  for (const explaining of explained) actOn(db, write, id, { kind: 'explained', ...explaining })
  const state = explained.length > 0 ? 'explained' : refreshFindingState(db, id)
  const raised = { id, state }
  const informed = told(raised)
  if (state === 'open') tell(db, write, raised, title, showings, informed)
  return raised
}

/** Those who watch any of its axes, once. */
function tell(db: VaultDb, write: Write, { id }: Raised, title: string, showings: readonly Showing[], informed: readonly number[]): void {
  const told = [...informed]
  for (const axisId of new Set(showings.map(showing => showing.axisId))) {
    told.push(...tellWatchers(db, write, 'finding-opened', axisId, { findingId: id, title, at: write.now, dueAt: dueFrom(write.now) }, told))
  }
}

/** Adds what showed it, unless it is in the list already. */
export function addShowing(db: VaultDb, write: Write, findingId: number, { axisId, versionId, baseId = null, says, changes = [] }: Showing): void {
  const queries = findingQueries(db)
  if (queries.hasVersion.get({ findingId, axisId, versionId })) return
  const row = { findingId, axisId, versionId, baseId, says, changes: [...changes], at: write.now }
  const id = queries.insertVersion(row)
  write.log({ act: 'finding-version-added', id, state: JSON.parse(JSON.stringify({ id, ...row })) as object })
}

const actNames = { explained: 'finding-explained', closed: 'finding-closed', reopened: 'finding-reopened' } as const
const unsaid = { text: null, madeBy: null, madeAt: null, workOrder: null, plannedChangeId: null, closeAs: null, allowedBy: null, versionId: null }

/** Records what someone did about a finding; where it stands follows from that. */
export function actOn(db: VaultDb, write: Write, findingId: number, act: Pick<FindingActRow, 'kind' | 'byPerson'> & Partial<FindingActRow>): void {
  const row = { ...unsaid, ...act, findingId, at: write.now }
  const id = findingQueries(db).insertAct(row)
  write.log({ act: actNames[act.kind], id, state: { id, ...row }, note: row.text })
  refreshFindingState(db, findingId)
}

/** Derives where a finding stands from its acts; the only place that writes it. */
function refreshFindingState(db: VaultDb, findingId: number): FindingState {
  const queries = findingQueries(db)
  const found = queries.acts.all({ findingId }).map(({ act }) => act)
  const state = found.reduce<FindingState>((_, { kind }) => (kind === 'reopened' ? 'open' : kind), 'open')
  const { causeKey, openedAt } = rowOf(db, findingId)
  const reopenedAt = found.findLast(({ kind }) => kind === 'reopened')?.at
  putFindingState(db, { findingId, causeKey, state, dueAt: dueFrom(reopenedAt ?? openedAt) })
  return state
}

function rowOf(db: VaultDb, id: number) {
  const row = findingQueries(db).byId.get({ id })
  if (!row) throw new RangeError(`There is no finding ${id}.`)
  return row
}

const dueFrom = (instant: string): string => instantOf(Date.parse(instant) + daysToClose * day)
