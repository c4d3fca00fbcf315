import type { HistoryQuery } from '#shared/api/history'
import { Refusal } from '#shared/errors/refusal'
import { fieldsNamed } from '#shared/settings/families'
import { seesSite, type Actor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { historyQueries } from '#server/database/history/queries'
import type { Asked, NamedField, Stretch, Way } from '#server/database/history/walk'
import type { VaultDb } from '#server/database/prepared'
import { siteQueries } from '#server/database/site/scope'
import { personIn } from '../versions/summary'

/** With more ways than this the walks cost more than they save. */
const mostWays = 64

export interface HistoryFilter { readonly ways: readonly Way[], readonly asked: Asked, readonly stretch: Stretch }

type Filters = Omit<HistoryQuery, 'limit' | 'cursor' | 'form'>

/** What a query asks for, and the ways to walk that read the fewest entries for it. */
export function historyFilter({ db }: Vault, actor: Actor, query: Filters): HistoryFilter {
  const { section = null, row = null, weight = null, unit = null, line = null, site = null, by } = query
  assertPlacesSeen(db, actor, query)
  const axisIds = axesAsked(db, query)
  const asked: Asked = {
    names: namesAsked(query), section, row, weight, axisIds, unitId: unit, lineId: query.axis === undefined && query.machine === undefined ? null : line, siteId: site, sites: actor.sites,
    people: by === undefined || by === 'nobody' ? null : peopleAsked(db, by), nobody: by === 'nobody',
  }
  return { asked, ways: waysFor(asked), stretch: stretchOf(db, query) }
}

/** A place that is not there, or lies outside the actor's sites, is answered alike. */
function assertPlacesSeen(db: VaultDb, actor: Actor, { axis, machine, line, site, unit }: Filters): void {
  for (const [scope, ref] of [['axis', axis], ['machine', machine], ['line', line], ['site', site], ['unit', unit]] as const) {
    if (ref === undefined) continue
    const found = siteQueries(db).find(scope, ref)
    if (found === undefined || (found.siteId !== null && !seesSite(actor, found.siteId))) throw new Refusal('not-found', `There is no ${scope} ${ref}, or it belongs to another site.`)
  }
}

function namesAsked({ field, section }: Filters): Asked['names'] {
  if (field === undefined) return null
  const names: readonly NamedField[] = field === 'axisKind' ? [{ section: 'file', field }] : fieldsNamed(section === 'extra' && !field.startsWith('extra:') ? `extra:${field}` : field)
  const wanted = names.filter(name => section === undefined || name.section === section)
  if (wanted.length === 0) throw new Refusal('input', `?field: ${field} is neither a field of the settings format${section === undefined ? '' : ` in ${section}`} nor a family of fields.`, { errors: [{ at: '?field', code: 'field', message: 'neither a field nor a family', value: field }] })
  return wanted
}

/** A line is its axes: looked up once, and not again beside every key. */
function axesAsked(db: VaultDb, { axis, machine, line }: Filters): number[] | null {
  const queries = historyQueries(db)
  const ofPlace = machine !== undefined ? queries.axesOfMachine.all({ machineId: machine }) : line !== undefined ? queries.axesOfLine.all({ lineId: line }) : null
  const within = ofPlace?.map(({ id }) => id) ?? null
  if (axis === undefined) return within
  const id = siteQueries(db).find('axis', axis)?.id
  return id === undefined || (within !== null && !within.includes(id)) ? [] : [id]
}

/** A name stands for everyone who bears it, and for the text as it was written. */
function peopleAsked(db: VaultDb, by: string): NonNullable<Asked['people']> {
  const named = personIn(by)
  const ids = named === null ? historyQueries(db).peopleNamed.all({ name: by }).map(({ id }) => id) : [named]
  return { ids, texts: [...new Set([by, ...ids.map(id => `person:${id}`)])] }
}

function waysFor(asked: Asked): Way[] {
  const { axisIds, unitId, names, people, nobody, weight } = asked
  if (axisIds !== null && axisIds.length <= mostWays) return axisIds.map(id => ({ by: 'axis', id }))
  if (unitId !== null) return [{ by: 'unit', id: unitId }]
  if (names !== null) return names.map(name => ({ by: 'field', ...name }))
  if (people !== null && people.ids.length <= mostWays) return [...people.ids.map(id => ({ by: 'storer', id }) as const), ...people.texts.map(text => ({ by: 'changer', text }) as const)]
  if (nobody) return [{ by: 'nobody' }]
  return [weight === null ? { by: 'all' } : { by: 'weight', weight }]
}

/** The ids of the versions that were received in a stretch of time; empty where the last lies before the first. */
export function stretchOf(db: VaultDb, { from, to }: { readonly from?: string | undefined, readonly to?: string | undefined }): Stretch {
  const queries = historyQueries(db)
  const newest = queries.newest.get()?.id ?? 0
  return {
    first: from === undefined ? 1 : queries.firstFrom.get({ from: utc(from) })?.id ?? newest + 1,
    last: to === undefined ? newest : queries.lastBefore.get({ to: utc(to) })?.id ?? 0,
  }
}

/** As the vault writes instants, so that comparing texts compares times. */
export const utc = (instant: string): string => new Date(instant).toISOString()
