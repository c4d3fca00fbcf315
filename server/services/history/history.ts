import type { HistoryItem, HistoryQuery } from '#shared/api/history'
import { Refusal } from '#shared/errors/refusal'
import type { Actor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { findingQueries } from '#server/database/finding/queries'
import { historyQueries } from '#server/database/history/queries'
import type { ChangeKey } from '#server/database/history/keys'
import type { Stretch } from '#server/database/history/walk'
import type { VaultDb } from '#server/database/prepared'
import { limitOf } from '../page'
import { namedPerson } from '../versions/summary'
import { historyFilter, type HistoryFilter } from './filter'
import { findKeys } from './merge'

/** Changes of the actor's sites, newest first: by the vault's own order, within a version from its last change on. */
export function listHistory(vault: Vault, actor: Actor, query: HistoryQuery): { items: HistoryItem[], next: string | null } {
  const filter = historyFilter(vault, actor, query)
  return pageOn(vault, filter, cursorOf(query, filter.stretch), limitOf(query))
}

/** The whole result, page by page: for files. What is stored meanwhile comes after its last version and is not in it. */
export function* wholeHistory(vault: Vault, filter: HistoryFilter, size = 200): Generator<HistoryItem[]> {
  let after: ChangeKey | null = startOf(filter.stretch)
  while (after !== null) {
    const { keys, next } = findKeys(vault.sqlite, filter.plans, filter.asked, filter.stretch, after, size)
    yield itemsOf(vault.db, keys)
    after = next
  }
}

function pageOn({ sqlite, db }: Vault, { plans, asked, stretch }: HistoryFilter, after: ChangeKey, limit: number) {
  const { keys, next } = findKeys(sqlite, plans, asked, stretch, after, limit)
  return { items: itemsOf(db, keys), next: next && `${next.versionId}.${next.seq}` }
}

const startOf = ({ last }: Stretch): ChangeKey => ({ versionId: last + 1, seq: 0 })

function cursorOf({ cursor }: HistoryQuery, stretch: Stretch): ChangeKey {
  if (cursor === undefined) return startOf(stretch)
  const [, versionId, seq] = /^(\d{1,15})\.(\d{1,9})$/.exec(cursor) ?? []
  if (versionId === undefined || seq === undefined) throw new Refusal('input', '?cursor: not one that this list gave.', { errors: [{ at: '?cursor', code: 'cursor', message: 'not one that this list gave' }] })
  const key = { versionId: Number(versionId), seq: Number(seq) }
  return key.versionId > stretch.last ? startOf(stretch) : key
}

function itemsOf(db: VaultDb, keys: readonly ChangeKey[]): HistoryItem[] {
  const findings = new Map<number, FindingWords>()
  return keys.map((key) => {
    const row = historyQueries(db).item.get({ versionId: key.versionId, seq: key.seq })
    if (!row) throw new TypeError(`change ${key.versionId}.${key.seq} is in an index and not in its table`)
    const { change, version, base, findingId } = row
    const words = findingId === null ? noFinding : findings.get(findingId) ?? findingWords(db, findingId)
    if (findingId !== null) findings.set(findingId, words)
    return {
      versionId: version.id, axisId: version.axisId, tag: row.tag, section: change.section, row: change.row, field: change.field,
      before: change.before ?? null, after: change.after ?? null, unit: change.unit, delta: change.delta, points: change.points, weight: change.weight,
      at: version.receivedAt, capturedAt: version.capturedAt,
      changedBy: namedPerson(db, version.changedBy), storedBy: row.token === null ? row.storer : `${row.token} (${row.storer})`,
      reason: version.reason, workOrder: version.workOrder, allowedBy: namedPerson(db, version.allowedBy) ?? words.allowedBy, findingId,
      number: version.number, baseId: base?.id ?? null, baseNumber: base?.number ?? null, baseAt: base?.orderAt ?? null, seq: change.seq,
      timeZone: row.timeZone, serial: row.serial, occasion: version.occasion, late: version.late, void: row.voidAt !== null,
      findingState: words.state, explanation: words.explanation, explainedBy: words.explainedBy,
    }
  })
}

type FindingWords = Pick<HistoryItem, 'explanation' | 'explainedBy' | 'allowedBy'> & { readonly state: HistoryItem['findingState'] }
const noFinding: FindingWords = { state: null, explanation: null, explainedBy: null, allowedBy: null }

/** Where a finding stands, what was said of it last, and who allowed what was accepted. */
function findingWords(db: VaultDb, id: number): FindingWords {
  const acts = findingQueries(db).acts.all({ findingId: id })
  const said = acts.findLast(({ act }) => act.kind === 'explained')
  const state = historyQueries(db).findingState.get({ id })?.state ?? null
  const closed = state === 'closed' ? acts.findLast(({ act }) => act.kind === 'closed') : undefined
  return { state, explanation: said?.act.text ?? null, explainedBy: said?.by ?? null, allowedBy: namedPerson(db, closed?.act.allowedBy ?? null) }
}
