import type { z } from 'zod'
import type { actsQuery, HistoryAct, HistoryKind } from '#shared/api/history'
import { canonicalJson } from '#shared/settings/canonical'
import { parseLeaf, type Entry, type Json } from '#shared/trail/entry'
import { seesSite, type Actor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { termQueries, type TermKind } from '#server/database/history/terms'
import { logQueries } from '#server/database/log/queries'
import type { VaultDb } from '#server/database/prepared'
import { axisRows } from '#server/database/axis/queries'
import { siteQueries } from '#server/database/site/scope'
import { afterOf, limitOf, pageOf } from '../page'
import { utc } from './filter'

const kinds: Readonly<Record<HistoryKind, readonly TermKind[]>> = {
  settings: ['vault', 'setting', 'site'], places: ['line', 'machine', 'axis'], nameplates: ['nameplate'], rules: ['rule'], people: ['person', 'token'], marks: ['known-good'],
}

type State = Readonly<Record<string, Json>>

/** Acts of a kind that the actor may see, newest first, each with what it changed. A page may be short and still have a next one. */
export function listActs(vault: Vault, actor: Actor, query: z.output<typeof actsQuery>): { items: HistoryAct[], next: string | null } {
  const { db } = vault
  const first = query.from === undefined ? 0 : firstSeq(db, utc(query.from))
  const below = Math.min(afterOf(query, Number.MAX_SAFE_INTEGER), query.to === undefined ? Number.MAX_SAFE_INTEGER : firstSeq(db, utc(query.to)))
  const rows = kinds[query.kind].flatMap(kind => termQueries(db).ofKind.all({ kind, below, limit: limitOf(query) + 1 }))
    .filter(({ seq }) => seq >= first).sort((a, b) => b.seq - a.seq)
  const page = pageOf(rows, query, ({ seq }) => seq, ({ leaf }) => parseLeaf(leaf))
  return { items: page.items.filter(entry => sees(db, actor, entry)).map(entry => actOf(db, entry)), next: page.next }
}

/** The first entry that is not older than an instant: times of the log never go back. */
function firstSeq(db: VaultDb, instant: string): number {
  let [low, high] = [0, (logQueries(db).newest.get()?.seq ?? -1) + 1]
  while (low < high) {
    const middle = Math.floor((low + high) / 2)
    if ((termQueries(db).at.get({ seq: middle })?.at ?? '') < instant) low = middle + 1
    else high = middle
  }
  return low
}

/** Nameplates and the vault's own settings belong to all sites; people are seen by those who see all sites. */
function sees(db: VaultDb, actor: Actor, { subject: { kind, id }, state }: Entry): boolean {
  if (actor.sites === null || kind === 'nameplate' || kind === 'setting' || kind === 'vault') return true
  if (kind === 'known-good') return seesPlace(db, actor, 'axis', Number(state.axisId))
  return (kind === 'site' || kind === 'line' || kind === 'machine' || kind === 'axis' || kind === 'rule') && seesPlace(db, actor, kind, Number(id))
}

function seesPlace(db: VaultDb, actor: Actor, scope: 'site' | 'line' | 'machine' | 'axis' | 'rule', id: number): boolean {
  const siteId = siteQueries(db).find(scope, id)?.siteId
  return siteId === null || (siteId !== undefined && seesSite(actor, siteId))
}

function actOf(db: VaultDb, entry: Entry): HistoryAct {
  const { seq, at, actor, act, note } = entry
  return { seq, at, by: actor.name, act, note, subject: subjectOf(db, entry), changes: differences(shownState(db, entry.subject.kind, stateBefore(db, entry)), shownState(db, entry.subject.kind, entry.state)) }
}

/** What stood before: the revision before of a nameplate, the mark before of an axis, else the entry before about the same subject. */
function stateBefore(db: VaultDb, { seq, subject: { kind, id }, state }: Entry): State | undefined {
  if (kind === 'nameplate') return termQueries(db).revision.get({ model: state.model, revision: Number(state.revision) - 1 }) as State | undefined
  if (kind === 'known-good') return termQueries(db).markBefore.get({ axisId: state.axisId, below: Number(id) }) as State | undefined
  const row = termQueries(db).before.get({ kind, id, below: seq })
  return row && parseLeaf(row.leaf).state
}

function shownState(db: VaultDb, kind: Entry['subject']['kind'], state: State | undefined): State {
  if (state === undefined) return {}
  const { id: _id, rev: _rev, madeAt: _at, madeBy: _by, nameplate, ...own } = state
  if (kind === 'nameplate') return { revision: own.revision ?? null, ...nameplate as State }
  if (kind !== 'known-good') return own
  const number = own.versionId === null ? undefined : termQueries(db).versionNumber.get({ id: own.versionId })?.number
  return { 'known-good': number === undefined ? 'none' : `v${number}`, 'meaning': own.meaning ?? null }
}

function differences(before: State, after: State): HistoryAct['changes'] {
  const fields = [...new Set([...Object.keys(after), ...Object.keys(before)])]
  const same = (field: string) => Object.hasOwn(before, field) && Object.hasOwn(after, field) && canonicalJson(before[field]) === canonicalJson(after[field])
  const told = (field: string) => (before[field] ?? null) !== null || (after[field] ?? null) !== null
  return fields.filter(field => !same(field) && told(field)).map(field => ({ field, before: before[field], after: after[field] }))
}

function subjectOf(db: VaultDb, { subject: { kind, id }, state }: Entry): string {
  if (kind === 'nameplate') return String(state.model)
  if (kind === 'known-good') return axisRows(db).byId.get({ id: Number(state.axisId) })?.tag ?? `axis ${String(state.axisId)}`
  if (kind === 'rule') return String(state.field)
  return String(state.name ?? state.tag ?? id)
}
