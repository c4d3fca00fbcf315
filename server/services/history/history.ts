import type { HistoryItem, HistoryQuery } from '#shared/api/history'
import { Refusal } from '#shared/errors/refusal'
import type { Actor } from '#server/database/actor'
import { axisRows } from '#server/database/axis/queries'
import type { Vault } from '#server/database/client'
import { readFindings, readItems, type ItemRow } from '#server/database/history/items'
import type { ChangeKey } from '#server/database/history/keys'
import type { Stretch } from '#server/database/history/walk'
import type { VaultDb } from '#server/database/prepared'
import { versionQueries } from '#server/database/version/queries'
import { newtonsOf, type ReadBoth } from '../forces/newtons'
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
    yield itemsOf(vault, keys)
    after = next
  }
}

function pageOn({ sqlite, db }: Vault, { plans, asked, stretch }: HistoryFilter, after: ChangeKey, limit: number) {
  const { keys, next } = findKeys(sqlite, plans, asked, stretch, after, limit)
  return { items: itemsOf({ sqlite, db }, keys), next: next && `${next.versionId}.${next.seq}` }
}

const startOf = ({ last }: Stretch): ChangeKey => ({ versionId: last + 1, seq: 0 })

function cursorOf({ cursor }: HistoryQuery, stretch: Stretch): ChangeKey {
  if (cursor === undefined) return startOf(stretch)
  const [, versionId, seq] = /^(\d{1,15})\.(\d{1,9})$/.exec(cursor) ?? []
  if (versionId === undefined || seq === undefined) throw new Refusal('input', '?cursor: not one that this list gave.', { errors: [{ at: '?cursor', code: 'cursor', message: 'not one that this list gave' }] })
  const key = { versionId: Number(versionId), seq: Number(seq) }
  return key.versionId > stretch.last ? startOf(stretch) : key
}

function itemsOf({ sqlite, db }: Pick<Vault, 'sqlite' | 'db'>, keys: readonly ChangeKey[]): HistoryItem[] {
  const rows = readItems(sqlite, keys)
  if (rows.length !== keys.length) throw new TypeError('a change is in an index and not in its table')
  const named = namesOf(db)
  const words = findingWords(sqlite, rows, named)
  return rows.map((row) => {
    const said = words.get(row.findingId ?? 0) ?? noFinding
    return {
      versionId: row.versionId, axisId: row.axisId, tag: row.tag, section: row.section, row: row.row, field: row.field,
      before: row.before, after: row.after, unit: row.unit, delta: row.delta, points: row.points, weight: row.weight,
      at: row.receivedAt, capturedAt: row.capturedAt,
      changedBy: named(row.changedBy), storedBy: row.token === null ? row.storer : `${row.token} (${row.storer})`,
      reason: row.reason, workOrder: row.workOrder, allowedBy: named(row.allowedBy) ?? said.allowedBy, findingId: row.findingId,
      number: row.number, baseId: row.baseId, baseNumber: row.baseNumber, baseAt: row.baseAt, seq: row.seq,
      timeZone: row.timeZone, serial: row.serial, occasion: row.occasion, late: row.late, void: row.voidAt !== null,
      newtons: newtonsOf(db, row, () => readBoth(db, row)),
      findingState: said.state, explanation: said.explanation, explainedBy: said.explainedBy,
    }
  })
}

/** Who changed or allowed something, each person looked up once a page. */
function namesOf(db: VaultDb): (text: string | null) => string | null {
  const names = new Map<string, string | null>()
  return (text) => {
    if (text === null) return null
    const known = names.get(text) ?? namedPerson(db, text)
    names.set(text, known)
    return known
  }
}

/** Of which models both sides of a change were read; their nameplates are those of when the version came in. */
function readBoth(db: VaultDb, { versionId, axisId, baseId, receivedAt }: ItemRow): ReadBoth {
  const read = (id: number) => ({ model: versionQueries(db).modelOf.get({ id })?.model ?? '', at: receivedAt })
  return { axisKind: axisRows(db).byId.get({ id: axisId })?.axisKind ?? 'linear', before: baseId === null ? null : read(baseId), after: read(versionId) }
}

type FindingWords = Pick<HistoryItem, 'explanation' | 'explainedBy' | 'allowedBy'> & { readonly state: HistoryItem['findingState'] }
const noFinding: FindingWords = { state: null, explanation: null, explainedBy: null, allowedBy: null }

/** Where the findings of a page stand, what was said of each last, and who allowed what was accepted. */
function findingWords(sqlite: Vault['sqlite'], rows: readonly ItemRow[], named: (text: string | null) => string | null): ReadonlyMap<number, FindingWords> {
  const ids = [...new Set(rows.flatMap(({ findingId }) => findingId ?? []))]
  if (ids.length === 0) return new Map()
  return new Map([...readFindings(sqlite, ids)].map(([id, { state, acts }]) => {
    const said = acts.findLast(({ kind }) => kind === 'explained')
    const closed = state === 'closed' ? acts.findLast(({ kind }) => kind === 'closed') : undefined
    return [id, { state, explanation: said?.text ?? null, explainedBy: said?.by ?? null, allowedBy: named(closed?.allowedBy ?? null) }]
  }))
}
