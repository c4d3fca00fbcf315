import type { HistoryQuery } from '#shared/api/history'
import { Refusal } from '#shared/errors/refusal'
import { fieldsNamed } from '#shared/settings/families'
import { seesSite, type Actor } from '#server/database/actor'
import { boundsText } from '#server/database/bounds'
import type { Vault } from '#server/database/client'
import { historyQueries } from '#server/database/history/queries'
import type { Asked, NamedField, Stretch } from '#server/database/history/walk'
import type { VaultDb } from '#server/database/prepared'
import { siteQueries } from '#server/database/site/scope'
import { personIn } from '../versions/summary'
import type { Plan } from './merge'

/** Sites with more axes than this are looked up beside each key: most keys are theirs. */
const mostAxes = 1000
/** As many as a machine has: all their versions are soon looked through. */
const fewAxes = 8
/** With more people of one name than this the walks cost more than they save. */
const mostPeople = 64

export interface HistoryFilter { readonly plans: readonly Plan[], readonly asked: Asked, readonly stretch: Stretch }

type Filters = Omit<HistoryQuery, 'limit' | 'cursor' | 'form'>

/** What a query asks for, and the plans that may read the fewest entries for it. */
export function historyFilter({ db }: Vault, actor: Actor, query: Filters): HistoryFilter {
  const { section = null, row = null, weight = null, unit = null, site = null, by } = query
  assertPlacesSeen(db, actor, query)
  const axisIds = axesAsked(db, actor, query)
  const asked: Asked = {
    names: namesAsked(query), section, row, weight, axisIds, unitId: unit, siteId: axisIds === null ? site : null, sites: axisIds === null ? actor.sites : null,
    people: by === undefined || by === 'nobody' ? null : peopleAsked(db, by), nobody: by === 'nobody',
  }
  return { asked, plans: plansFor(asked), stretch: stretchOf(db, query) }
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

/** A place is its axes: looked up once, and not again beside every key. null: all axes, or those of sites that have too many. */
function axesAsked(db: VaultDb, actor: Actor, query: Filters): number[] | null {
  const { axis, machine = null, line = null, site = null } = query
  const { axesOf } = historyQueries(db)
  const within = { machineId: machine, lineId: line, siteId: site, sites: boundsText(actor.sites), limit: -1 }
  const idsOf = (rows: readonly { id: number }[]) => rows.map(({ id }) => id)
  if (axis !== undefined) return idsOf(axesOf.axis.all({ ...within, axisId: siteQueries(db).find('axis', axis)?.id ?? 0 }))
  if (machine !== null) return idsOf(axesOf.machine.all(within))
  if (line !== null) return idsOf(axesOf.line.all(within))
  const sites = site === null ? actor.sites : [site]
  if (sites === null) return null
  const ids = idsOf(axesOf.sites.all({ ...within, siteIds: JSON.stringify(sites), limit: mostAxes + 1 }))
  return ids.length > mostAxes ? null : ids
}

/** A name stands for everyone who bears it, and for the text as it was written. */
function peopleAsked(db: VaultDb, by: string): NonNullable<Asked['people']> {
  const named = personIn(by)
  const ids = named === null ? historyQueries(db).peopleNamed.all({ name: by }).map(({ id }) => id) : [named]
  return { ids, texts: [...new Set([by, ...ids.map(id => `person:${id}`)])] }
}

/** Along the axes of the place, and along what else is asked for; the first alone where nothing else is. */
function plansFor(asked: Asked): Plan[] {
  const { axisIds, unitId } = asked
  if (unitId !== null) return [[{ by: 'unit', id: unitId }]]
  const along = planFor(asked)
  if (axisIds === null) return [along ?? [{ by: 'all' }]]
  return [[{ by: 'axes', ids: axisIds }], ...(along === null || axisIds.length <= fewAxes ? [] : [along])]
}

function planFor({ names, people, nobody, weight }: Asked): Plan | null {
  if (names !== null) return names.map(name => ({ by: 'field', ...name }))
  if (people !== null && people.ids.length <= mostPeople) return [...people.ids.map(id => ({ by: 'storer', id }) as const), ...people.texts.map(text => ({ by: 'changer', text }) as const)]
  if (nobody) return [{ by: 'nobody' }]
  return weight === null ? null : [{ by: 'weight', weight }]
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
