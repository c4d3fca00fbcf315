import type { LifeEvent } from '#shared/api/versions'
import { Refusal } from '#shared/errors/refusal'
import type { Vault } from '#server/database/client'
import { lifeQueries } from '#server/database/life/queries'
import { limitOf, type PageQuery } from '../page'

/** At one instant events stand in this order, newest first: a swap takes the old unit out before it fits the new one. */
const kinds = ['finding-closed', 'finding', 'swap', 'void', 'mark', 'version', 'fitted', 'taken-out'] as const
type Source = (typeof kinds)[number]

/** An event with its key: instant, source, and number within the source. */
interface Keyed { readonly source: Source, readonly key: number, readonly event: LifeEvent }
interface Cursor { readonly at: string, readonly source: Source, readonly key: number }

const most = Number.MAX_SAFE_INTEGER
const nothing = { findingId: null, versionId: null, number: null, text: null, serial: null, changes: null, occasion: null, sightings: null }

/** What happened to an axis, newest first: versions by their time in order, marks, voidings, fittings, swaps, findings. */
export function axisLife({ db }: Vault, axisId: number, query: PageQuery): { items: LifeEvent[], next: string | null } {
  const cursor = cursorOf(query.cursor)
  const limit = limitOf(query) + 1
  const from = (source: Source) => ({ axisId, limit, at: cursor?.at ?? '9999-12-31T23:59:59.999Z', id: cursor ? boundFor(source, cursor) : most })
  const queries = lifeQueries(db)
  const found: Keyed[] = [
    ...queries.takenOut.all(from('taken-out')).map(row => ({ source: 'taken-out' as const, key: row.id, event: { ...nothing, at: row.at, kind: 'taken-out' as const, by: '', serial: row.serial } })),
    ...queries.voids.all(from('void')).map(row => ({ source: 'void' as const, key: row.id, event: { ...nothing, at: row.at, kind: 'void' as const, by: row.by, versionId: row.id, number: row.number, text: row.reason } })),
    ...queries.marks.all(from('mark')).map(row => ({ source: 'mark' as const, key: row.id, event: { ...nothing, at: row.at, kind: row.versionId === null ? 'mark-none' as const : 'mark' as const, by: row.by, versionId: row.versionId, number: row.number, text: row.note } })),
    ...queries.versions.all(from('version')).map(({ id, at, number, occasion, reason, harm, motion, text, serial, storedBy, token, sightings }) => ({
      source: 'version' as const, key: number,
      event: { at, kind: 'version' as const, findingId: null, versionId: id, number, by: token === null ? storedBy : `${token} (${storedBy})`, text: reason, serial, changes: { harm, motion, text }, occasion, sightings },
    })),
    ...queries.fitted.all(from('fitted')).map(row => ({ source: 'fitted' as const, key: row.id, event: { ...nothing, at: row.at, kind: 'fitted' as const, by: '', serial: row.serial } })),
    ...queries.swaps.all(from('swap')).map(row => ({ source: 'swap' as const, key: row.id, event: { ...nothing, at: row.at, kind: 'swap' as const, by: row.by, text: row.text } })),
    ...queries.findings.all(from('finding')).map(row => ({ source: 'finding' as const, key: row.id, event: { ...nothing, at: row.at, kind: 'finding' as const, findingId: row.id, by: '', text: row.title } })),
    ...queries.findingsClosed.all(from('finding-closed')).map(row => ({ source: 'finding-closed' as const, key: row.id, event: { ...nothing, at: row.at, kind: 'finding-closed' as const, findingId: row.findingId, by: row.by, text: row.title } })),
  ].sort(newestFirst)
  const shown = found.slice(0, limitOf(query))
  const last = shown.at(-1)
  return { items: shown.map(({ event }) => event), next: last && found.length > shown.length ? `${last.event.at}~${last.source}~${last.key}` : null }
}

function newestFirst(a: Keyed, b: Keyed): number {
  if (a.event.at !== b.event.at) return a.event.at < b.event.at ? 1 : -1
  return kinds.indexOf(a.source) - kinds.indexOf(b.source) || b.key - a.key
}

/** At the cursor's own instant: nothing more of the sources before its own, the rest of its own, all of those after. */
function boundFor(source: Source, cursor: Cursor): number {
  if (source === cursor.source) return cursor.key
  return kinds.indexOf(source) < kinds.indexOf(cursor.source) ? 0 : most
}

function cursorOf(text: string | undefined): Cursor | null {
  if (text === undefined) return null
  const [at = '', source, key = ''] = text.split('~')
  const known = kinds.find(kind => kind === source)
  if (!known || !/^\d{1,15}$/.test(key)) throw new Refusal('input', '?cursor: not one that this list gave.', { errors: [{ at: '?cursor', code: 'cursor', message: 'not one that this list gave' }] })
  return { at, source: known, key: Number(key) }
}
